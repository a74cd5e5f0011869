import { expect, it } from 'vitest';
import { sensorDetail, sensorList, towerList, trend } from '@shared/api/sensors';
import { inferenceOf } from '@shared/correction/correction-chain';
import { day, minute, plantStart, startPlant } from './support/plant';

const id = 'depropaniser-overhead';

it('answers towers and sensors as the contract has them', async () => {
  const plant = await startPlant(2);
  expect(towerList.parse(await plant.sensors.towers())).toEqual([
    expect.objectContaining({ id: 'depropaniser', sensorIds: [id] }),
  ]);
  const [sensor] = sensorList.parse(await plant.sensors.list());
  expect(sensor!.latest!.t).toBe(plant.clock.t);
  expect(sensor!.latest!.value).toBeGreaterThan(sensor!.latest!.low!);
  expect(sensor!.latest!.value).toBeLessThan(sensor!.latest!.high!);
  expect(sensor!.lastUsedSampleAt).not.toBeNull();
  await expect(plant.sensors.byId('nothing')).rejects.toMatchObject({ status: 404 });
});

it('advises the temperature at which the product meets its target, by the equilibrium itself', async () => {
  const plant = await startPlant(2);
  // Move on until the value is Good; no advice is given before.
  for (let i = 0; i < 48 && (await plant.sensors.byId(id)).latest!.quality !== 'Good'; i++)
    await plant.advance(30 * minute);
  const detail = sensorDetail.parse(await plant.sensors.byId(id));
  const { nextMove, latest, version } = detail;
  if (nextMove.kind !== 'move') throw new Error(`expected a move, not ${JSON.stringify(nextMove)}`);
  expect(nextMove.change).toBeCloseTo(nextMove.temperature - latest!.temperature!, 12);
  expect(nextMove.steps).toBe(Math.ceil(Math.abs(nextMove.change) / 0.5));
  const [row] = await plant.database.models.sensors.findAll();
  const { knowledge } = row!.state as { knowledge: { base: never; offset: number } };
  const there = inferenceOf(version!.parameters, knowledge.base).infer(
    nextMove.temperature + knowledge.offset,
    nextMove.pressure,
  );
  expect(there.groupFraction).toBeCloseTo(nextMove.target, 10);
});

it('thins a trend without losing an extreme, and gives columns of equal length', async () => {
  const plant = await startPlant(3);
  const window = { from: plantStart, to: plant.clock.t + 1 };
  const all = trend.parse(await plant.sensors.trend(id, { ...window, points: 20_000 }));
  const thin = trend.parse(await plant.sensors.trend(id, { ...window, points: 200 }));
  const known = (values: readonly (number | null)[]) =>
    values.filter((value): value is number => value !== null);
  expect(all.bucketMinutes).toBe(1);
  expect(all.inferred.t).toHaveLength((3 * day) / minute + 1);
  expect(thin.inferred.t.length).toBeLessThanOrEqual(320);
  for (const line of ['inferred', 'temperature', 'pressure', 'rundown'] as const) {
    expect(Math.max(...known(thin[line].value))).toBe(Math.max(...known(all[line].value)));
    expect(Math.min(...known(thin[line].value))).toBe(Math.min(...known(all[line].value)));
  }
  const { t, ...columns } = thin.inferred;
  for (const column of Object.values(columns)) expect(column).toHaveLength(t.length);
  expect(all.samples.length).toBeGreaterThan(3);
  await expect(plant.sensors.trend(id, { from: 5, to: 5, points: 100 })).rejects.toMatchObject({
    status: 400,
  });
});
