import { health, type Health } from '@shared/api/health';
import { expect, it } from 'vitest';
import { startTestApp, type TestApp } from './support/test-app';

async function withSource(app: TestApp, connected: boolean | null, watermarks: (number | null)[]) {
  const source = await app.database.models.sources.create({
    name: 'North historian',
    kind: 'http',
    settings: {},
    connected,
  });
  for (const [i, watermark] of watermarks.entries())
    await app.database.models.tags.create({
      sourceId: source.id,
      name: `TI-${i}`,
      unit: 'degC',
      quantity: 'temperature',
      watermark,
    });
  return source;
}

const read = (app: TestApp) => app.client().json<Health>('GET', '/api/health');

it('says without signing in that all is well where nothing has been set up yet', async () => {
  const app = await startTestApp();
  const { status, body } = await read(app);
  expect(status).toBe(200);
  expect(health.parse(body)).toEqual({
    status: 'ok',
    now: app.clock.now(),
    database: 'ok',
    sources: [],
    lastCycle: null,
  });
});

it('says how far a source lags by its tag that was read least far', async () => {
  const app = await startTestApp();
  await withSource(app, true, [app.clock.now() - 30_000, app.clock.now() - 90_000, null]);
  expect((await read(app)).body).toMatchObject({
    status: 'ok',
    sources: [{ name: 'North historian', connected: true, lagSeconds: 90 }],
  });
});

it('is degraded while a source is lost, and not while it is paused or has not been asked yet', async () => {
  const app = await startTestApp();
  const source = await withSource(app, false, [null]);
  expect((await read(app)).body).toMatchObject({
    status: 'degraded',
    sources: [{ connected: false, lagSeconds: null }],
  });
  await source.update({ connected: null });
  expect((await read(app)).body.status).toBe('ok');
  await source.update({ connected: false, paused: true });
  expect((await read(app)).body).toMatchObject({ status: 'ok', sources: [] });
});

it('is degraded when the last cycle is long past', async () => {
  const app = await startTestApp();
  await app.services.collector.runCycle();
  expect((await read(app)).body).toMatchObject({
    status: 'ok',
    lastCycle: { endedAt: app.clock.now(), ok: true },
  });
  app.clock.advance(6 * 60_000);
  expect((await read(app)).body.status).toBe('degraded');
});

it('answers 503 when the database cannot be read', async () => {
  const app = await startTestApp();
  await app.database.sequelize.query('DROP TABLE tag_value');
  await app.database.sequelize.query('DROP TABLE tag');
  const { status, body } = await read(app);
  expect(status).toBe(503);
  expect(body).toMatchObject({ status: 'degraded', database: 'failing' });
});
