import type { SensorParameters } from '../api/sensor-parameters';
import { applyOffset, smallestFraction } from '../correction/observe-offset';
import type { Knowledge } from '../correction/correction-chain';
import { varianceAt } from '../correction/offset-filter';
import { bandOf, standardUncertainty } from '../inference/band';
import type { Inference } from '../inference/inference';
import { judgeReading, noMemory, type Reading, type TagMemory } from '../inference/judge-readings';
import { qualityOf, type QualityReason } from '../inference/quality';
import { startSteadiness, stepSteadiness, usualFilters, type SteadinessState } from '../inference/steadiness';
import { EquilibriumError } from '../vle/errors';
import { stepRundown, type RundownState } from './rundown';

/** Carried from one minute to the next; plain data, so that it survives JSON with all its bits. */
export interface MinuteState {
  readonly temperature: TagMemory;
  readonly pressure: TagMemory;
  readonly rundown: RundownState;
  readonly steadiness: SteadinessState | null;
}

export const firstMinuteState: MinuteState = {
  temperature: noMemory,
  pressure: noMemory,
  rundown: { lagged: null, t: null, waiting: [] },
  steadiness: null,
};

export interface MinuteInput {
  /** Whole minute [UTC ms]. */
  readonly t: number;
  /** Temperature [K], pressure as the tag gives it [Pa], differential pressure [Pa]; null where there is no value yet. */
  readonly temperature: Reading | null;
  readonly pressure: Reading | null;
  readonly differentialPressure: Reading | null;
}

/** A version made ready: its parameters, its equilibrium with the base in force, and what turns its pressure absolute. */
export interface PreparedSensor {
  readonly parameters: SensorParameters;
  readonly inference: Inference;
  /** Added to the pressure reading to make it absolute [Pa]: the barometric pressure for a gauge reading, else 0. */
  readonly pressureDatum: number;
}

/** One minute's answer; fractions in mol/mol, null where no number may be shown. */
export interface MinuteEstimate {
  readonly t: number;
  /** Readings used: K, Pa absolute at the thermometer. */
  readonly temperature: number | null;
  readonly pressure: number | null;
  readonly value: number | null;
  readonly low: number | null;
  readonly high: number | null;
  readonly rundown: number | null;
  readonly offset: number;
  readonly offsetVariance: number;
  readonly sigmaShape: number | null;
  readonly baseSampleId: number | null;
  readonly quality: 'Good' | 'Uncertain' | 'Bad';
  readonly reasons: readonly QualityReason[];
}

const minute = 60_000;
const hour = 60 * minute;

/** Steadiness is looked at each so many minutes: noise from minute to minute is correlated and would inflate the ratio. */
const steadinessMinutes = 5;

/**
 * Evaluates one minute of one sensor: the step that the live job and every replay take.
 *
 * Pure: the same arguments give the same bits. Minutes are to be given in order, each once.
 */
export function evaluateMinute(
  sensor: PreparedSensor,
  knowledge: Knowledge,
  before: MinuteState,
  input: MinuteInput,
): { estimate: MinuteEstimate; state: MinuteState } {
  const { parameters } = sensor;
  const { t } = input;
  const temperature = judgeReading(
    'temperature',
    input.temperature,
    before.temperature,
    t,
    parameters.validity,
  );
  const absolute =
    input.pressure?.value == null
      ? input.pressure
      : {
          ...input.pressure,
          value: input.pressure.value + sensor.pressureDatum + parameters.pressureCorrection,
        };
  const pressure = judgeReading('pressure', absolute, before.pressure, t, parameters.validity);
  const reasons: QualityReason[] = [...temperature.reasons, ...pressure.reasons];
  const offsetVariance = varianceAt(knowledge, t, parameters.correction.driftVariancePerHour);

  let steadiness = before.steadiness;
  let inferred: Inferred | undefined;
  if (temperature.value !== null && pressure.value !== null) {
    inferred = inferMinute(sensor, knowledge, offsetVariance, temperature.value, pressure.value, reasons);
    const thresholds = parameters.validity.steadiness;
    if (inferred && thresholds && t % (steadinessMinutes * minute) === 0) {
      const compensated =
        temperature.value - inferred.slope * (pressure.value - middle(parameters.validity.pressure));
      steadiness = steadiness
        ? stepSteadiness(steadiness, compensated, { ...usualFilters, ...thresholds }).state
        : startSteadiness(compensated);
    }
  }
  if (steadiness && !steadiness.isSteady) reasons.push('not-steady');
  if (isEntrained(input.differentialPressure, t, parameters)) reasons.push('entrainment-suspected');
  if (knowledge.lastUsedAt === null) reasons.push('no-sample-yet');
  else if (t - knowledge.lastUsedAt > parameters.validity.sampleAgeHours * hour)
    reasons.push('sample-too-old');

  const quality = qualityOf(reasons);
  const value = quality === 'Bad' || !inferred ? null : inferred.value;
  const rundown = stepRundown(before.rundown, t, value, parameters.alignment);
  return {
    estimate: {
      t,
      temperature: temperature.value,
      pressure: pressure.value,
      value,
      low: value === null ? null : inferred!.low,
      high: value === null ? null : inferred!.high,
      rundown: value === null ? null : rundown.value,
      offset: knowledge.offset,
      offsetVariance,
      sigmaShape: value === null ? null : value * knowledge.shapeRelative,
      baseSampleId: knowledge.baseSampleId,
      quality,
      reasons,
    },
    state: { temperature: temperature.memory, pressure: pressure.memory, rundown: rundown.state, steadiness },
  };
}

interface Inferred {
  readonly value: number;
  readonly low: number;
  readonly high: number;
  /** dT/dP at constant composition [K/Pa]. */
  readonly slope: number;
}

function inferMinute(
  sensor: PreparedSensor,
  knowledge: Knowledge,
  offsetVariance: number,
  temperature: number,
  pressure: number,
  reasons: QualityReason[],
): Inferred | undefined {
  const { parameters, inference } = sensor;
  try {
    const { value, byOffset, result } = applyOffset(
      inference,
      parameters.correction.domain,
      temperature,
      pressure,
      knowledge.offset,
    );
    const { sensitivity } = result;
    if (result.clamped) reasons.push('clamped');
    const { acceptedExtrapolations } = parameters.validity;
    if (result.warnings.some((warning) => !acceptedExtrapolations.includes(warning.component)))
      reasons.push('correlation-out-of-range');
    const deviation = standardUncertainty(value, {
      byTemperature: sensitivity.temperature,
      byPressure: sensitivity.pressure,
      byOffset,
      offsetVariance,
      temperature: parameters.noise.temperature,
      pressure: parameters.noise.pressure,
      shapeRelative: knowledge.shapeRelative,
    });
    return {
      value,
      ...bandOf(Math.max(value, smallestFraction), deviation),
      slope: -sensitivity.pressure / sensitivity.temperature,
    };
  } catch (error) {
    // Temperature and pressure without a saturation point: an answer of the plant, not a fault of the program.
    if (!(error instanceof EquilibriumError)) throw error;
    reasons.push('solver-failed');
    return undefined;
  }
}

function isEntrained(reading: Reading | null, t: number, { validity }: SensorParameters): boolean {
  if (validity.differentialPressureLimit === undefined || reading?.value == null) return false;
  return (
    t - reading.t <= validity.staleMinutes * minute &&
    reading.status >>> 30 === 0 &&
    reading.value > validity.differentialPressureLimit
  );
}

function middle([low, high]: readonly [number, number]): number {
  return (low + high) / 2;
}
