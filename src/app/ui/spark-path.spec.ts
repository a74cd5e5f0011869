import { sparkMeans, sparkPath, sparkRange } from './spark-path';

describe('the line of a sparkline', () => {
  it('runs from left to right, higher values nearer the top', () => {
    const line = sparkPath([0, 50, 100], [1, 2, 3], { from: 0, to: 100 }, { low: 1, high: 3 });
    expect(line).toEqual({ path: 'M0 100L50 50L100 0', last: { x: 100, y: 0 } });
  });

  it('leaves a gap where there is no value', () => {
    const line = sparkPath(
      [0, 25, 50, 75, 100],
      [1, 1, null, 1, 1],
      { from: 0, to: 100 },
      { low: 0, high: 2 },
    );
    expect(line.path).toBe('M0 50L25 50M75 50L100 50');
  });

  it('draws nothing outside its span', () => {
    expect(sparkPath([-10, 110], [1, 1], { from: 0, to: 100 }, { low: 0, high: 2 })).toEqual({
      path: '',
      last: null,
    });
  });

  it('does not make a storm of noise: the range is at least a quarter of the limit', () => {
    const { low, high } = sparkRange([0.0101, 0.0099], 0.02);
    expect(high - low).toBeCloseTo(0.005, 12);
    expect((high + low) / 2).toBeCloseTo(0.01, 12);
  });

  it('has a range when no value is known or all are zero', () => {
    expect(sparkRange([null], 0.02)).toEqual({ low: 0, high: 1 });
    const { low, high } = sparkRange([0, 0], null);
    expect(high).toBeGreaterThan(low);
  });

  it('shows the mean of a stretch, and leaves a stretch without any value a gap', () => {
    expect(sparkMeans([0, 4, 10, 14, 20, 24], [1, 3, null, null, 5, null], 10)).toEqual({
      t: [2, 12, 22],
      value: [2, null, 5],
    });
  });
});
