interface Point {
  readonly x: number;
  readonly y: number;
}

/**
 * Means over stretches of time: what is drawn small shows where a value went, not each minute's noise. A stretch without any
 * value stays a gap.
 *
 * @param stretchMs length of a stretch; each mean stands at the middle of its readings
 */
export function sparkMeans(
  t: readonly number[],
  values: readonly (number | null)[],
  stretchMs: number,
): { t: number[]; value: (number | null)[] } {
  const stretches = new Map<number, { t: number[]; values: number[] }>();
  t.forEach((time, index) => {
    const key = Math.floor(time / stretchMs);
    const stretch = stretches.get(key) ?? { t: [], values: [] };
    stretches.set(key, stretch);
    stretch.t.push(time);
    const value = values[index] ?? null;
    if (value !== null) stretch.values.push(value);
  });
  const means = [...stretches.values()];
  return {
    t: means.map((stretch) => mean(stretch.t)),
    value: means.map((stretch) => (stretch.values.length > 0 ? mean(stretch.values) : null)),
  };
}

/**
 * Lowest and highest value a sparkline shows. Never less than a quarter of the limit apart, or a tenth of the value where
 * there is none: noise is not to look like a storm.
 */
export function sparkRange(
  values: readonly (number | null)[],
  limit: number | null,
): { low: number; high: number } {
  const known = values.filter((value) => value !== null);
  if (known.length === 0) return { low: 0, high: 1 };
  const [lowest, highest] = [Math.min(...known), Math.max(...known)];
  const least = (limit === null ? 0.1 * Math.abs(highest) : 0.25 * Math.abs(limit)) || 1;
  const missing = Math.max(0, least - (highest - lowest)) / 2;
  return { low: lowest - missing, high: highest + missing };
}

/** The line in a square of 100 by 100, with gaps where there is no value, and its last point. */
export function sparkPath(
  t: readonly number[],
  values: readonly (number | null)[],
  span: { from: number; to: number },
  range: { low: number; high: number },
): { path: string; last: Point | null } {
  let path = '';
  let last: Point | null = null;
  let isDrawing = false;
  t.forEach((time, index) => {
    const value = values[index] ?? null;
    if (value === null || time < span.from || time > span.to) {
      isDrawing = false;
      return;
    }
    last = {
      x: rounded((100 * (time - span.from)) / (span.to - span.from)),
      y: rounded((100 * (range.high - value)) / (range.high - range.low)),
    };
    path += `${isDrawing ? 'L' : 'M'}${last.x} ${last.y}`;
    isDrawing = true;
  });
  return { path, last };
}

function rounded(place: number): number {
  return Math.round(place * 10) / 10;
}

function mean(values: readonly number[]): number {
  return values.reduce((sum, value) => sum + value, 0) / values.length;
}
