/** One sample against what was predicted of it before it was used, and against the last sample held. */
export interface PredictedSample {
  /** The laboratory's group fraction [mol/mol]. */
  readonly laboratory: number;
  /** What the sensor said of the moment the sample speaks of, knowing only results received before. */
  readonly inferred: number;
  /** The band it was said with. */
  readonly low: number;
  readonly high: number;
  /** The last result known when this one was drawn. */
  readonly held: number;
}

export interface Figures {
  readonly n: number;
  /** Mean and standard deviation (n − 1) of inferred − laboratory [mol/mol]. */
  readonly bias: number;
  readonly standardDeviation: number;
  /** Root mean square errors: of the sensor, and of holding the last sample, on the same samples. */
  readonly rmsep: number;
  readonly persistenceRmse: number;
  /** 1 − RMSEP/RMSE of holding the last sample: below zero the sensor is worse than no sensor. */
  readonly skill: number;
  readonly meanAbsolute: number;
  /** Share of the results inside the band they were predicted with. */
  readonly coverage: number;
}

/** @throws RangeError with fewer than two samples */
export function figuresOf(samples: readonly PredictedSample[]): Figures {
  const n = samples.length;
  if (n < 2) throw new RangeError(`figures need at least two samples, not ${n}`);
  const errors = samples.map(({ inferred, laboratory }) => inferred - laboratory);
  const bias = mean(errors);
  const rmsep = Math.sqrt(mean(errors.map((error) => error * error)));
  const persistenceRmse = Math.sqrt(mean(samples.map(({ held, laboratory }) => (held - laboratory) ** 2)));
  return {
    n,
    bias,
    standardDeviation: Math.sqrt(errors.reduce((sum, error) => sum + (error - bias) ** 2, 0) / (n - 1)),
    rmsep,
    persistenceRmse,
    skill: 1 - rmsep / persistenceRmse,
    meanAbsolute: mean(errors.map(Math.abs)),
    coverage: mean(
      samples.map(({ laboratory, low, high }) => (laboratory >= low && laboratory <= high ? 1 : 0)),
    ),
  };
}

function mean(values: readonly number[]): number {
  return values.reduce((sum, value) => sum + value, 0) / values.length;
}
