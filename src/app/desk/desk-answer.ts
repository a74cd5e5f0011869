import {
  thermometerTolerance,
  standardUncertainty,
  type ThermometerClass,
} from '@shared/inference/instruments';
import type { Inference, InferenceResult } from '@shared/inference/inference';
import {
  bubblePoint,
  dewPoint,
  type At,
  type EquilibriumResult,
  type Mixture,
  type SaturationResult,
} from '@shared/vle/equilibrium';
import { EquilibriumError, type EquilibriumWarning } from '@shared/vle/errors';
import type { Relation } from './desk-case';

/** An answer, or in words why there is none and what to do about it. */
export type Outcome<T> =
  { readonly kind: 'answered'; readonly value: T } | { readonly kind: 'refused'; readonly words: string };

/** What a question that a person may have asked wrongly ends in; bugs still throw. */
export function attempt<T>(ask: () => T): Outcome<T> {
  try {
    return { kind: 'answered', value: ask() };
  } catch (error) {
    if (error instanceof EquilibriumError) return { kind: 'refused', words: error.detail };
    throw error;
  }
}

/**
 * Asks on with what an outcome holds; a refusal stays what it was. (A module that exports a `then` could not be imported on
 * demand: `await` would take it for a promise.)
 */
export function andThen<T, U>(outcome: Outcome<T>, ask: (value: T) => U): Outcome<U> {
  return outcome.kind === 'refused' ? outcome : attempt(() => ask(outcome.value));
}

/** The saturation point a relation speaks of: dew for a top, bubble for a bottom product. */
export function saturationPoint(relation: Relation, mixture: Mixture, at: At): SaturationResult {
  return relation === 'dew' ? dewPoint(mixture, at) : bubblePoint(mixture, at);
}

/** One component's line of the table of phases; null where the phase is not there. Fractions mol/mol, pressure Pa. */
export interface PhaseLine {
  readonly id: string;
  readonly feed: number;
  readonly liquid: number | null;
  readonly vapour: number | null;
  readonly kValue: number | null;
  /** y·P: the component's share of the pressure in the vapour. */
  readonly partialPressure: number | null;
}

export function phaseLines(mixture: Mixture, result: EquilibriumResult): readonly PhaseLine[] {
  return mixture.components.map(({ id, fraction }, i) => {
    const vapour = result.vapour[i]?.fraction ?? null;
    const kValue = result.kValues[i];
    return {
      id,
      feed: fraction,
      liquid: result.liquid[i]?.fraction ?? null,
      vapour,
      kValue: kValue === undefined || Number.isNaN(kValue) ? null : kValue,
      partialPressure: vapour === null ? null : vapour * result.pressure,
    };
  });
}

/** The product that present temperature and pressure speak of, and how far the two instruments let it be known. */
export interface InferredProduct extends InferenceResult {
  /** Standard uncertainty from thermometer and pressure transmitter together [mol/mol]. */
  readonly uncertainty: number;
  /** What each instrument brings into it [mol/mol]. */
  readonly byThermometer: number;
  readonly byPressure: number;
}

/** Limits within which the two instruments read. */
export interface Instruments {
  readonly thermometer: ThermometerClass;
  /** Half the width of the pressure transmitter's tolerance [Pa]. */
  readonly pressureTolerance: number;
}

/**
 * Infers the product and its uncertainty by the instruments: u² = (∂h/∂T·u_T)² + (∂h/∂P·u_P)², each u a tolerance over √3,
 * the two instruments independent of each other.
 *
 * @source GUM (JCGM 100:2008) 5.1.2, 4.3.7
 */
export function inferredProduct(
  inference: Inference,
  temperature: number,
  pressure: number,
  { thermometer, pressureTolerance }: Instruments,
): InferredProduct {
  const result = inference.infer(temperature, pressure);
  const byThermometer = Math.abs(
    result.sensitivity.temperature * standardUncertainty(thermometerTolerance(thermometer, temperature)),
  );
  const byPressure = Math.abs(result.sensitivity.pressure * standardUncertainty(pressureTolerance));
  return { ...result, byThermometer, byPressure, uncertainty: Math.hypot(byThermometer, byPressure) };
}

/** The mixture whose inferred group has the given sum, the others in proportion. */
export function mixtureAt(inference: Inference, groupFraction: number): Mixture {
  const { method, correlations, base } = inference.model;
  const fractions = inference.compositionAt(groupFraction);
  return { method, correlations, components: base.map(({ id }, i) => ({ id, fraction: fractions[i] ?? 0 })) };
}

/** Warnings of several results, each once. */
export function distinctWarnings(
  results: readonly Outcome<{ readonly warnings: readonly EquilibriumWarning[] }>[],
) {
  const all = results.flatMap((outcome) => (outcome.kind === 'answered' ? outcome.value.warnings : []));
  return [...new Map(all.map((warning) => [`${warning.code} ${warning.component}`, warning])).values()];
}
