/** Readings of one sensor on whole minutes, oldest first; NaN where a minute has no usable reading. */
export interface MinuteReadings {
  /** [UTC ms] */
  readonly t: readonly number[];
  /** [K] */
  readonly temperature: readonly number[];
  /** At the thermometer [Pa absolute]. */
  readonly pressure: readonly number[];
}

export interface Alignment {
  readonly windowMinutes: number;
  readonly deadTimeMinutes: number;
  readonly residenceMinutes: number;
}

export interface AlignedReadings {
  /** Means over the window, behind the residence lag: K, Pa absolute. */
  readonly temperature: number;
  readonly pressure: number;
  /** Variances of the readings within the window: how steady the tower was [K²], [Pa²], and their covariance [K Pa]. */
  readonly temperatureVariance: number;
  readonly pressureVariance: number;
  readonly covariance: number;
  readonly usable: number;
}

const minute = 60_000;

/** Readings needed before the window, so that the lag has forgotten where it started (e⁻⁶ of it is left). */
export function alignmentStart(drawnAt: number, alignment: Alignment): number {
  return (
    alignmentEnd(drawnAt, alignment) - (alignment.windowMinutes + 6 * alignment.residenceMinutes) * minute
  );
}

/** End of the window (exclusive): the moment at the thermometer that the sample speaks of. */
export function alignmentEnd(drawnAt: number, alignment: Alignment): number {
  return drawnAt - alignment.deadTimeMinutes * minute;
}

/**
 * What the sensor read at the time a sample speaks of: a mean over the window before it, dead time earlier, through the
 * first-order lag of the drum the sample was drawn behind.
 *
 * @returns undefined when less than half the window has usable readings
 * @source methods of aligning a sample behind an accumulator are common practice, no source
 */
export function alignReadings(
  readings: MinuteReadings,
  drawnAt: number,
  alignment: Alignment,
): AlignedReadings | undefined {
  const end = alignmentEnd(drawnAt, alignment);
  const start = end - alignment.windowMinutes * minute;
  let lagT = NaN;
  let lagP = NaN;
  let lastT = NaN;
  const laggedT: number[] = [];
  const laggedP: number[] = [];
  const rawT: number[] = [];
  const rawP: number[] = [];
  for (let i = 0; i < readings.t.length; i++) {
    const t = readings.t[i]!;
    const temperature = readings.temperature[i]!;
    const pressure = readings.pressure[i]!;
    if (t > end || Number.isNaN(temperature) || Number.isNaN(pressure)) continue;
    const share =
      alignment.residenceMinutes === 0 || Number.isNaN(lagT)
        ? 1
        : 1 - Math.exp(-(t - lastT) / (alignment.residenceMinutes * minute));
    lagT = share === 1 ? temperature : lagT + share * (temperature - lagT);
    lagP = share === 1 ? pressure : lagP + share * (pressure - lagP);
    lastT = t;
    if (t <= start) continue;
    laggedT.push(lagT);
    laggedP.push(lagP);
    rawT.push(temperature);
    rawP.push(pressure);
  }
  if (laggedT.length < alignment.windowMinutes / 2) return undefined;
  return {
    temperature: mean(laggedT),
    pressure: mean(laggedP),
    temperatureVariance: covariance(rawT, rawT),
    pressureVariance: covariance(rawP, rawP),
    covariance: covariance(rawT, rawP),
    usable: laggedT.length,
  };
}

function mean(values: readonly number[]): number {
  return values.reduce((sum, value) => sum + value, 0) / values.length;
}

/** Sample covariance (n − 1); 0 for a single value. */
function covariance(a: readonly number[], b: readonly number[]): number {
  if (a.length < 2) return 0;
  const meanA = mean(a);
  const meanB = mean(b);
  return a.reduce((sum, value, i) => sum + (value - meanA) * (b[i]! - meanB), 0) / (a.length - 1);
}
