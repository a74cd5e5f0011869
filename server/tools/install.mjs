import { createHash } from 'node:crypto';
import { copyFileSync, existsSync, mkdirSync, readFileSync, renameSync, writeFileSync } from 'node:fs';
import { homedir } from 'node:os';
import { dirname, join } from 'node:path';
import { requireCompiler, root } from './environment.mjs';
import { runQuietly, runStep } from './run.mjs';

const stampFile = join(root, 'node_modules/.dewmark-installed');
const driver = join(root, 'node_modules/sqlite3/build/Release/node_sqlite3.node');

/**
 * Installs the locked packages unless they are there already.
 *
 * The database driver is compiled once per machine, which takes two minutes; a copy is kept in the user's cache folder,
 * so that a second checkout need not compile again. Plain `npm ci` does the same without the copy.
 */
export async function ensureInstalled() {
  const stamp = `${createHash('sha256')
    .update(readFileSync(join(root, 'package-lock.json')))
    .digest('hex')} ${platform()}`;
  if (existsSync(stampFile) && readFileSync(stampFile, 'utf8') === stamp && existsSync(driver)) return;
  await runStep(
    'Installing packages (about a minute)',
    'npm',
    ['ci', '--ignore-scripts', '--no-audit', '--no-fund'],
    {
      hint: 'Is a package registry reachable?',
    },
  );
  await provideDriver();
  writeFileSync(stampFile, stamp);
}

async function provideDriver() {
  const kept = keptDriver();
  if (existsSync(kept)) {
    mkdirSync(dirname(driver), { recursive: true });
    copyFileSync(kept, driver);
    if (await driverWorks()) return;
  }
  requireCompiler();
  await runStep(
    'Compiling the database driver (about 2 minutes)',
    'npm',
    ['rebuild', 'sqlite3', '--foreground-scripts'],
    {
      env: { JOBS: '2' },
      hint: 'It needs python3, make, g++ and the headers of Node 20 (npm_config_nodedir names their folder where they cannot be fetched).',
    },
  );
  keepDriver(kept);
}

async function driverWorks() {
  const probe = "new (require('sqlite3').Database)(':memory:', (error) => process.exit(error ? 1 : 0))";
  return (await runQuietly(process.execPath, ['-e', probe])).code === 0;
}

function keepDriver(kept) {
  try {
    mkdirSync(dirname(kept), { recursive: true });
    // Written beside and renamed, so that another checkout never reads half a file.
    const partial = `${kept}.${process.pid}`;
    copyFileSync(driver, partial);
    renameSync(partial, kept);
  } catch {
    // A read-only home folder only costs the next checkout two minutes.
  }
}

function keptDriver() {
  const { version } = JSON.parse(readFileSync(join(root, 'node_modules/sqlite3/package.json'), 'utf8'));
  const cache = process.env.XDG_CACHE_HOME ?? join(homedir(), '.cache');
  return join(cache, 'dewmark', `sqlite3-${version}-${platform()}.node`);
}

/** What a compiled driver depends on. */
function platform() {
  const libc = process.report.getReport().header.glibcVersionRuntime ?? 'other';
  return `${process.platform}-${process.arch}-napi${process.versions.napi}-libc${libc}`;
}
