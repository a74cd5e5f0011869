import type { SensorParameters } from '../api/sensor-parameters';
import { createInference, type GroupedComponent, type Inference } from '../inference/inference';
import { rebase, shapeScatter } from './base-composition';
import { groupSum, observeOffset, type ObservedReadings } from './observe-offset';
import { stepOffset, type OffsetState, type OffsetStep } from './offset-filter';

/** One laboratory result lined up with a sensor's readings. */
export interface LinedUpSample {
  readonly sampleId: number;
  /** [UTC ms] */
  readonly drawnAt: number;
  /** Mole fractions in the order of the sensor's base, summing to 1. */
  readonly composition: readonly number[];
  readonly readings: ObservedReadings;
  /** What a person has decided, whatever the gate says. */
  readonly verdict?: 'accepted' | 'rejected' | undefined;
}

export interface CorrectionLink extends OffsetStep {
  /** The inferred group's sum in the result [mol/mol]. */
  readonly value: number;
  /** d, in the unit of the correction's domain. */
  readonly observed: number;
  /** Relative error of h from the proportions of the base in force; null while that was the version's own slate. */
  readonly shapeError: number | null;
}

/** What is known of the offset and the slate from the samples used so far; it changes only when a sample is taken. */
export interface Knowledge extends OffsetState {
  readonly base: readonly GroupedComponent[];
  /** Sample whose composition is the base; null for the version's own. */
  readonly baseSampleId: number | null;
  /** When the last used sample was drawn; null before the first. */
  readonly lastUsedAt: number | null;
  /** Scatter of h by the slate's shape, as a share of h. */
  readonly shapeRelative: number;
}

/** Before any sample: the version's own slate, offset and variance. */
export function initialKnowledge(parameters: SensorParameters, since: number): Knowledge {
  return {
    offset: parameters.correction.initialOffset,
    variance: parameters.correction.initialVariance,
    t: since,
    base: parameters.base,
    baseSampleId: null,
    lastUsedAt: null,
    shapeRelative: parameters.noise.shapeRelative,
  };
}

/** A version's equilibrium with another base composition. */
export function inferenceOf(parameters: SensorParameters, base: readonly GroupedComponent[]): Inference {
  const { relation, method, correlations } = parameters;
  return createInference({ relation, method, correlations, base });
}

/**
 * Takes all samples in order of drawing, from the version's beginning: offset, gate, base slate and its scatter end where
 * they would be had every result come in time.
 *
 * @param since when the version began [UTC ms]
 * @returns one link a sample in order of drawing, and what is known after the last
 * @throws EquilibriumError when a result has no saturation point at its pressure
 */
export function correctionChain(
  parameters: SensorParameters,
  since: number,
  samples: readonly LinedUpSample[],
): { links: CorrectionLink[]; knowledge: Knowledge } {
  const inOrder = [...samples].sort((a, b) => a.drawnAt - b.drawnAt || a.sampleId - b.sampleId);
  const shapeErrors: number[] = [];
  let knowledge = initialKnowledge(parameters, since);
  let inForce = inferenceOf(parameters, knowledge.base);
  const links = inOrder.map((sample): CorrectionLink => {
    const base = rebase(knowledge.base, sample.composition);
    const own = inferenceOf(parameters, base);
    const { value, observed, variance } = observeOffset(
      own,
      inForce,
      sample.composition,
      sample.readings,
      parameters,
    );
    const step = stepOffset(
      knowledge,
      { sampleId: sample.sampleId, drawnAt: sample.drawnAt, observed, variance, verdict: sample.verdict },
      parameters.correction,
    );
    const shapeError = knowledge.baseSampleId === null ? null : shapeErrorOf(own, inForce, sample);
    const t = Math.max(knowledge.t, sample.drawnAt);
    if (step.decision === 'used') {
      if (shapeError !== null) shapeErrors.push(shapeError);
      knowledge = {
        offset: step.offset,
        variance: step.variance,
        t,
        base,
        baseSampleId: sample.sampleId,
        lastUsedAt: sample.drawnAt,
        shapeRelative: shapeScatter(shapeErrors, parameters.noise.shapeRelative),
      };
      inForce = own;
    } else knowledge = { ...knowledge, variance: step.variance, t };
    return { ...step, value, observed, shapeError };
  });
  return { links, knowledge };
}

/** What the old proportions would have said at the very temperature of the new result, against the result itself. */
function shapeErrorOf(own: Inference, inForce: Inference, sample: LinedUpSample): number | null {
  const value = groupSum(own, sample.composition);
  if (!(value > 0)) return null;
  const { temperature } = own.equilibriumTemperature(sample.composition, sample.readings.pressure);
  return inForce.infer(temperature, sample.readings.pressure).groupFraction / value - 1;
}
