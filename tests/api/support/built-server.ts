import { spawn, type ChildProcess } from 'node:child_process';
import { mkdirSync, mkdtempSync, rmSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { build } from 'esbuild';
import { onTestFinished } from 'vitest';
import { serverBuild } from '../../../server/tools/build.mjs';

const root = resolve(import.meta.dirname, '../../..');

/** Bundles some programs as the build does, into a folder of their own inside the checkout, where packages are found. */
export async function buildPrograms(programs: Record<string, string>): Promise<string> {
  mkdirSync(join(root, '.build'), { recursive: true });
  const folder = mkdtempSync(join(root, '.build/programs-'));
  await build({
    ...serverBuild,
    format: 'esm',
    platform: 'node',
    packages: 'external',
    logLevel: 'warning',
    entryPoints: programs,
    outdir: folder,
  });
  return folder;
}

export function removePrograms(folder: string): void {
  rmSync(folder, { recursive: true, force: true });
}

export interface Program {
  readonly child: ChildProcess;
  readonly output: () => string;
  /** Resolves with the exit code, or the signal's name. */
  readonly ended: Promise<number | string>;
}

/** Starts a bundled program with the settings given and no others; killed at the latest when the test ends. */
export function run(
  file: string,
  options: { env?: Record<string, string>; args?: readonly string[]; input?: string } = {},
): Program {
  const child = spawn(process.execPath, ['--enable-source-maps', file, ...(options.args ?? [])], {
    cwd: root,
    env: { PATH: process.env['PATH'], UV_THREADPOOL_SIZE: '16', ...options.env },
    stdio: ['pipe', 'pipe', 'pipe'],
  });
  let text = '';
  child.stdout.on('data', (part: Buffer) => (text += part.toString()));
  child.stderr.on('data', (part: Buffer) => (text += part.toString()));
  child.stdin.end(options.input ?? '');
  const ended = new Promise<number | string>((resolveEnd) =>
    child.once('close', (code, signal) => resolveEnd(code ?? signal!)),
  );
  onTestFinished(async () => {
    child.kill('SIGKILL');
    await ended;
  });
  return { child, output: () => text, ended };
}
