import { expect, it } from 'vitest';
import { figuresOf, type PredictedSample } from '@shared/replay/figures';
import { minute, startPlant } from './support/plant';

/**
 * The demonstration's six weeks, loaded as they would have come: each stored estimate knew only the results received before
 * its minute, so the sample is compared with what was really said when it was drawn. The one mislabelled bottle was held by
 * the gate and is no product of this tower; it is left out, as a person would.
 */
it(
  'beats holding the last sample by at least 0.4 over six weeks, with about 95 % of the results in their band',
  { timeout: 240_000 },
  async () => {
    const plant = await startPlant(42);
    const { samples, corrections, estimates } = plant.database.models;
    const drawn = await samples.findAll({ where: { state: 'used' }, order: [['drawnAt', 'ASC']] });
    const values = new Map((await corrections.findAll()).map((row) => [row.sampleId, row.value]));
    const predicted: PredictedSample[] = [];
    for (const sample of drawn) {
      const [estimate] = await estimates.findAll({
        where: { t: Math.floor(sample.drawnAt / minute) * minute },
      });
      const known = drawn
        .filter((other) => other.enteredAt <= sample.drawnAt && other.drawnAt < sample.drawnAt)
        .at(-1);
      if (estimate?.rundown == null || !known) continue;
      // The stored band is that of the tower's top; behind the drum it is as wide in proportion.
      const share = estimate.rundown / estimate.value!;
      predicted.push({
        laboratory: values.get(sample.id)!,
        inferred: estimate.rundown,
        low: estimate.low! * share,
        high: estimate.high! * share,
        held: values.get(known.id)!,
      });
    }
    const figures = figuresOf(predicted);
    const percent = (fraction: number) => (100 * fraction).toFixed(3);
    console.log(
      `figure: demo depropaniser, six weeks, one step ahead: skill ${figures.skill.toFixed(3)}, RMSEP ${percent(figures.rmsep)} mol %, holding the last sample ${percent(figures.persistenceRmse)} mol %, bias ${percent(figures.bias)} mol %, coverage ${(100 * figures.coverage).toFixed(1)} %, n ${figures.n}`,
    );
    const held = await samples.count({ where: { state: 'held' } });
    expect(held).toBeLessThanOrEqual(2);
    expect(figures.n).toBeGreaterThan(100);
    expect(figures.skill).toBeGreaterThanOrEqual(0.4);
    expect(figures.coverage).toBeGreaterThanOrEqual(0.9);
    expect(figures.coverage).toBeLessThanOrEqual(0.99);
  },
);
