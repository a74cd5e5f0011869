import { errorFunction } from 'simple-statistics';
import { logDeviationOf, type Band } from './band';

/** Standard normal distribution function. */
function normal(z: number): number {
  return 0.5 * (1 + errorFunction(z / Math.SQRT2));
}

/**
 * Chance that the fraction is beyond a limit now, from the value and its 95 % band (normal in the logarithm the band was
 * made in).
 *
 * @returns 0…1, null without a limit
 */
export function offLimitProbability(
  h: number,
  band: Band,
  limits: { readonly high?: number | null; readonly low?: number | null },
): number | null {
  const { high, low } = limits;
  if (high == null && low == null) return null;
  const isSmall = h <= 0.5;
  const deviation = logDeviationOf(h, band);
  // Distance in deviations, positive where the limit lies above the value.
  const away = (limit: number) => {
    const distance = isSmall ? Math.log(limit / h) : Math.log((1 - h) / (1 - limit));
    return deviation > 0 ? distance / deviation : Math.sign(distance) * Infinity;
  };
  const above = high == null || h <= 0 ? 0 : high >= 1 ? 0 : 1 - normal(away(high));
  const below = low == null || low <= 0 ? 0 : normal(away(low));
  return Math.min(1, above + below);
}
