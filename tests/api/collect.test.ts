import { expect, it } from 'vitest';
import { QueryTypes } from 'sequelize';
import { day, everythingStored, minute, plantStart, startHistorian, startPlant } from './support/plant';

it('stores one value a tag and one estimate for every minute, in order, without a gap', async () => {
  const plant = await startPlant(2);
  await plant.advance(3 * 60 * minute);
  const { values, estimates } = await everythingStored(plant.database);
  const minutes = (2 * day + 3 * 60 * minute) / minute + 1;
  expect(values).toHaveLength(3 * minutes);
  expect((estimates as { t: number }[]).map(({ t }) => t)).toEqual(
    Array.from({ length: minutes }, (_, i) => plantStart + i * minute),
  );
});

it('catches up after a stop of three days to the very bits of an undisturbed run, and nothing twice', async () => {
  const historian = await startHistorian();
  const undisturbed = await startPlant(2, historian);
  for (let hour = 0; hour < 72; hour++) await undisturbed.advance(60 * minute);
  const stopped = await startPlant(2, historian);
  await stopped.advance(3 * day);
  const caughtUp = await everythingStored(stopped.database);
  expect(caughtUp).toEqual(await everythingStored(undisturbed.database));
  await stopped.collector.runCycle();
  expect(await everythingStored(stopped.database)).toEqual(caughtUp);
});

it('says in words that the historian is lost, writes it down once, and catches up when it is back', async () => {
  const plant = await startPlant(1);
  plant.historian.isDown = true;
  await plant.advance(5 * minute);
  await plant.advance(5 * minute);
  const [source] = await plant.database.models.sources.findAll();
  expect([source!.connected, source!.lastError]).toEqual([false, expect.stringContaining('503')]);
  expect(plant.collector.lastCycle).toMatchObject({ ok: false });
  plant.historian.isDown = false;
  await plant.advance(minute);
  await source!.reload();
  expect([source!.connected, source!.lastError]).toEqual([true, null]);
  const entries = await plant.database.models.journalEntries.findAll({ where: { subjectKind: 'source' } });
  expect(entries.map(({ action }) => action)).toEqual(['source-created', 'source-lost', 'source-back']);
  expect(plant.events.filter((event) => event.type === 'source').map((event) => event.connected)).toEqual([
    false,
    true,
  ]);
  const [row] = await plant.database.sequelize.query<{ n: number }>('SELECT count(*) AS n FROM estimate', {
    type: QueryTypes.SELECT,
  });
  expect(row!.n).toBe((day + 11 * minute) / minute + 1);
});

it('tells the screens of the newest minute, as the database has it', async () => {
  const plant = await startPlant(1);
  await plant.advance(minute);
  const told = plant.events.filter((event) => event.type === 'sensor').at(-1);
  const [stored] = await plant.database.models.estimates.findAll({ order: [['t', 'DESC']], limit: 1 });
  expect(told).toMatchObject({
    sensor: {
      id: 'depropaniser-overhead',
      latest: { t: plant.clock.t, value: stored!.value, low: stored!.low },
    },
  });
});
