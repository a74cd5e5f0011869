import { bench, describe } from 'vitest';
import { createInference } from '@shared/inference/inference';
import { dewPoint } from '@shared/vle/equilibrium';

/** Six components of a depropaniser's overhead; the budget is 4 times its bare exponentials. */
const base = [
  { id: 'ethane', fraction: 0.015, group: 'light' as const },
  { id: 'propane', fraction: 0.965, group: 'light' as const },
  { id: 'isobutane', fraction: 0.01, group: 'heavy' as const },
  { id: 'n-butane', fraction: 0.008, group: 'heavy' as const },
  { id: 'isopentane', fraction: 0.001, group: 'heavy' as const },
  { id: 'n-pentane', fraction: 0.001, group: 'heavy' as const },
];

let sink = 0;
let step = 0;
/** Moves the temperature a little, so that no call can reuse the one before. */
const wandering = () => 322 + (step = (step + 1) % 1000) * 0.001;

describe('one ideal inference, six components', () => {
  bench('twelve bare exponentials and logarithms', () => {
    const T = wandering();
    for (let i = 0; i < 6; i++) sink += Math.exp(Math.log(T) * 0.1 * i);
  });
  const ideal = createInference({ relation: 'dew', method: 'ideal', base });
  bench('ideal inference', () => {
    sink += ideal.infer(wandering(), 1_720_000).groupFraction;
  });
});

describe('one Peng-Robinson dew point, five components', () => {
  const components = base.slice(0, 5).map(({ id, fraction }) => ({ id, fraction: fraction / 0.999 }));
  bench('ideal dew point', () => {
    sink += dewPoint({ method: 'ideal', components }, { pressure: 1_700_000 + (step++ % 1000) }).temperature;
  });
  bench('Peng-Robinson dew point', () => {
    sink += dewPoint(
      { method: 'peng-robinson', components },
      { pressure: 1_700_000 + (step++ % 1000) },
    ).temperature;
  });
});

if (Number.isNaN(sink)) throw new Error('kept from being optimised away');
