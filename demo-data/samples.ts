import type { NewSample } from '@shared/api/samples';
import { tower } from './skarn-inlet';

/** One sample the invented laboratory draws. */
export interface DrawnSample {
  /** [UTC ms] */
  readonly drawnAt: number;
  /** How long the product takes from the reflux drum to the tap. */
  readonly deadTimeMinutes: number;
  /** The laboratory's result, from what the product really was (mole fraction by component). */
  analyse(truth: Readonly<Record<string, number>>): NewSample;
}

const minute = 60_000;
const hour = 60 * minute;

/** What the invented laboratory's chromatograph scatters: a share of each component, and a floor [mol/mol]. */
const relativeScatter = 0.02;
const absoluteScatter = 0.00005;

/** Minutes from the drum to the tap. */
const deadTimeMinutes = 3;

/** The one sample whose bottle bore another tower's label, and the one whose result came two days late (counted from the newest). */
const mislabelled = 9;
const late = 20;

/**
 * Samples about three a day, from the start until a few hours before now, with results one to three hours later.
 *
 * @param seed gives the same samples for the same start
 */
export function drawnSamples(startAt: number, now: number, seed: number): DrawnSample[] {
  const random = seededRandom(seed);
  const times: number[] = [];
  // The laboratory rounds by the clock: 06:00, 14:00 and 22:00 at the site (four hours behind UTC), a little scattered.
  for (let t = Math.ceil(startAt / (8 * hour)) * 8 * hour + 2 * hour; t < now - 4 * hour; t += 8 * hour)
    if (t > startAt + 6 * hour) times.push(Math.round((t + 25 * minute * normal(random)) / minute) * minute);
  return times.map((drawnAt, i) => {
    const fromNewest = times.length - i;
    const delay = fromNewest === late ? 50 * hour : Math.round(60 + 110 * random()) * minute;
    const scatter = Array.from({ length: 12 }, () => normal(random));
    return {
      drawnAt,
      deadTimeMinutes,
      analyse: (truth) => ({
        towerId: tower.id,
        point: 'overhead',
        drawnAt,
        receivedAt: drawnAt + delay,
        fractions: analysed(fromNewest === mislabelled ? anotherTower : truth, scatter),
        remark: fromNewest === late ? 'Result mislaid, found and entered late.' : '',
      }),
    };
  });
}

/** What was in the mislabelled bottle. */
const anotherTower = {
  ethane: 0.002,
  propane: 0.905,
  isobutane: 0.052,
  'n-butane': 0.041,
  isopentane: 0,
  'n-pentane': 0,
};

/** A result as the laboratory states it: scattered, rounded to a thousandth of a per cent, summing to about 100 %. */
function analysed(
  truth: Readonly<Record<string, number>>,
  scatter: readonly number[],
): NewSample['fractions'] {
  const raw = Object.entries(truth).map(([id, fraction], i) => ({
    id,
    fraction: Math.max(0, fraction * (1 + relativeScatter * scatter[i]!) + absoluteScatter * scatter[i + 6]!),
  }));
  const sum = raw.reduce((total, { fraction }) => total + fraction, 0);
  return raw.map(({ id, fraction }) => ({ id, fraction: Math.round((fraction / sum) * 1e5) / 1e5 }));
}

function normal(random: () => number): number {
  return Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random());
}

/** mulberry32: a small seeded generator, uniform in [0, 1). */
function seededRandom(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let mixed = Math.imul(state ^ (state >>> 15), 1 | state);
    mixed = (mixed + Math.imul(mixed ^ (mixed >>> 7), 61 | mixed)) ^ mixed;
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4294967296;
  };
}
