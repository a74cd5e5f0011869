import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, readdirSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { root, runCommand } from './environment.mjs';
import { ensureInstalled } from './install.mjs';
import { runStep } from './run.mjs';

/** Every program and worker of the server side, by the flat name it gets under dist/server. */
const programs = {
  main: 'server/main.ts',
  'password.worker': 'server/access/password.worker.ts',
  'create-user': 'server/access/create-user.ts',
  'load-demo': 'demo-data/main.ts',
  'historian-fake': 'fakes/historian/main.ts',
  'mail-fake': 'fakes/mail/main.ts',
};

/**
 * Options for esbuild: one ESM bundle a program, packages left outside, shared chunks split off. Names are flat, so that
 * a worker's `new URL('./x.worker.js', import.meta.url)` holds in the bundle.
 */
export const serverBuild = {
  absWorkingDir: root,
  entryPoints: programs,
  outdir: 'dist/server',
  bundle: true,
  platform: 'node',
  target: 'node20',
  format: 'esm',
  packages: 'external',
  splitting: true,
  sourcemap: true,
  tsconfig: 'tsconfig.node.json',
  logLevel: 'warning',
};

const parts = {
  client: [
    'src',
    'shared',
    'public',
    'angular.json',
    'tsconfig.json',
    'tsconfig.app.json',
    'package-lock.json',
  ],
  server: [
    'server',
    'shared',
    'fakes',
    'demo-data',
    'tsconfig.json',
    'tsconfig.node.json',
    'package-lock.json',
  ],
};

/** Builds what has changed since the last build: contents decide, not file times. */
export async function ensureBuilt() {
  if (isStale('server')) {
    rmSync(join(root, 'dist/server'), { recursive: true, force: true });
    await runStep('Building the server', process.execPath, [join(root, 'server/tools/build-server.mjs')]);
    markBuilt('server');
  }
  if (isStale('client')) {
    await runStep('Building the screens', process.execPath, [
      join(root, 'node_modules/@angular/cli/bin/ng.js'),
      'build',
    ]);
    markBuilt('client');
  }
}

const stampFile = (part) => join(root, 'dist', `.${part}-built`);

function isStale(part) {
  return !existsSync(stampFile(part)) || readFileSync(stampFile(part), 'utf8') !== fingerprint(part);
}

function markBuilt(part) {
  mkdirSync(join(root, 'dist'), { recursive: true });
  writeFileSync(stampFile(part), fingerprint(part));
}

function fingerprint(part) {
  const hash = createHash('sha256');
  const add = (path) => {
    if (!existsSync(path)) return;
    if (statSync(path).isDirectory()) for (const name of readdirSync(path).sort()) add(join(path, name));
    else hash.update(path).update('\0').update(readFileSync(path)).update('\0');
  };
  for (const path of parts[part]) add(join(root, path));
  return hash.digest('hex');
}

if (import.meta.url === pathToFileURL(process.argv[1] ?? '').href)
  await runCommand(async () => {
    await ensureInstalled();
    await ensureBuilt();
  });
