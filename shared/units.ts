/** The only conversions between canonical units (K, Pa absolute, mole fraction) and those people read and type. */

export const temperatureUnits = ['°C', '°F'] as const;
export type TemperatureUnit = (typeof temperatureUnits)[number];

export const pressureUnits = ['kPa', 'bar', 'psi'] as const;
export type PressureUnit = (typeof pressureUnits)[number];

export const fractionUnits = ['mol %', 'ppm'] as const;
export type FractionUnit = (typeof fractionUnits)[number];

/** Exact: the pound-force of 4.4482216152605 N over the square inch of 0.0254 m (NIST SP 811, appendix B). */
const pascals: Readonly<Record<PressureUnit, number>> = {
  kPa: 1e3,
  bar: 1e5,
  psi: 4.4482216152605 / 0.0254 ** 2,
};

/** Pascals in one of a pressure unit. A gauge pressure is this many above the site's barometric pressure. */
export function pascalsIn(unit: PressureUnit): number {
  return pascals[unit];
}

export function temperatureTo(kelvin: number, unit: TemperatureUnit): number {
  const celsius = kelvin - 273.15;
  return unit === '°C' ? celsius : celsius * 1.8 + 32;
}

/** @returns K */
export function temperatureFrom(shown: number, unit: TemperatureUnit): number {
  return (unit === '°C' ? shown : (shown - 32) / 1.8) + 273.15;
}

/** Degrees of a unit in one kelvin: differences have no zero to shift. */
export function degreesPerKelvin(unit: TemperatureUnit): number {
  return unit === '°C' ? 1 : 1.8;
}

/** How many of a unit a mole fraction of 1 is; ppm are of moles. */
export function fractionFactor(unit: FractionUnit): number {
  return unit === 'mol %' ? 100 : 1e6;
}
