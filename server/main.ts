import { pino } from 'pino';
import { WorkerPasswordHasher } from './access/worker-password-hasher';
import { systemClock } from './clock';
import { ConfigError, readConfig, type Config } from './config';
import { ListenError } from './http/listen';
import { startJobs } from './jobs/schedule';
import { startServer } from './start-server';

/** Whatever is still open by then does not deserve a longer wait; whoever started us kills after ten seconds. */
const longestStopMs = 9000;

function configOrExit(): Config {
  try {
    return readConfig(process.env);
  } catch (error) {
    if (!(error instanceof ConfigError)) throw error;
    console.error(error.message);
    process.exit(1);
  }
}

const config = configOrExit();
const logger = pino({ level: config.logLevel });
try {
  const server = await startServer({
    config,
    clock: systemClock,
    logger,
    passwords: new WorkerPasswordHasher(),
    startJobs,
  });
  let isStopping = false;
  for (const signal of ['SIGINT', 'SIGTERM'] as const)
    process.on(signal, () => {
      if (isStopping) return;
      isStopping = true;
      logger.info({ signal }, 'stopping');
      setTimeout(() => process.exit(1), longestStopMs).unref();
      server.stop().then(
        () => process.exit(0),
        (error: unknown) => {
          logger.error({ err: error }, 'stopping failed');
          process.exit(1);
        },
      );
    });
} catch (error) {
  if (error instanceof ListenError) console.error(error.message);
  else logger.fatal({ err: error }, 'the server cannot start');
  process.exitCode = 1;
}
