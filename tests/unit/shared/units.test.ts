import { describe, expect, it } from 'vitest';
import {
  degreesPerKelvin,
  fractionFactor,
  pascalsIn,
  pressureUnits,
  temperatureFrom,
  temperatureTo,
  temperatureUnits,
} from '@shared/units';

describe('units', () => {
  // NIST SP 811 (2008), appendix B.8, from memory: psi to Pa 6.894 757 E+03, bar to Pa 1 E+05 exactly.
  it('turns psi into pascals as NIST SP 811 prints it', () => {
    expect(Math.abs(pascalsIn('psi') - 6894.757)).toBeLessThanOrEqual(0.0005);
    expect(pascalsIn('bar')).toBe(100_000);
    expect(pascalsIn('kPa')).toBe(1000);
  });

  it('knows one standard atmosphere as 14.696 psi and 1.013 25 bar', () => {
    expect(Math.abs(101_325 / pascalsIn('psi') - 14.696)).toBeLessThanOrEqual(0.0005);
    expect(101_325 / pascalsIn('bar')).toBeCloseTo(1.01325, 12);
  });

  it.each([
    [273.15, 0, 32],
    [373.15, 100, 212],
    // Where both scales meet.
    [233.15, -40, -40],
    [0, -273.15, -459.67],
  ])('shows %d K as %d °C and %d °F', (kelvin, celsius, fahrenheit) => {
    expect(temperatureTo(kelvin, '°C')).toBeCloseTo(celsius, 10);
    expect(temperatureTo(kelvin, '°F')).toBeCloseTo(fahrenheit, 10);
  });

  it.each(temperatureUnits)(
    'takes back what it showed in %s, and a kelvin is as many degrees as it says',
    (unit) => {
      for (const kelvin of [1, 150.4, 273.15, 326.4, 900]) {
        expect(temperatureFrom(temperatureTo(kelvin, unit), unit)).toBeCloseTo(kelvin, 10);
        expect(temperatureTo(kelvin + 1, unit) - temperatureTo(kelvin, unit)).toBeCloseTo(
          degreesPerKelvin(unit),
          10,
        );
      }
    },
  );

  it('gives every pressure unit a size', () => {
    for (const unit of pressureUnits) expect(pascalsIn(unit)).toBeGreaterThan(0);
  });

  it('counts a mole fraction in hundredths or millionths', () => {
    expect(0.0162 * fractionFactor('mol %')).toBeCloseTo(1.62, 12);
    expect(0.0162 * fractionFactor('ppm')).toBeCloseTo(16_200, 8);
  });
});
