/** The product on its way from the tower's top to the sample tap; plain data. */
export interface RundownState {
  /** Composition in the drum [mol/mol], and when it was last moved. */
  readonly lagged: number | null;
  readonly t: number | null;
  /** What has left the drum and is still in the line, oldest first: time and fraction. */
  readonly waiting: readonly (readonly [number, number])[];
}

const minute = 60_000;

/**
 * Moves the rundown by one minute: a first-order lag of the drum's residence time, then the line's dead time.
 * A minute without a value leaves the drum as it was.
 *
 * @returns the fraction at the sample tap, null until something has come that far
 */
export function stepRundown(
  state: RundownState,
  t: number,
  value: number | null,
  alignment: { readonly deadTimeMinutes: number; readonly residenceMinutes: number },
): { value: number | null; state: RundownState } {
  let { lagged, t: movedAt } = state;
  if (value !== null) {
    const share =
      lagged === null || movedAt === null || alignment.residenceMinutes === 0
        ? 1
        : 1 - Math.exp(-(t - movedAt) / (alignment.residenceMinutes * minute));
    lagged = lagged === null || share === 1 ? value : lagged + share * (value - lagged);
    movedAt = t;
  }
  const waiting =
    value === null || lagged === null ? [...state.waiting] : [...state.waiting, [t, lagged] as const];
  // The newest that has had time to arrive; older ones have passed the tap.
  const arrivedBefore = t - alignment.deadTimeMinutes * minute;
  let arrived = -1;
  for (let i = 0; i < waiting.length && waiting[i]![0] <= arrivedBefore; i++) arrived = i;
  return {
    value: arrived < 0 ? null : waiting[arrived]![1],
    state: { lagged, t: movedAt, waiting: arrived < 0 ? waiting : waiting.slice(arrived) },
  };
}
