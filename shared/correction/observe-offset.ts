import type { SensorParameters } from '../api/sensor-parameters';
import type { Inference, InferenceResult } from '../inference/inference';
import type { AlignedReadings } from './align-readings';

type Domain = SensorParameters['correction']['domain'];

/** Below it a logarithm says nothing of a real product [mol/mol]. */
export const smallestFraction = 1e-6;

/** Readings a sample was lined up with, as they are kept. */
export interface ObservedReadings {
  /** Means over the window: K, Pa absolute. */
  readonly temperature: number;
  readonly pressure: number;
  /** Variance of the temperature comparison that the readings bring in [K²]. */
  readonly variance: number;
}

export interface ObservedOffset {
  /** The inferred group's sum in the laboratory's result [mol/mol]. */
  readonly value: number;
  /** d, in the unit of the correction's domain: K, ln units or mol/mol. */
  readonly observed: number;
  /** R: variance of the comparison, in that unit squared. */
  readonly variance: number;
}

/**
 * Variance of T̄ as far as the readings go: σ_T² + (∂T/∂P)²σ_P², plus the variance of the pressure-compensated temperature
 * within the window beyond what that noise explains. A sample drawn in a swing weighs little.
 *
 * @param slope dT/dP along the saturation line at the sample's composition [K/Pa]
 */
export function readingsVariance(
  aligned: AlignedReadings,
  slope: number,
  noise: SensorParameters['noise'],
): number {
  const instruments = noise.temperature ** 2 + (slope * noise.pressure) ** 2;
  const seen =
    aligned.temperatureVariance - 2 * slope * aligned.covariance + slope * slope * aligned.pressureVariance;
  return instruments + Math.max(0, seen - instruments);
}

/** Sum of the inferred group in a composition given in the order of the inference's base. */
export function groupSum(inference: Inference, composition: readonly number[]): number {
  const target = inference.model.relation === 'dew' ? 'heavy' : 'light';
  return inference.model.base.reduce(
    (sum, part, i) => sum + (part.group === target ? composition[i]! : 0),
    0,
  );
}

/**
 * Compares one laboratory result with the readings it was lined up with. In the temperature domain
 * d = T_eq(y_lab, P̄) − T̄ and R = σ² of the readings + (∂T/∂h)²σ_lab²; in the others the inferred fraction is compared.
 *
 * @param own inference whose base is the result itself: its sensitivities are those at the sample
 * @param inForce inference with the base in force when the sample was drawn
 * @throws EquilibriumError when the result has no saturation point at P̄
 */
export function observeOffset(
  own: Inference,
  inForce: Inference,
  composition: readonly number[],
  readings: ObservedReadings,
  parameters: SensorParameters,
): ObservedOffset {
  const { noise, correction } = parameters;
  const value = groupSum(own, composition);
  const laboratory = noise.laboratoryAbsolute + noise.laboratoryRelative * value;
  if (correction.domain === 'temperature') {
    const equilibrium = own.equilibriumTemperature(composition, readings.pressure).temperature;
    const byTemperature = own.infer(equilibrium, readings.pressure).sensitivity.temperature;
    return {
      value,
      observed: equilibrium - readings.temperature,
      variance: readings.variance + (laboratory / byTemperature) ** 2,
    };
  }
  const inferred = inForce.infer(readings.temperature, readings.pressure);
  const byReadings = readings.variance * inferred.sensitivity.temperature ** 2;
  if (correction.domain === 'fraction')
    return { value, observed: value - inferred.groupFraction, variance: byReadings + laboratory ** 2 };
  const seen = Math.max(inferred.groupFraction, smallestFraction);
  const known = Math.max(value, smallestFraction);
  return {
    value,
    observed: Math.log(known / seen),
    variance: byReadings / seen ** 2 + (laboratory / known) ** 2,
  };
}

/** The inferred fraction with the offset in force, and ∂h/∂δ. */
export function applyOffset(
  inference: Inference,
  domain: Domain,
  temperature: number,
  pressure: number,
  offset: number,
): { readonly value: number; readonly byOffset: number; readonly result: InferenceResult } {
  if (domain === 'temperature') {
    const result = inference.infer(temperature + offset, pressure);
    return { value: result.groupFraction, byOffset: result.sensitivity.temperature, result };
  }
  const result = inference.infer(temperature, pressure);
  const raw = domain === 'fraction' ? result.groupFraction + offset : result.groupFraction * Math.exp(offset);
  const value = Math.min(1, Math.max(0, raw));
  return { value, byOffset: domain === 'fraction' ? 1 : value, result };
}
