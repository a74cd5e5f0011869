import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { join } from 'node:path';
import { pino } from 'pino';
import { QueryTypes } from 'sequelize';
import { onTestFinished } from 'vitest';
import { loadDemo } from '../../../demo-data/load';
import { createHistorianFake } from '../../../fakes/historian/historian-fake';
import { InlinePasswordHasher } from '../../../server/access/password-hasher';
import { openDatabase, type Database } from '../../../server/db/database';
import { EventBus } from '../../../server/events';
import { JournalService } from '../../../server/journal/journal.service';
import { createServices } from '../../../server/services';
import { Settings } from '../../../server/site/settings';
import type { StreamEvent } from '@shared/api/stream';
import { temporaryFolder } from './temporary-folder';

export const minute = 60_000;
export const day = 24 * 60 * minute;

/** First value of every test plant. */
export const plantStart = Date.UTC(2026, 9, 1);

export const tokens = { token: 'test-historian', controlToken: 'test-control' };

/** The historian fake on a free port, its clock in the test's hand. */
export async function startHistorian() {
  const historian = { now: plantStart, url: '', isDown: false };
  const { app } = createHistorianFake({ seed: 11, startAt: plantStart, now: () => historian.now, ...tokens });
  const server = createServer((req, res) => {
    if (historian.isDown) res.writeHead(503).end('down for a test');
    else app(req, res);
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  historian.url = `http://127.0.0.1:${(server.address() as AddressInfo).port}`;
  onTestFinished(async () => {
    server.closeAllConnections();
    await new Promise((resolve) => server.close(resolve));
  });
  return historian;
}

/** The demonstration's site over a fresh database file, loaded up to `days` after the start; time moves only when told. */
export async function startPlant(days: number, historian?: Awaited<ReturnType<typeof startHistorian>>) {
  const source = historian ?? (await startHistorian());
  const file = join(temporaryFolder(), 'plant.sqlite');
  const database = await openDatabase(file);
  onTestFinished(() => database.close());
  const clock = { t: plantStart + days * day, now: () => clock.t };
  source.now = Math.max(source.now, clock.t);
  const logger = pino({ level: 'silent' });
  await loadDemo({
    database,
    passwords: new InlinePasswordHasher(4),
    logger,
    now: clock.t,
    seed: 2,
    historian: { url: source.url, ...tokens },
  });
  const events: StreamEvent[] = [];
  const bus = new EventBus();
  bus.subscribe((event) => events.push(event));
  const { barometricPressure } = new Settings(database);
  const services = createServices({
    database,
    clock,
    events: bus,
    journal: new JournalService(database),
    logger,
    barometricPressure,
  });
  return {
    ...services,
    database,
    file,
    clock,
    events,
    historian: source,
    /** Lets time pass and collects once at its end. */
    async advance(ms: number) {
      clock.t += ms;
      source.now = Math.max(source.now, clock.t);
      await services.collector.runCycle();
    },
  };
}

/** Every stored value and minute and what the sensors carry, to be compared bit for bit. */
export async function everythingStored(database: Database) {
  const read = (sql: string) => database.sequelize.query(sql, { type: QueryTypes.SELECT, raw: true });
  return {
    values: await read('SELECT * FROM tag_value ORDER BY tag_id, t'),
    estimates: await read('SELECT * FROM estimate ORDER BY sensor_id, t'),
    sensors: await read('SELECT id, state, evaluated_to FROM sensor ORDER BY id'),
    watermarks: await read('SELECT id, watermark FROM tag ORDER BY id'),
  };
}
