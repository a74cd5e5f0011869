import { pino } from 'pino';
import { afterEach, beforeEach, expect, it, vi } from 'vitest';
import { startJobs } from '../../../server/jobs/schedule';

beforeEach(() => {
  vi.useFakeTimers({ now: Date.UTC(2026, 2, 3, 12, 0, 30) });
});
afterEach(() => {
  vi.useRealTimers();
});

const silent = pino({ level: 'silent' });

/** Lets `ms` pass in steps, so that promises between the timers are settled. */
async function pass(ms: number) {
  for (let passed = 0; passed < ms; passed += 250) await vi.advanceTimersByTimeAsync(250);
}

it('collects at once, then each minute five seconds past, and tidies up each quarter of an hour', async () => {
  const at: string[] = [];
  let tidied = 0;
  const jobs = startJobs(
    {
      collect: () => Promise.resolve(void at.push(new Date(Date.now()).toISOString().slice(14, 19))),
      tidyUp: () => Promise.resolve(void tidied++),
    },
    silent,
  );
  await pass(16 * 60_000);
  expect(at.slice(0, 4)).toEqual(['00:30', '01:05', '02:05', '03:05']);
  expect(at).toHaveLength(17);
  // At 12:00:40 and 12:15:40.
  expect(tidied).toBe(2);
  await jobs.stop(100);
});

it('never runs two cycles at once: a slow one makes the next wait for its turn', async () => {
  let running = 0;
  let most = 0;
  let count = 0;
  const jobs = startJobs(
    {
      async collect() {
        most = Math.max(most, ++running);
        count++;
        await new Promise((resolve) => setTimeout(resolve, 150_000));
        running--;
      },
      tidyUp: () => Promise.resolve(),
    },
    silent,
  );
  await pass(10 * 60_000);
  expect([most, count > 2]).toEqual([1, true]);
  const stopping = jobs.stop(200_000);
  await pass(200_000);
  await stopping;
});

it('logs a job that fails and runs it again the next minute', async () => {
  const lines: string[] = [];
  const logger = pino({ level: 'error' }, { write: (line: string) => void lines.push(line) });
  let count = 0;
  const jobs = startJobs(
    {
      collect: () => Promise.reject(new Error(`failure ${++count}`)),
      tidyUp: () => Promise.resolve(),
    },
    logger,
  );
  await pass(2 * 60_000);
  expect(count).toBeGreaterThanOrEqual(2);
  expect(lines[0]).toContain('failure 1');
  await jobs.stop(100);
});

it('waits at its stop for the cycle that is running, and starts no other', async () => {
  let ended = 0;
  let started = 0;
  const jobs = startJobs(
    {
      async collect() {
        started++;
        await new Promise((resolve) => setTimeout(resolve, 3000));
        ended++;
      },
      tidyUp: () => Promise.resolve(),
    },
    silent,
  );
  await pass(1000);
  let isStopped = false;
  const stopping = jobs.stop(10_000).then(() => (isStopped = true));
  await pass(1000);
  expect([isStopped, ended]).toEqual([false, 0]);
  await pass(2000);
  await stopping;
  expect(ended).toBe(1);
  await pass(3 * 60_000);
  expect(started).toBe(1);
});
