import { normalised, type Method } from '../vle/equilibrium';
import { EquilibriumError, type EquilibriumWarning } from '../vle/errors';
import { idealInference } from './ideal-inference';
import { pengRobinsonInference } from './peng-robinson-inference';

/** One component of a sensor's slate. Inside a group the proportions of the base composition hold. */
export interface GroupedComponent {
  readonly id: string;
  readonly fraction: number;
  readonly group: 'light' | 'heavy';
}

export interface InferenceModel {
  readonly relation: 'dew' | 'bubble';
  readonly method: Method;
  readonly base: readonly GroupedComponent[];
  /** Component id to vapour pressure row, for `ideal`. */
  readonly correlations?: Readonly<Record<string, string>>;
}

export interface InferenceResult {
  /** Sum of the heavy group for dew, of the light group for bubble [mol/mol], in 0…1. */
  readonly groupFraction: number;
  /** Mole fractions in the order of the base. */
  readonly composition: readonly number[];
  /** ∂h/∂T [1/K], ∂h/∂P [1/Pa] and ∂h/∂z_i of the base, of the value before it was clamped. */
  readonly sensitivity: {
    readonly temperature: number;
    readonly pressure: number;
    readonly base: readonly number[];
  };
  /** Whether temperature and pressure lie outside what this slate can be. */
  readonly clamped: boolean;
  readonly warnings: readonly EquilibriumWarning[];
}

/** A checked model, ready to be asked each minute. The same inputs give the same bits whatever was asked before. */
export interface Inference {
  readonly model: InferenceModel;
  /** @param T temperature at equilibrium [K] @param P absolute pressure there [Pa] @throws EquilibriumError */
  infer(T: number, P: number): InferenceResult;
  /** Mole fractions in the order of the base, for a sum h of the inferred group. */
  compositionAt(h: number): number[];
  /** Dew (bubble) temperature of a composition in the order of the base [K], and dT/dP along the line [K/Pa]. */
  equilibriumTemperature(composition: readonly number[], P: number): { temperature: number; slope: number };
}

/** The groups' proportions, as both methods need them. */
export interface Slate {
  readonly ids: readonly string[];
  /** Share of each component within its own group. */
  readonly share: Float64Array;
  /** Whether a component belongs to the inferred group. */
  readonly inferred: readonly boolean[];
  readonly sums: { readonly inferred: number; readonly other: number };
}

/**
 * Checks a model once and makes it ready.
 * @throws EquilibriumError when the base is no composition or one of its groups is empty
 */
export function createInference(model: InferenceModel): Inference {
  const base = normalised(model.base);
  const target = model.relation === 'dew' ? 'heavy' : 'light';
  const inferred = model.base.map((part) => part.group === target);
  const sumOf = (which: boolean) =>
    base.reduce((sum, part, i) => sum + (inferred[i] === which ? part.fraction : 0), 0);
  const sums = { inferred: sumOf(true), other: sumOf(false) };
  if (!(sums.inferred > 0) || !(sums.other > 0))
    throw new EquilibriumError(
      'not-a-composition',
      'Both groups, light and heavy, need at least one component with a fraction above zero.',
    );
  const slate: Slate = {
    ids: base.map((part) => part.id),
    share: Float64Array.from(base, (part, i) => part.fraction / (inferred[i] ? sums.inferred : sums.other)),
    inferred,
    sums,
  };
  return model.method === 'ideal' ? idealInference(model, slate) : pengRobinsonInference(model, slate);
}

/** Mole fractions at a sum h of the inferred group. */
export function compositionAt(slate: Slate, h: number): number[] {
  return Array.from(slate.share, (share, i) => share * (slate.inferred[i] ? h : 1 - h));
}

export function checkedState(T: number, P: number): void {
  if (!(T > 0) || !(P > 0) || !Number.isFinite(T) || !Number.isFinite(P))
    throw new EquilibriumError(
      'bad-input',
      `Temperature ${T} K and pressure ${P} Pa must both be positive numbers.`,
    );
}
