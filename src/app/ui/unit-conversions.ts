import type { UnitChoice } from '../core/preferences';

const pascals = { kPa: 1000, bar: 100_000, psi: 6894.757293168361 } as const;

export function temperatureTo(kelvin: number, unit: UnitChoice['temperature']): number {
  const celsius = kelvin - 273.15;
  return unit === '°C' ? celsius : celsius * 1.8 + 32;
}

export function temperatureFrom(shown: number, unit: UnitChoice['temperature']): number {
  return (unit === '°C' ? shown : (shown - 32) / 1.8) + 273.15;
}

export function pascalsIn(unit: UnitChoice['pressure']): number {
  return pascals[unit];
}

export function fractionFactor(unit: UnitChoice['fraction']): number {
  return unit === 'mol %' ? 100 : 1e6;
}
