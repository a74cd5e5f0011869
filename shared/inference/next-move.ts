import type { SensorParameters } from '../api/sensor-parameters';
import type { NextMove } from '../api/sensors';
import { EquilibriumError } from '../vle/errors';
import type { Quality } from './quality';
import type { Inference } from './inference';

/** A move smaller than this is not worth making [K]: it is within what the thermometer repeats. */
const smallestMove = 0.05;

export interface MoveQuestion {
  readonly parameters: SensorParameters;
  readonly inference: Inference;
  readonly offset: number;
  readonly quality: Quality;
  /** Readings of this minute: K, Pa absolute at the thermometer. */
  readonly temperature: number | null;
  readonly pressure: number | null;
}

/**
 * Where to bring the temperature reading so that the product meets its target at this pressure:
 * T_eq(y(h_target), P) − δ, in steps no larger than the step limit. Advice; none is given unless quality is Good.
 */
export function nextMove({
  parameters,
  inference,
  offset,
  quality,
  temperature,
  pressure,
}: MoveQuestion): NextMove {
  const { target, temperatureStep } = parameters.limits;
  if (target === undefined) return { kind: 'none', because: 'The sensor has no target.' };
  if (quality !== 'Good' || temperature === null || pressure === null)
    return {
      kind: 'none',
      because: `The inferred value is ${quality}; no advice is given until it is Good.`,
    };
  const wanted = uncorrected(parameters.correction.domain, target, offset);
  if (!(wanted > 0 && wanted < 1))
    return { kind: 'none', because: 'The offset in force puts the target out of reach.' };
  try {
    const { temperature: equilibrium, slope } = inference.equilibriumTemperature(
      inference.compositionAt(wanted),
      pressure,
    );
    const reading = parameters.correction.domain === 'temperature' ? equilibrium - offset : equilibrium;
    const change = reading - temperature;
    if (Math.abs(change) < smallestMove) return { kind: 'on-target', target };
    return {
      kind: 'move',
      temperature: reading,
      change,
      steps: Math.max(1, Math.ceil(Math.abs(change) / temperatureStep - 1e-9)),
      target,
      pressure,
      // Holding the temperature, the saturation line must come down by what the temperature would have gone up.
      pressureInstead: slope > 0 ? -change / slope : null,
    };
  } catch (error) {
    if (!(error instanceof EquilibriumError)) throw error;
    return { kind: 'none', because: error.detail };
  }
}

/** The fraction the equilibrium must give so that the corrected one is the target. */
function uncorrected(
  domain: SensorParameters['correction']['domain'],
  target: number,
  offset: number,
): number {
  if (domain === 'temperature') return target;
  return domain === 'fraction' ? target - offset : target * Math.exp(-offset);
}
