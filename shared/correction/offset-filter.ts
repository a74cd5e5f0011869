/**
 * The offset of a sensor as a random walk seen through its samples: a scalar Kalman filter.
 *
 * Between samples the variance grows by q·Δt; a sample takes the share k = p/S of its innovation.
 * @source kalman1960, harvey1989 (local level model)
 */
export interface OffsetParameters {
  /** Variance gained per hour, in the offset's unit squared. */
  readonly driftVariancePerHour: number;
  /** |ν|/√S beyond which a sample is held. */
  readonly gate: number;
  /** A gain of its own instead of k = p/S. */
  readonly fixedGain?: number | undefined;
}

export interface OffsetState {
  readonly offset: number;
  readonly variance: number;
  /** When that variance held [UTC ms]. */
  readonly t: number;
}

/** One sample lined up with the tags of the time it was drawn. */
export interface OffsetObservation {
  readonly sampleId: number;
  /** [UTC ms] */
  readonly drawnAt: number;
  /** d: what the offset would have to be for the sensor to agree with the laboratory. */
  readonly observed: number;
  /** R: variance of that comparison. */
  readonly variance: number;
  /** What a person has decided, whatever the gate says. */
  readonly verdict?: 'accepted' | 'rejected' | undefined;
}

export interface OffsetStep {
  readonly sampleId: number;
  readonly drawnAt: number;
  readonly decision: 'used' | 'held' | 'rejected';
  readonly offsetBefore: number;
  readonly varianceBefore: number;
  /** ν = d − offset before, and its variance S. */
  readonly innovation: number;
  readonly innovationVariance: number;
  /** Share of ν that was taken; 0 where nothing was. */
  readonly gain: number;
  readonly offset: number;
  readonly variance: number;
}

const hour = 3_600_000;

/** Variance of the offset at a later time; a time before the state's own adds nothing. */
export function varianceAt(state: OffsetState, t: number, driftVariancePerHour: number): number {
  return state.variance + (driftVariancePerHour * Math.max(0, t - state.t)) / hour;
}

/** Takes one sample, or holds it where it lies beyond the gate. */
export function stepOffset(
  state: OffsetState,
  sample: OffsetObservation,
  parameters: OffsetParameters,
): OffsetStep {
  const varianceBefore = varianceAt(state, sample.drawnAt, parameters.driftVariancePerHour);
  const innovation = sample.observed - state.offset;
  const innovationVariance = varianceBefore + sample.variance;
  const isBeyondGate = Math.abs(innovation) > parameters.gate * Math.sqrt(innovationVariance);
  const decision =
    sample.verdict === 'rejected'
      ? 'rejected'
      : sample.verdict === 'accepted' || !isBeyondGate
        ? 'used'
        : 'held';
  const gain = decision === 'used' ? (parameters.fixedGain ?? varianceBefore / innovationVariance) : 0;
  // (1−k)²p + k²R holds for any gain, and equals (1−k)p for the filter's own.
  const variance =
    decision !== 'used'
      ? varianceBefore
      : parameters.fixedGain === undefined
        ? (1 - gain) * varianceBefore
        : (1 - gain) ** 2 * varianceBefore + gain ** 2 * sample.variance;
  return {
    sampleId: sample.sampleId,
    drawnAt: sample.drawnAt,
    decision,
    offsetBefore: state.offset,
    varianceBefore,
    innovation,
    innovationVariance,
    gain,
    offset: state.offset + gain * innovation,
    variance,
  };
}

/**
 * Takes all samples in the order they were drawn, whatever the order they came in, so that late and corrected results end
 * where they would have had they come in time.
 *
 * @returns one step a sample, in order of drawing
 */
export function foldOffset(
  prior: OffsetState,
  samples: readonly OffsetObservation[],
  parameters: OffsetParameters,
): OffsetStep[] {
  const inOrder = [...samples].sort((a, b) => a.drawnAt - b.drawnAt || a.sampleId - b.sampleId);
  let state = prior;
  return inOrder.map((sample) => {
    const step = stepOffset(state, sample, parameters);
    state = { offset: step.offset, variance: step.variance, t: Math.max(state.t, sample.drawnAt) };
    return step;
  });
}
