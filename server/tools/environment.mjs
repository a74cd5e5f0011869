import { execFileSync } from 'node:child_process';
import { createServer } from 'node:net';
import { dirname, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';

/** The checkout's top folder. */
export const root = resolve(dirname(fileURLToPath(import.meta.url)), '../..');

/** A reason to stop that a person can act on; printed as one sentence, without a stack. */
export class CannotGoOn extends Error {}

/** Whether a program of that name is on the path. */
export function has(program) {
  try {
    execFileSync(process.platform === 'win32' ? 'where' : 'which', [program], { stdio: 'ignore' });
    return true;
  } catch {
    return false; // `which` exits non-zero when there is none: that is the answer
  }
}

export function requireNode20() {
  const [major, minor] = process.versions.node.split('.').map(Number);
  if (major !== 20 || minor < 19)
    throw new CannotGoOn(
      `Dewmark runs on Node 20 (20.19 or later); this is Node ${process.versions.node}. Install Node 20 and run the command again.`,
    );
}

/** Whether the driver can be compiled here; says which Debian packages are missing. */
export function requireCompiler() {
  const missing = ['python3', 'make', 'g++'].filter((program) => !has(program));
  if (missing.length > 0)
    throw new CannotGoOn(
      `The database driver must be compiled and ${missing.join(', ')} ${missing.length > 1 ? 'are' : 'is'} missing. On Debian: apt-get install ${missing.join(' ')}, then run the command again.`,
    );
}

/** Throws unless every port is free; `ports` maps what it is for to its number. */
export async function requireFreePorts(ports, host) {
  for (const [purpose, port] of Object.entries(ports)) {
    const isFree = await new Promise((answer) => {
      const probe = createServer();
      probe.once('error', () => answer(false));
      probe.listen(port, host, () => probe.close(() => answer(true)));
    });
    if (!isFree)
      throw new CannotGoOn(
        `Port ${port} (${purpose}) is in use. Stop what uses it, or choose another set of ports: PORT=4700 npm start.`,
      );
  }
}

/** Runs the command's body; a known reason is printed as its sentence, anything else with its stack. */
export async function runCommand(body) {
  try {
    requireNode20();
    await body();
  } catch (error) {
    console.error(error instanceof CannotGoOn ? `\n${error.message}` : error);
    process.exitCode = 1;
  }
}
