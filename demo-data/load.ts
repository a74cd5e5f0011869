import type { NewSample } from '@shared/api/samples';
import { historianControlPaths, historianState, truth, type Truth } from '@shared/api/historian';
import type { Logger } from 'pino';
import * as z from 'zod';
import type { PasswordHasher } from '../server/access/password-hasher';
import { UsersService } from '../server/access/users.service';
import type { Database } from '../server/db/database';
import { EventBus } from '../server/events';
import { JournalService } from '../server/journal/journal.service';
import { createServices } from '../server/services';
import { Settings } from '../server/site/settings';
import { drawnSamples, type DrawnSample } from './samples';
import { demoPassword, sensor, site, tags, tower, users } from './skarn-inlet';

export interface DemoSettings {
  readonly database: Database;
  readonly passwords: PasswordHasher;
  readonly logger: Logger;
  /** The real present; everything before it is loaded. */
  readonly now: number;
  readonly seed: number;
  readonly historian: { readonly url: string; readonly token: string; readonly controlToken: string };
  /** Called with how far the loading has come, 0…1. */
  readonly progress?: (share: number) => void;
}

const minute = 60_000;

/**
 * Loads the invented site with all its past: values are collected, minutes evaluated and samples entered in the order of
 * time in which they would have come, by the very services that do it live, so that no stored estimate knows a later result.
 *
 * Safe to repeat: a database that has the site already is left as it is.
 * @returns whether anything was loaded
 */
export async function loadDemo(settings: DemoSettings): Promise<boolean> {
  const { database, historian, now } = settings;
  if ((await database.models.towers.count()) > 0) return false;
  const { startAt } = historianState.parse(await askControl(historian, historianControlPaths.state));
  let present = startAt;
  const clock = { now: () => present };
  const events = new EventBus();
  const journal = new JournalService(database);
  const { barometricPressure } = new Settings(database);
  const services = createServices({
    database,
    clock,
    events,
    journal,
    logger: settings.logger,
    barometricPressure,
  });

  const laboratory = await createSite(settings, journal, startAt);
  const past = await drawSamples(historian, startAt, now, settings.seed);
  for (const { receivedAt, ...result } of past) {
    present = receivedAt;
    await services.collector.runCycle();
    await services.intake.record({ ...result, receivedAt }, laboratory);
    settings.progress?.((receivedAt - startAt) / (now - startAt));
  }
  present = now;
  await services.collector.runCycle();
  const { lastCycle } = services.collector;
  if (!lastCycle?.ok)
    throw new Error('The historian fake did not answer while the demonstration was loaded.');
  await database.write((transaction) =>
    journal.record(transaction, {
      t: now,
      userId: null,
      action: 'demonstration-loaded',
      subject: { kind: 'site', id: 'site', name: site.name },
      changes: [],
      reason: `${past.length} samples and all readings since ${new Date(startAt).toISOString()}; all of it is invented.`,
    }),
  );
  settings.progress?.(1);
  return true;
}

/** Users, source, tags, tower and sensor; answers the user in whose name past samples are entered. */
async function createSite(
  { database, passwords, historian }: DemoSettings,
  journal: JournalService,
  startAt: number,
) {
  const people = new UsersService(database, journal, passwords);
  // Hashed before the transaction: it takes half a second, and the same password serves all four.
  const passwordHash = await passwords.hash(demoPassword);
  return database.write(async (transaction) => {
    const { settings, sources, tags: tagRows, towers, sensors, sensorVersions } = database.models;
    await settings.upsert({ key: 'site', value: { ...site } }, { transaction });
    const created = [];
    for (const user of users)
      created.push(
        await people.create(
          transaction,
          { ...user, passwordHash },
          { t: startAt, byUserId: null, reason: 'Demonstration user.' },
        ),
      );
    const engineer = created.find((user) => user.role === 'engineer')!;
    const source = await sources.create(
      {
        name: 'Plant historian',
        kind: 'http',
        settings: { kind: 'http', url: historian.url, token: historian.token },
      },
      { transaction },
    );
    await tagRows.bulkCreate(
      tags.map((tag) => ({ ...tag, sourceId: source.id, watermark: startAt })),
      { transaction },
    );
    await towers.create({ ...tower, ordinal: 0 }, { transaction });
    const { parameters, ...named } = sensor;
    await sensors.create({ ...named, towerId: tower.id, ordinal: 0, evaluatedTo: startAt }, { transaction });
    const version = await sensorVersions.create(
      {
        sensorId: sensor.id,
        number: 1,
        state: 'live',
        parameters,
        reason: 'First set-up.',
        createdBy: engineer.id,
        createdAt: startAt,
        madeLiveAt: startAt,
      },
      { transaction },
    );
    await sensors.update({ liveVersionId: version.id }, { where: { id: sensor.id }, transaction });
    const record = (
      action: 'source-created' | 'tower-created' | 'sensor-created' | 'version-made-live',
      subject: { kind: 'source' | 'tower' | 'sensor'; id: string; name: string },
    ) =>
      journal.record(transaction, {
        t: startAt,
        userId: engineer.id,
        action,
        subject,
        changes: [],
        reason: 'First set-up of the demonstration.',
      });
    await record('source-created', { kind: 'source', id: String(source.id), name: 'Plant historian' });
    await record('tower-created', { kind: 'tower', id: tower.id, name: tower.name });
    await record('sensor-created', { kind: 'sensor', id: sensor.id, name: sensor.name });
    await record('version-made-live', { kind: 'sensor', id: sensor.id, name: `${sensor.name}, version 1` });
    return engineer;
  });
}

/** The laboratory's past results, in the order they were received. */
async function drawSamples(
  historian: DemoSettings['historian'],
  startAt: number,
  now: number,
  seed: number,
): Promise<NewSample[]> {
  const drawn = drawnSamples(startAt, now, seed);
  const results: NewSample[] = [];
  for (const sample of drawn) results.push(sample.analyse(await truthAt(historian, sample)));
  return results.sort((a, b) => a.receivedAt - b.receivedAt);
}

/** What the product really was, where and when a sample was drawn. */
async function truthAt(
  historian: DemoSettings['historian'],
  sample: DrawnSample,
): Promise<Record<string, number>> {
  const at = Math.floor((sample.drawnAt - sample.deadTimeMinutes * minute) / minute) * minute;
  const query = new URLSearchParams({ tower: tower.id, from: String(at), to: String(at + minute) });
  const answer: Truth = truth.parse(
    await askControl(historian, `${historianControlPaths.truth}?${query.toString()}`),
  );
  return Object.fromEntries(Object.entries(answer.rundown).map(([id, fractions]) => [id, fractions[0]!]));
}

async function askControl(historian: DemoSettings['historian'], path: string): Promise<unknown> {
  const answer = await fetch(new URL(path, historian.url), {
    headers: { authorization: `Bearer ${historian.controlToken}` },
  });
  if (!answer.ok)
    throw new Error(`The historian fake answered ${answer.status} at ${path}: ${await answer.text()}`);
  return z.unknown().parse(await answer.json());
}
