import { mkdirSync } from 'node:fs';
import { join } from 'node:path';
import { ensureBuilt } from './build.mjs';
import { requireFreePorts, root, runCommand } from './environment.mjs';
import { ensureInstalled } from './install.mjs';
import { Processes } from './processes.mjs';
import { runStep } from './run.mjs';
import { demoSettings } from './settings.mjs';

/** `npm start`: the whole demonstration, from a fresh checkout to an address to open. */
await runCommand(async () => {
  const { ports, host, dataDir, env } = demoSettings();
  await requireFreePorts(
    {
      server: ports.server,
      'historian fake': ports.historian,
      'mail page': ports.mailPage,
      'mail fake': ports.mail,
    },
    host,
  );
  await ensureInstalled();
  await ensureBuilt();
  mkdirSync(dataDir, { recursive: true });

  const processes = new Processes();
  const stop = async (code) => {
    console.log('\nStopping …');
    await processes.stop();
    process.exit(code);
  };
  process.once('SIGINT', () => void stop(0));
  process.once('SIGTERM', () => void stop(0));
  processes.onUnexpectedEnd = (name) => {
    console.error(`\n${name} ended unexpectedly; its reason is above.`);
    void stop(1);
  };

  try {
    const settings = env(ports);
    console.log('  Starting the historian fake (simulating the tower) …');
    await processes.start('historian-fake', settings, `http://${host}:${ports.historian}/health`);
    console.log('  Starting the mail fake …');
    await processes.start('mail-fake', settings, `http://${host}:${ports.mailPage}/`);
    await runStep(
      'Loading the demonstration (migrations, weeks of history, samples)',
      process.execPath,
      [join(root, 'dist/server/load-demo.js')],
      {
        env: settings,
      },
    );
    console.log('  Starting the server …');
    await processes.start('main', settings, `http://${host}:${ports.server}/api/health`);
  } catch (error) {
    await processes.stop();
    throw error;
  }
  console.log(`
  Dewmark is running: http://localhost:${ports.server}
  Invented data. Sign in as operator, engineer, supervisor or administrator; each password is dew-point-at-dawn
  Mail sent by it can be read at http://localhost:${ports.mailPage}
  Ctrl-C stops everything.
`);
});
