import { mkdirSync, writeFileSync } from 'node:fs';
import { createServer } from 'node:http';
import { join } from 'node:path';
import { roles, type Role } from '@shared/api/session';
import type { Router } from 'express';
import { pino } from 'pino';
import { onTestFinished } from 'vitest';
import { InlinePasswordHasher } from '../../../server/access/password-hasher';
import { openSessionsDatabase } from '../../../server/access/session-file';
import { createApp } from '../../../server/app';
import { openDatabase } from '../../../server/db/database';
import { EventBus } from '../../../server/events';
import { listen } from '../../../server/http/listen';
import { JournalService } from '../../../server/journal/journal.service';
import { createServices } from '../../../server/services';
import { Settings } from '../../../server/site/settings';
import { Client } from './client';
import { temporaryFolder } from './temporary-folder';
import { TestClock } from './test-clock';

export const testPassword = 'correct horse battery';

/** Low, so that a test need not wait; the real cost has a test of its own. */
const cost = 4;

export interface TestAppOptions {
  readonly routers?: readonly Router[];
  readonly behindTls?: boolean;
}

/** The real application on a free port over fresh database files, with one user a role, named after it. */
export async function startTestApp(options: TestAppOptions = {}) {
  const folder = temporaryFolder();
  const clock = new TestClock();
  const events = new EventBus();
  const log: Record<string, unknown>[] = [];
  const logger = pino(
    { level: 'debug' },
    { write: (line: string) => log.push(JSON.parse(line) as Record<string, unknown>) },
  );
  const database = await openDatabase(join(folder, 'plant.sqlite'));
  const sessionsDatabase = await openSessionsDatabase(join(folder, 'sessions.sqlite'));
  const journal = new JournalService(database);
  const passwords = new InlinePasswordHasher(cost);
  const passwordHash = await passwords.hash(testPassword);
  await database.models.users.bulkCreate(
    roles.map((role) => ({
      username: role,
      name: `The ${role}`,
      role,
      passwordHash,
      createdAt: clock.now(),
    })),
  );
  const settings = new Settings(database);
  const { barometricPressure } = settings;
  const services = createServices({ database, clock, events, journal, logger, barometricPressure });
  const clientDir = join(folder, 'client');
  mkdirSync(clientDir);
  writeFileSync(
    join(clientDir, 'index.html'),
    '<!doctype html><title>Test page</title><app-root ngCspNonce="CSP_NONCE"></app-root>',
  );
  writeFileSync(join(clientDir, 'main-ABCD1234.js'), `console.log('${'x'.repeat(5000)}')`);
  writeFileSync(join(clientDir, 'favicon.svg'), '<svg xmlns="http://www.w3.org/2000/svg"/>');
  const app = createApp({
    database,
    sessionsDatabase,
    clock,
    events,
    journal,
    passwords,
    logger,
    access: await settings.access(),
    config: { sessionSecret: 's'.repeat(32), behindTls: options.behindTls ?? false, clientDir },
    routers: [...services.routers, ...(options.routers ?? [])],
    lastCycle: () => services.collector.lastCycle,
  });
  const server = createServer(app.express);
  const port = await listen(server, { host: '127.0.0.1', port: 0 });
  const url = `http://127.0.0.1:${port}`;
  onTestFinished(async () => {
    app.streams.close();
    server.closeAllConnections();
    await new Promise((resolve) => server.close(resolve));
    await sessionsDatabase.close();
    await database.close();
  });

  return {
    ...app,
    url,
    clock,
    events,
    log,
    database,
    sessionsDatabase,
    journal,
    services,
    client: (headers?: Record<string, string>) => new Client(url, headers),
    /** A client that has signed in as the user of that role. */
    async signedIn(role: Role, headers?: Record<string, string>): Promise<Client> {
      const client = new Client(url, headers);
      const { status } = await client.json('POST', '/api/session', {
        username: role,
        password: testPassword,
      });
      if (status !== 200) throw new Error(`signing in as ${role} answered ${status}`);
      return client;
    },
  };
}

export type TestApp = Awaited<ReturnType<typeof startTestApp>>;
