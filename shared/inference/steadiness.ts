/** Filters of the ratio of two variance estimates by which steady state is told. */
export interface SteadinessState {
  /** Filtered value, and the variance around it. */
  readonly filtered: number;
  readonly variance: number;
  /** Filtered square of successive differences. */
  readonly difference: number;
  readonly last: number;
  /** Whether the last verdict was steady. */
  readonly isSteady: boolean;
}

export interface SteadinessParameters {
  /** Filter factors of the value and the two variances. */
  readonly lambda1: number;
  readonly lambda2: number;
  readonly lambda3: number;
  /** Ratio above which a steady tower is called not steady, and below which an unsteady one is called steady again. */
  readonly transientAbove: number;
  readonly steadyBelow: number;
}

/** Filter factors of the 1995 paper. @source cao1995 */
export const usualFilters = { lambda1: 0.2, lambda2: 0.1, lambda3: 0.1 } as const;

export function startSteadiness(x: number): SteadinessState {
  return { filtered: x, variance: 0, difference: 0, last: x, isSteady: true };
}

/**
 * One step of the R-statistic: the variance is filtered with the old filtered value, which is then moved.
 * R = (2 − λ1)·ν²/δ² is about 1 at steady state and grows when the value moves.
 *
 * @returns the new state and R; R is NaN while the value has not moved at all
 * @source cao1995
 */
export function stepSteadiness(
  state: SteadinessState,
  x: number,
  parameters: SteadinessParameters,
): { state: SteadinessState; ratio: number } {
  const { lambda1, lambda2, lambda3 } = parameters;
  const variance = lambda2 * (x - state.filtered) ** 2 + (1 - lambda2) * state.variance;
  const filtered = lambda1 * x + (1 - lambda1) * state.filtered;
  const difference = lambda3 * (x - state.last) ** 2 + (1 - lambda3) * state.difference;
  const ratio = difference === 0 ? NaN : ((2 - lambda1) * variance) / difference;
  const isSteady =
    ratio > parameters.transientAbove ? false : ratio < parameters.steadyBelow ? true : state.isSteady;
  return { state: { filtered, variance, difference, last: x, isSteady }, ratio };
}
