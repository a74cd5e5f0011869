import { niceScale } from './nice-scale';

describe('a value axis', () => {
  it.each([
    [0, 2.66, 6, { min: 0, max: 3, interval: 0.5, decimals: 1 }],
    [1563.2, 1598.9, 2, { min: 1560, max: 1600, interval: 20, decimals: 0 }],
    [-0.48, -0.39, 2, { min: -0.5, max: -0.35, interval: 0.05, decimals: 2 }],
  ])(
    'from %d to %d in about %d steps is round and wears one number of decimals',
    (low, high, about, axis) => {
      const scale = niceScale(low, high, about);
      expect(scale.decimals).toBe(axis.decimals);
      for (const key of ['min', 'max', 'interval'] as const) expect(scale[key]).toBeCloseTo(axis[key], 9);
    },
  );

  it('does not blow up a line that stands still', () => {
    const { min, max } = niceScale(0.123, 0.123, 2, 0.1);
    expect(max - min).toBeGreaterThanOrEqual(0.1);
    expect(min).toBeLessThanOrEqual(0.123);
    expect(max).toBeGreaterThanOrEqual(0.123);
  });

  it('is there even when there is nothing to draw', () => {
    expect(niceScale(Infinity, -Infinity, 2)).toMatchObject({ min: 0, max: 1, isEmpty: true });
  });

  it('holds its ends for any pair of numbers', () => {
    for (const low of [-7, -0.003, 0, 1e-6, 12, 323.15])
      for (const span of [1e-7, 0.02, 1, 999]) {
        const { min, max, interval } = niceScale(low, low + span, 5);
        expect(min).toBeLessThanOrEqual(low + 1e-6 * interval);
        expect(max).toBeGreaterThanOrEqual(low + span - 1e-6 * interval);
        expect((max - min) / interval).toBeLessThanOrEqual(7);
      }
  });
});
