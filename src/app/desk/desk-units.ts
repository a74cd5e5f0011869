import { pascalsIn, temperatureFrom, temperatureTo } from '@shared/units';
import type { UnitChoice } from '../core/preferences';

/** One unit a quantity can be typed in; canonical is K or Pa absolute. */
export interface TypedUnit {
  /** As it stands beside the field; also what it is told apart by. */
  readonly label: string;
  readonly toShown: (canonical: number) => number;
  readonly fromShown: (shown: number) => number;
  /** One step of the slider, in this unit. */
  readonly step: number;
  readonly decimals: number;
}

const kelvin: TypedUnit = {
  label: 'K',
  toShown: (value) => value,
  fromShown: (shown) => shown,
  step: 0.1,
  decimals: 2,
};

const degrees = (unit: UnitChoice['temperature']): TypedUnit => ({
  label: unit,
  toShown: (value) => temperatureTo(value, unit),
  fromShown: (shown) => temperatureFrom(shown, unit),
  step: 0.1,
  decimals: 2,
});

export const temperatureUnits: readonly [TypedUnit, ...TypedUnit[]] = [degrees('°C'), degrees('°F'), kelvin];

const pressureScales = [
  { name: 'kPa', pascals: pascalsIn('kPa'), step: 1, decimals: 1 },
  { name: 'bar', pascals: pascalsIn('bar'), step: 0.01, decimals: 3 },
  { name: 'psi', pascals: pascalsIn('psi'), step: 0.1, decimals: 2 },
  { name: 'MPa', pascals: 1e6, step: 0.001, decimals: 4 },
] as const;

/**
 * Each pressure unit, counted from zero and from the air.
 *
 * @param barometricPressure of the site [Pa]
 */
export function pressureUnits(barometricPressure: number): readonly [TypedUnit, ...TypedUnit[]] {
  const counted = (reference: 'abs' | 'gauge') => {
    const datum = reference === 'gauge' ? barometricPressure : 0;
    return pressureScales.map(({ name, pascals, step, decimals }): TypedUnit => ({
      label: `${name} ${reference}`,
      toShown: (value) => (value - datum) / pascals,
      fromShown: (shown) => shown * pascals + datum,
      step,
      decimals,
    }));
  };
  return [...counted('abs'), ...counted('gauge')] as [TypedUnit, ...TypedUnit[]];
}

/** Units of a difference of pressures, which counts from nothing. */
export const pressureChangeUnits = pressureScales.map(({ name, pascals, step, decimals }): TypedUnit => ({
  label: name,
  toShown: (value) => value / pascals,
  fromShown: (shown) => shown * pascals,
  step,
  decimals: decimals + 1,
})) as [TypedUnit, ...TypedUnit[]];

/** The unit of this label, else the first. */
export function unitLabelled(label: string, units: readonly [TypedUnit, ...TypedUnit[]]): TypedUnit {
  return units.find((unit) => unit.label === label) ?? units[0];
}

/** Ends of a slider around a value; wide enough to explore, fine enough for a step to be felt. */
export interface Span {
  readonly low: number;
  readonly high: number;
}

export function temperatureSpan(temperature: number): Span {
  return { low: Math.max(1, temperature - 15), high: temperature + 15 };
}

export function pressureSpan(pressure: number): Span {
  return { low: 0.75 * pressure, high: 1.25 * pressure };
}

/** The span, put around the value anew when that has come near an end or left it. */
export function spanFor(value: number, span: Span, around: (value: number) => Span): Span {
  const margin = 0.1 * (span.high - span.low);
  return value < span.low + margin || value > span.high - margin ? around(value) : span;
}
