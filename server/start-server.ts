import { mkdirSync } from 'node:fs';
import { createServer } from 'node:http';
import { join } from 'node:path';
import type { Logger } from 'pino';
import type { PasswordHasher } from './access/password-hasher';
import { openSessionsDatabase } from './access/session-file';
import { keptSessionSecret } from './access/session-secret';
import { createApp } from './app';
import type { Clock } from './clock';
import { dataFiles, type Config } from './config';
import { openDatabase } from './db/database';
import { EventBus } from './events';
import { listen } from './http/listen';
import type { Jobs, Work } from './jobs/schedule';
import { JournalService } from './journal/journal.service';
import { createServices } from './services';
import { Settings } from './site/settings';

export interface ServerDependencies {
  readonly config: Config;
  readonly clock: Clock;
  readonly logger: Logger;
  readonly passwords: PasswordHasher;
  /** Starts the recurring work; tests do it by hand. */
  readonly startJobs: (work: Work, logger: Logger) => Jobs;
}

export interface RunningServer {
  readonly port: number;
  /** Ends everything in order; nothing is cut off half way unless it takes longer than some seconds. */
  stop(): Promise<void>;
}

/** A running cycle gets this long to end at shutdown; killed later it loses nothing either. */
const jobGraceMs = 6000;
const requestGraceMs = 1500;

/**
 * Opens the databases, wires everything and listens.
 *
 * @throws ListenError when the port cannot be had; any error of opening or migrating a database
 */
export async function startServer(deps: ServerDependencies): Promise<RunningServer> {
  const { config, clock, logger, passwords } = deps;
  mkdirSync(config.dataDir, { recursive: true, mode: 0o700 });
  const inDataDir = (name: string) => join(config.dataDir, name);
  const database = await openDatabase(inDataDir(dataFiles.plant));
  const sessionsDatabase = await openSessionsDatabase(inDataDir(dataFiles.sessions));
  const closeDatabases = async () => {
    await sessionsDatabase.close();
    await database.close();
  };

  const events = new EventBus();
  const journal = new JournalService(database);
  const settings = new Settings(database);
  const { barometricPressure } = settings;
  const { collector, routers } = createServices({
    database,
    clock,
    events,
    journal,
    logger,
    barometricPressure,
  });
  const sessionSecret = config.sessionSecret ?? keptSessionSecret(inDataDir(dataFiles.sessionSecret));
  const app = createApp({
    database,
    sessionsDatabase,
    clock,
    events,
    journal,
    passwords,
    logger,
    access: await settings.access(),
    config: { ...config, sessionSecret },
    routers,
    lastCycle: () => collector.lastCycle,
  });

  const server = createServer(app.express);
  let port: number;
  try {
    port = await listen(server, config);
  } catch (error) {
    app.streams.close();
    await closeDatabases();
    throw error;
  }
  logger.info({ host: config.host, port }, 'listening');
  const jobs = deps.startJobs({ collect: () => collector.runCycle(), tidyUp: () => app.tidyUp() }, logger);
  await reportOnRecord(journal, logger);

  return {
    port,
    async stop() {
      const closed = new Promise((resolve) => server.close(resolve));
      await jobs.stop(jobGraceMs);
      await passwords.close();
      app.streams.close();
      server.closeIdleConnections();
      const cutOff = setTimeout(() => server.closeAllConnections(), requestGraceMs);
      await closed;
      clearTimeout(cutOff);
      await closeDatabases();
    },
  };
}

/** A record that somebody tampered with must not go unnoticed, and is no reason to leave the console without figures. */
async function reportOnRecord(journal: JournalService, logger: Logger): Promise<void> {
  const broken = await journal.firstBrokenLine();
  if (broken !== null)
    logger.error(
      { line: broken },
      'the journal was changed from outside: this line does not fit the one before',
    );
}
