/** A value axis whose ticks are round and all wear the same decimals. */
export interface NiceScale {
  readonly min: number;
  readonly max: number;
  readonly interval: number;
  readonly decimals: number;
  /** Whether there was nothing to hold, so that its numbers say nothing. */
  readonly isEmpty: boolean;
}

/**
 * The axis that holds `low` to `high` with about so many steps of 1, 2 or 5 times a power of ten.
 *
 * @param least narrowest span worth drawing: a line that stands still must not be blown up to its last digit
 */
export function niceScale(low: number, high: number, about: number, least = 0): NiceScale {
  if (!(high >= low)) return { min: 0, max: 1, interval: 0.5, decimals: 1, isEmpty: true };
  const middle = (low + high) / 2;
  const span = Math.max(high - low, least, Math.abs(middle) * 1e-6, 1e-9);
  const [bottom, top] = [Math.min(low, middle - span / 2), Math.max(high, middle + span / 2)];
  const rough = span / about;
  const power = 10 ** Math.floor(Math.log10(rough));
  const interval = ([1, 2, 5].find((factor) => factor * power >= rough * (1 - 1e-9)) ?? 10) * power;
  // A whole number of steps, forgiving the last bit of a division.
  const min = Math.floor(bottom / interval + 1e-9) * interval;
  const max = Math.ceil(top / interval - 1e-9) * interval;
  const decimals = Math.max(0, -Math.floor(Math.log10(interval) + 1e-9));
  return { min, max, interval, decimals, isEmpty: false };
}
