import { spawn } from 'node:child_process';
import { mkdirSync } from 'node:fs';
import { join } from 'node:path';
import { requireFreePorts, root, runCommand } from './environment.mjs';
import { ensureInstalled } from './install.mjs';
import { Processes } from './processes.mjs';
import { runStep } from './run.mjs';
import { demoSettings } from './settings.mjs';

/** `npm run dev`: server, fakes and screens, each rebuilt and reloaded on change. */
await runCommand(async () => {
  await ensureInstalled();
  const { ports, host, dataDir, env } = demoSettings();
  const clientPort = Number(process.env.CLIENT_PORT ?? 4200);
  await requireFreePorts(
    {
      screens: clientPort,
      server: ports.server,
      'historian fake': ports.historian,
      'mail page': ports.mailPage,
      'mail fake': ports.mail,
    },
    host,
  );
  mkdirSync(dataDir, { recursive: true });
  // Imported late: both exist only once the packages are installed.
  const { context } = await import('esbuild');
  const { default: concurrently } = await import('concurrently');
  const { serverBuild } = await import('./build.mjs');

  const building = await context(serverBuild);
  await building.rebuild();
  await building.watch();
  const settings = env(ports);
  const fakes = new Processes();
  await fakes.start('historian-fake', settings, `http://${host}:${ports.historian}/health`);
  await fakes.start('mail-fake', settings, `http://${host}:${ports.mailPage}/`);
  await runStep('Loading the demonstration', process.execPath, [join(root, 'dist/server/load-demo.js')], {
    env: settings,
  });

  const { result } = concurrently(
    [
      { name: 'server', command: 'node --watch --enable-source-maps dist/server/main.js', env: settings },
      {
        name: 'screens',
        command: `node node_modules/@angular/cli/bin/ng.js serve --port ${clientPort}`,
        env: settings,
      },
    ],
    { cwd: root, killOthersOn: ['failure', 'success'], spawn },
  );
  await result.catch(() => undefined); // Ctrl-C ends both with a signal, which it reports as a failure
  await building.dispose();
  await fakes.stop();
});
