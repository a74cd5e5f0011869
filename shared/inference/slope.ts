import { linearRegression } from 'simple-statistics';

const hour = 3_600_000;

/** Fewer minutes than this say nothing of a direction. */
const leastPoints = 20;

/**
 * Change of a value per hour: the slope of the least-squares line.
 *
 * @param t UTC milliseconds; minutes without a value are left out
 * @returns null when there are fewer than twenty values
 */
export function slopePerHour(t: readonly number[], value: readonly (number | null)[]): number | null {
  const last = t.at(-1) ?? 0;
  const points = t.flatMap((time, i): [number, number][] =>
    value[i] == null ? [] : [[(time - last) / hour, value[i]]],
  );
  return points.length < leastPoints ? null : linearRegression(points).m;
}
