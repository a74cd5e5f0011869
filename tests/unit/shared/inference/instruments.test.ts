import { describe, expect, it } from 'vitest';
import {
  isInClassRange,
  standardUncertainty,
  thermometerTolerance,
  type ThermometerClass,
} from '@shared/inference/instruments';

const kelvin = (celsius: number) => celsius + 273.15;

/** IEC 60751 tolerance tables, °C at 0, 50, 100, 200 and −50 °C; read from secondary sources. */
const published: Record<ThermometerClass, readonly number[]> = {
  AA: [0.1, 0.185, 0.27, 0.44, 0.185],
  A: [0.15, 0.25, 0.35, 0.55, 0.25],
  B: [0.3, 0.55, 0.8, 1.3, 0.55],
  C: [0.6, 1.1, 1.6, 2.6, 1.1],
};
const temperatures = [0, 50, 100, 200, -50];

describe('the tolerance of a thermometer', () => {
  it.each(Object.entries(published))('of class %s is that of IEC 60751', (thermometer, row) => {
    temperatures.forEach((celsius, i) =>
      expect(thermometerTolerance(thermometer as ThermometerClass, kelvin(celsius))).toBeCloseTo(row[i]!, 12),
    );
  });

  it('is defined for class AA up to 250 °C, and for class B beyond', () => {
    expect(isInClassRange('AA', kelvin(250))).toBe(true);
    expect(isInClassRange('AA', kelvin(251))).toBe(false);
    expect(isInClassRange('B', kelvin(251))).toBe(true);
    expect(isInClassRange('AA', kelvin(-51))).toBe(false);
  });
});

describe('the standard uncertainty of a tolerance', () => {
  it('is that of a rectangular distribution: the deviation of evenly spread values', () => {
    const n = 200_001;
    const spread = Array.from({ length: n }, (_, i) => -0.35 + (0.7 * i) / (n - 1));
    const deviation = Math.sqrt(spread.reduce((sum, value) => sum + value * value, 0) / n);
    expect(standardUncertainty(0.35)).toBeCloseTo(deviation, 5);
  });

  it('is 0.2021 K for class A at 100 °C', () => {
    expect(standardUncertainty(thermometerTolerance('A', kelvin(100)))).toBeCloseTo(0.202072594216369, 12);
  });
});
