import { spawn } from 'node:child_process';
import { join } from 'node:path';
import { CannotGoOn, root } from './environment.mjs';

/** The programs one command has started, ended together in the reverse order. */
export class Processes {
  #running = [];
  #isStopping = false;

  /** Called with the name of a program that ended without being told to. */
  onUnexpectedEnd = () => undefined;

  /** Starts dist/server/NAME.js and waits until it answers at `readyUrl`. */
  async start(name, env, readyUrl) {
    // A group of its own: a Ctrl-C at the terminal reaches this command alone, which then ends them in order.
    const child = spawn(process.execPath, ['--enable-source-maps', join(root, 'dist/server', `${name}.js`)], {
      cwd: root,
      env: { UV_THREADPOOL_SIZE: '16', ...process.env, ...env },
      stdio: ['ignore', 'inherit', 'inherit'],
      detached: process.platform !== 'win32',
    });
    const entry = { name, child, ended: new Promise((resolve) => child.once('exit', resolve)) };
    this.#running.push(entry);
    let exitCode = null;
    child.once('exit', (code) => {
      exitCode = code ?? 1;
      if (!this.#isStopping) this.onUnexpectedEnd(name);
    });
    for (let tries = 0; tries < 600; tries++) {
      if (exitCode !== null)
        throw new CannotGoOn(
          `${name} ended before it was ready (exit code ${exitCode}); its reason is above.`,
        );
      if (await answers(readyUrl)) return;
      await new Promise((resolve) => setTimeout(resolve, 100));
    }
    throw new CannotGoOn(`${name} did not answer at ${readyUrl} within a minute.`);
  }

  async stop() {
    this.#isStopping = true;
    for (const { child, ended } of this.#running.reverse()) {
      child.kill('SIGTERM');
      const force = setTimeout(() => child.kill('SIGKILL'), 10_000);
      await ended;
      clearTimeout(force);
    }
    this.#running = [];
  }
}

async function answers(url) {
  try {
    return (await fetch(url, { signal: AbortSignal.timeout(2000) })).status < 500;
  } catch {
    return false; // not listening yet
  }
}
