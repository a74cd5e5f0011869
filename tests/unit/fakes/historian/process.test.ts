import { type ChildProcess, spawn } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { historianLatest, type HistorianRaw, historianRaw } from '@shared/api/historian';

// Simulating and starting processes takes its time where others work too.
vi.setConfig({ testTimeout: 60_000 });

const root = fileURLToPath(new URL('../../../..', import.meta.url));
const clock = Date.UTC(2026, 9, 14, 9, 20, 30);

let folder: string;
let running: ChildProcess[] = [];

beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'historian-'));
});

afterEach(() => {
  for (const child of running) child.kill('SIGKILL');
  running = [];
  rmSync(folder, { recursive: true, force: true });
});

/** Starts the process and waits for its first line, or its end. */
async function start(environment: Record<string, string> = {}) {
  const child = spawn(process.execPath, ['--import', 'tsx', 'fakes/historian/main.ts'], {
    cwd: root,
    env: {
      PATH: process.env['PATH'],
      HISTORIAN_PORT: '0',
      HISTORIAN_TOKEN: 'plant',
      HISTORIAN_WEEKS: '1',
      HISTORIAN_MANUAL_CLOCK: String(clock),
      DATA_DIR: folder,
      ...environment,
    },
  });
  running.push(child);
  let output = '';
  child.stdout.on('data', (part: Buffer) => (output += part.toString()));
  child.stderr.on('data', (part: Buffer) => (output += part.toString()));
  const ended = new Promise<number | null>((end) => child.once('exit', end));
  await Promise.race([
    ended,
    new Promise<void>((ready) => child.stdout.on('data', () => output.includes('\n') && ready())),
  ]);
  const url = /http:\/\/[\d.:]+/.exec(output)?.[0] ?? '';
  const ask = async (path: string, body: object): Promise<unknown> =>
    (
      await fetch(`${url}${path}`, {
        method: 'POST',
        headers: { authorization: 'Bearer plant', 'content-type': 'application/json' },
        body: JSON.stringify(body),
      })
    ).json();
  return { child, ended, ask, output: () => output };
}

const wholeWeek = async (ask: (path: string, body: object) => Promise<unknown>): Promise<HistorianRaw> =>
  historianRaw.parse(await ask('/v1/raw', { tags: ['dp-overhead-temperature'], from: 0, to: clock }));

describe('the process of the historian fake', () => {
  it('says when it is ready, ends cleanly, and after a restart gives the same minutes the same values', async () => {
    const first = await start();
    expect(first.output()).toMatch(
      /^historian fake: http:\/\/127\.0\.0\.1:\d+ \(10101 minutes since 2026-10-07T09:00/,
    );
    const before = await wholeWeek(first.ask);
    expect(before.series[0]!.t).toHaveLength(10_000);
    first.child.kill('SIGTERM');
    expect(await first.ended).toBe(0);

    const second = await start({ HISTORIAN_MANUAL_CLOCK: String(clock + 90 * 60_000), HISTORIAN_WEEKS: '3' });
    expect(await wholeWeek(second.ask)).toEqual(before);
    const { values } = historianLatest.parse(await second.ask('/v1/latest', { tags: ['dp-feed-flow'] }));
    expect(values[0]!.t).toBe(Date.UTC(2026, 9, 14, 10, 50));
    second.child.kill('SIGINT');
    expect(await second.ended).toBe(0);
    expect(JSON.parse(readFileSync(join(folder, 'historian.json'), 'utf8'))).toEqual({
      seed: 20_260_901,
      startAt: Date.UTC(2026, 9, 7, 9),
    });
  });

  it.each([
    ['no token', { HISTORIAN_TOKEN: '' }, /HISTORIAN_TOKEN/],
    ['a port that is none', { HISTORIAN_PORT: '99999' }, /HISTORIAN_PORT/],
  ])('does not start with %s, and says which variable to correct', async (_, environment, words) => {
    const failed = await start(environment);
    expect(await failed.ended).toBe(1);
    expect(failed.output()).toMatch(words);
    expect(failed.output()).not.toMatch(/at .*\.ts/);
  });

  it.each([
    ['is damaged', '{"seed":', /historian\.json cannot be read.*delete it/],
    ['holds another seed', '{"seed":5,"startAt":1788220800000}', /history of seed 5.*HISTORIAN_SEED says 6/],
    ['begins in the future', '{"seed":6,"startAt":1988220840000}', /begins in the future/],
  ])('does not start when historian.json %s, and says what to do', async (_, content, words) => {
    writeFileSync(join(folder, 'historian.json'), content);
    const failed = await start({ HISTORIAN_SEED: '6' });
    expect(await failed.ended).toBe(1);
    expect(failed.output()).toMatch(words);
  });
});
