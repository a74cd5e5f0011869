const minute = 60_000;
const hour = 60 * minute;
const day = 24 * hour;

/** Steps that fall on times people know, shortest first [ms]. */
const steps = [
  ...[1, 2, 5, 10, 15, 30].map((minutes) => minutes * minute),
  ...[1, 2, 3, 4, 6, 12].map((hours) => hours * hour),
  ...[1, 2, 4, 7, 14, 28, 56].map((days) => days * day),
];

/**
 * Moments at which the plant's wall clock shows a round time, oldest first [UTC ms].
 *
 * A chart's own ticks are round in UTC or in the device's zone, and half of them are an hour off in a stretch over which
 * the clocks were changed.
 *
 * @param about how many are wanted; there may be half as many
 * @param zoneOffset the wall clock minus UTC at a moment [ms]
 */
export function plantTicks(
  from: number,
  to: number,
  about: number,
  zoneOffset: (t: number) => number,
): number[] {
  const step = steps.find((candidate) => candidate >= (to - from) / about) ?? steps.at(-1)!;
  const ticks: number[] = [];
  const last = to + zoneOffset(to);
  for (let wall = Math.ceil((from + zoneOffset(from)) / step) * step; wall <= last; wall += step) {
    const t = wall - zoneOffset(wall - zoneOffset(wall));
    // A time the clock was put forward over never was.
    if (t + zoneOffset(t) === wall && t >= from && t <= to) ticks.push(t);
  }
  return ticks;
}
