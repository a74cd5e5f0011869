import { mkdtempSync, rmSync } from 'node:fs';
import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { pino } from 'pino';
import { loadDemo } from '../../demo-data/load';
import { tower } from '../../demo-data/skarn-inlet';
import { createHistorianFake } from '../../fakes/historian/historian-fake';
import { InlinePasswordHasher } from '../../server/access/password-hasher';
import { dataFiles, readConfig } from '../../server/config';
import { openDatabase } from '../../server/db/database';
import type { Work } from '../../server/jobs/schedule';
import { startServer } from '../../server/start-server';
import type { PlantAnswer, PlantRequest } from './plant-messages';

/**
 * A whole plant for one browser worker, in a process of its own: historian fake, database with some days of the
 * demonstration, server. Its clock moves only when the test says so, and the collecting job with it.
 */
const minute = 60_000;
const days = 9;

let now = Date.UTC(2026, 10, 20, 15, 7);
const clock = { now: () => now };
const logger = pino({ level: 'error' });
const dataDir = mkdtempSync(join(tmpdir(), 'dewmark-e2e-'));
const tokens = { token: 'e2e-historian', controlToken: 'e2e-control' };

const fake = createHistorianFake({
  seed: 5,
  startAt: now - days * 24 * 60 * minute - 7 * minute,
  now: clock.now,
  ...tokens,
});
const historian = createServer(fake.app).listen(0, '127.0.0.1');
await new Promise((resolve) => historian.once('listening', resolve));
const historianUrl = `http://127.0.0.1:${(historian.address() as AddressInfo).port}`;

const passwords = new InlinePasswordHasher(4);
const database = await openDatabase(join(dataDir, dataFiles.plant));
await loadDemo({ database, passwords, logger, now, seed: 3, historian: { url: historianUrl, ...tokens } });
await database.close();

let work: Work | undefined;
const server = await startServer({
  config: readConfig({
    DEMO: '1',
    PORT: '0',
    DATA_DIR: dataDir,
    CLIENT_DIR: process.argv[2],
    LOG_LEVEL: 'error',
  }),
  clock,
  logger,
  passwords,
  startJobs: (jobs) => {
    work = jobs;
    return { stop: () => Promise.resolve() };
  },
});

/** What the product is at a time, as the laboratory would find it without error [mol/mol by component]. */
async function truthAt(t: number): Promise<Record<string, number>> {
  const at = Math.floor(t / minute) * minute;
  const query = new URLSearchParams({ tower: tower.id, from: String(at), to: String(at + minute) });
  const answer = await fetch(`${historianUrl}/control/truth?${query.toString()}`, {
    headers: { authorization: `Bearer ${tokens.controlToken}` },
  });
  const { rundown } = (await answer.json()) as { rundown: Record<string, number[]> };
  return Object.fromEntries(Object.entries(rundown).map(([id, fractions]) => [id, fractions[0]!]));
}

async function answerTo(request: PlantRequest): Promise<PlantAnswer> {
  switch (request.do) {
    case 'advance':
      for (let i = 0; i < request.minutes; i++) {
        now += minute;
        await work?.collect();
      }
      return { now };
    case 'truth':
      return { now, truth: await truthAt(request.t) };
    case 'stop':
      await server.stop();
      historian.closeAllConnections();
      historian.close();
      rmSync(dataDir, { recursive: true, force: true });
      return { now };
  }
}

process.on('message', (request: PlantRequest) => {
  void answerTo(request).then((answer) => {
    process.send!(answer, () => {
      if (request.do === 'stop') process.exit(0);
    });
  });
});
// A browser worker that died must not leave its plant behind.
process.on('disconnect', () => process.exit(1));
process.send!({ now, url: `http://127.0.0.1:${server.port}` } satisfies PlantAnswer);
