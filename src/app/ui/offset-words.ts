import type { SensorParameters } from '@shared/api/sensor-parameters';
import { formatNumber } from './numbers';
import type { Quantities } from './quantities';

export type OffsetDomain = SensorParameters['correction']['domain'];

/** How an offset is written: of temperature in the person's unit, else as the fraction or logarithm it is. */
export interface OffsetWords {
  readonly unit: string;
  readonly decimals: number;
  readonly shown: (inDomain: number) => number;
  /** `−0.39 K`, sign and unit included. */
  readonly text: (inDomain: number, decimals?: number) => string;
}

/** @param domain what the offset is added to; temperature where a sensor has no version to say */
export function offsetWords(domain: OffsetDomain | undefined, quantities: Quantities): OffsetWords {
  const isTemperature = (domain ?? 'temperature') === 'temperature';
  const unit = isTemperature
    ? quantities.temperatureChangeUnit()
    : domain === 'fraction'
      ? quantities.fractionUnit()
      : 'of ln fraction';
  const shown = (value: number) =>
    isTemperature
      ? quantities.toTemperatureChange(value)
      : domain === 'fraction'
        ? quantities.toFraction(value)
        : value;
  const usual = isTemperature ? 2 : 4;
  return {
    unit,
    decimals: usual,
    shown,
    text: (value, decimals = usual) => `${formatNumber(shown(value), decimals, true)}\u00a0${unit}`,
  };
}
