import { describe, expect, it } from 'vitest';
import { RandomStream } from '../../../../fakes/historian/simulation/random';
import { Wander } from '../../../../fakes/historian/simulation/wander';

const many = 200_000;
const take = (count: number, draw: () => number) => Array.from({ length: count }, draw);
const mean = (values: readonly number[]) => values.reduce((sum, value) => sum + value, 0) / values.length;
const deviation = (values: readonly number[]) => {
  const centre = mean(values);
  return Math.sqrt(mean(values.map((value) => (value - centre) ** 2)));
};

describe('a stream of chance', () => {
  it('repeats itself for the same seed and purpose, and for no other', () => {
    const first = (seed: number, purpose: string) => {
      const stream = new RandomStream(seed, purpose);
      return take(5, () => stream.uniform());
    };
    expect(first(1, 'feed')).toEqual(first(1, 'feed'));
    expect(first(1, 'feed')).not.toEqual(first(2, 'feed'));
    expect(first(1, 'feed')).not.toEqual(first(1, 'weather'));
  });

  it('is uniform in [0, 1)', () => {
    const stream = new RandomStream(1, 'uniform');
    const drawn = take(many, () => stream.uniform());
    expect(drawn.every((value) => value >= 0 && value < 1)).toBe(true);
    // Four standard errors of the mean of a uniform variable, 1/√12/√n each.
    expect(Math.abs(mean(drawn) - 0.5)).toBeLessThan(4 * Math.sqrt(1 / 12 / many));
    const tenths = Array.from(
      { length: 10 },
      (_, i) => drawn.filter((value) => Math.floor(value * 10) === i).length,
    );
    const chiSquare = tenths.reduce((sum, count) => sum + (count - many / 10) ** 2 / (many / 10), 0);
    // 99.9 % point of χ² with 9 degrees of freedom is 27.88 (printed tables, from memory).
    expect(chiSquare).toBeLessThan(27.88);
  });

  it('has normal draws of mean 0, deviation 1 and the share beyond two deviations that the tables give', () => {
    const stream = new RandomStream(1, 'normal');
    const drawn = take(many, () => stream.normal());
    expect(Math.abs(mean(drawn))).toBeLessThan(4 / Math.sqrt(many));
    expect(Math.abs(deviation(drawn) - 1)).toBeLessThan(4 / Math.sqrt(2 * many));
    const beyond = drawn.filter((value) => Math.abs(value) > 2).length / many;
    // 4.55 % (printed tables), give or take four standard errors.
    expect(Math.abs(beyond - 0.0455)).toBeLessThan(4 * Math.sqrt((0.0455 * 0.9545) / many));
  });
});

describe('a wandering quantity', () => {
  it('keeps the deviation it was given and forgets by 1/e in its time', () => {
    const wander = new Wander({ deviation: 3, hours: 0.5 }, new RandomStream(7, 'wander'));
    const path = take(many, () => wander.nextMinute());
    const spread = deviation(path);
    const lag = 30;
    const products = path.slice(lag).map((value, i) => value * path[i]!);
    // Some 200,000/60 independent stretches: 5 % is about four standard errors of a deviation.
    expect(Math.abs(spread / 3 - 1)).toBeLessThan(0.05);
    expect(Math.abs(mean(products) / spread ** 2 - Math.exp(-1))).toBeLessThan(0.07);
  });

  it('jumps as often as it was told', () => {
    // Deviation 0, so that whatever moves it away from nought is a jump, here fading within a minute.
    const wander = new Wander(
      { deviation: 0, hours: 1e-3, jumps: { everyHours: 10, deviation: 1 } },
      new RandomStream(7, 'jumps'),
    );
    const jumps = take(many, () => wander.nextMinute()).filter((value) => Math.abs(value) > 1e-6).length;
    const expected = many / 600;
    expect(Math.abs(jumps - expected)).toBeLessThan(4 * Math.sqrt(expected));
  });
});
