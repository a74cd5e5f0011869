import type { Sensor } from '@shared/api/sensors';

export type Direction = 'rising' | 'falling' | 'steady';

/**
 * Which way a value is heading; null when there is too little to say.
 *
 * @param slopePerHour change over the last hour [mol/mol per h]
 * @param reference the limit, or the value where there is none [mol/mol]: less than a hundredth of it an hour is steady, or
 *   of what it leaves to 1, since in a purity of 95 % it is the other 5 % that move
 */
export function direction(slopePerHour: number | null, reference: number): Direction | null {
  if (slopePerHour === null) return null;
  if (Math.abs(slopePerHour) < 0.01 * Math.min(reference, 1 - reference)) return 'steady';
  return slopePerHour > 0 ? 'rising' : 'falling';
}

/** `81 % likely above limit`; empty where there is no limit or no value to judge. */
export function chanceWords(sensor: Sensor): string {
  const chance = sensor.offLimitProbability;
  const { high, low } = sensor.limits;
  if (chance === null || (high === null && low === null)) return '';
  const percent = Math.round(chance * 100);
  const amount = chance < 0.01 ? 'under 1 %' : chance > 0.99 ? 'over 99 %' : `${percent} %`;
  const where = high === null ? 'below limit' : low === null ? 'above limit' : 'beyond a limit';
  return `${amount} likely ${where}`;
}
