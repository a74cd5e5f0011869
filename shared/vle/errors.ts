/** What can be wrong with an equilibrium question; each is answered with a sentence that says what to do. */
export type EquilibriumErrorCode =
  | 'unknown-component'
  | 'unknown-correlation'
  | 'not-a-composition'
  | 'bad-input'
  | 'no-two-phase-solution'
  | 'not-converged';

/** An equilibrium question without an answer. `detail` is meant for the person who asked. */
export class EquilibriumError extends Error {
  override readonly name = 'EquilibriumError';
  constructor(
    readonly code: EquilibriumErrorCode,
    readonly detail: string,
  ) {
    super(detail);
  }
}

/** Something the answer should be read with. */
export interface EquilibriumWarning {
  readonly code: 'correlation-out-of-range' | 'above-critical-temperature';
  readonly component: string;
  readonly message: string;
}
