import { spawn } from 'node:child_process';
import { join } from 'node:path';
import { ensureBuilt } from './build.mjs';
import { root, runCommand } from './environment.mjs';
import { ensureInstalled } from './install.mjs';

/** `npm run serve`: the server alone, with the settings of its environment. */
await runCommand(async () => {
  await ensureInstalled();
  await ensureBuilt();
  const server = spawn(process.execPath, ['--enable-source-maps', join(root, 'dist/server/main.js')], {
    cwd: root,
    env: { UV_THREADPOOL_SIZE: '16', NODE_ENV: 'production', ...process.env },
    stdio: 'inherit',
  });
  for (const signal of ['SIGINT', 'SIGTERM']) process.on(signal, () => server.kill('SIGTERM'));
  process.exitCode = await new Promise((resolve) => server.once('exit', (code) => resolve(code ?? 1)));
});
