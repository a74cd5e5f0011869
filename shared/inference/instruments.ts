/** Tolerance classes of industrial platinum resistance thermometers, best first. */
export const thermometerClasses = ['AA', 'A', 'B', 'C'] as const;
export type ThermometerClass = (typeof thermometerClasses)[number];

interface ClassTolerance {
  /** Tolerance at 0 °C [K]. */
  readonly constant: number;
  /** What each °C away from 0 °C adds [K/K]. */
  readonly slope: number;
  /** Temperatures a wire-wound element of the class is made for [°C], ends included; from memory. */
  readonly range: readonly [number, number];
}

const tolerances: Readonly<Record<ThermometerClass, ClassTolerance>> = {
  AA: { constant: 0.1, slope: 0.0017, range: [-50, 250] },
  A: { constant: 0.15, slope: 0.002, range: [-100, 450] },
  B: { constant: 0.3, slope: 0.005, range: [-196, 600] },
  C: { constant: 0.6, slope: 0.01, range: [-196, 600] },
};

const celsius = (temperature: number) => temperature - 273.15;

/**
 * How far a thermometer of a class may read off: ±(constant + slope·|t|), t in °C. The element alone: well, cable and input
 * card add to it.
 *
 * @param temperature [K]
 * @returns half the width of the tolerance [K]
 * @source IEC 60751, tolerance classes; read from secondary sources
 */
export function thermometerTolerance(thermometer: ThermometerClass, temperature: number): number {
  const { constant, slope } = tolerances[thermometer];
  return constant + slope * Math.abs(celsius(temperature));
}

/** Whether the class is defined at this temperature [K] (for wire-wound elements). */
export function isInClassRange(thermometer: ThermometerClass, temperature: number): boolean {
  const [low, high] = tolerances[thermometer].range;
  return celsius(temperature) >= low && celsius(temperature) <= high;
}

/**
 * Standard uncertainty of a quantity of which only its limits ±a are known: any value between them is as likely as any
 * other, hence a/√3.
 *
 * @source GUM (JCGM 100:2008) 4.3.7
 */
export function standardUncertainty(tolerance: number): number {
  return tolerance / Math.sqrt(3);
}
