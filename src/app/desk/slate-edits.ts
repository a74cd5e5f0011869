import { amountTotal, typedNumber, type Group, type SlateRow } from './desk-case';
import type { NamedComponent } from '../ui/find-component';

/** What the slate needs to know of a component besides its names. */
export interface SlateComponent extends NamedComponent {
  /** At 101325 Pa [K]. */
  readonly normalBoilingPoint: number;
}

type Amount = Pick<SlateRow, 'id' | 'amount'>;

/** The component there is most of; undefined in a slate without amounts. */
function mainOf(rows: readonly Amount[]): string | undefined {
  const amount = (row: Amount) => typedNumber(row.amount) ?? 0;
  const most = rows.reduce<Amount | undefined>(
    (best, row) => (amount(row) > (best ? amount(best) : 0) ? row : best),
    undefined,
  );
  return most?.id;
}

/**
 * Puts new components into groups: what boils higher than the component there is most of counts as heavy. That suits a top
 * product; a person can tell better, and may.
 */
export function grouped(rows: readonly Amount[], library: readonly SlateComponent[]): readonly SlateRow[] {
  const boils = (id: string | undefined) =>
    library.find((component) => component.id === id)?.normalBoilingPoint;
  const limit = boils(mainOf(rows)) ?? Number.POSITIVE_INFINITY;
  return rows.map(({ id, amount }) => ({ id, amount, group: (boils(id) ?? 0) > limit ? 'heavy' : 'light' }));
}

/** The rows with one component more, in the group its boiling point suggests. */
export function withComponent(
  rows: readonly SlateRow[],
  id: string,
  library: readonly SlateComponent[],
): readonly SlateRow[] {
  if (rows.some((row) => row.id === id)) return rows;
  const regrouped = grouped([...rows, { id, amount: '' }], library);
  return [...rows, regrouped[regrouped.length - 1]!];
}

/** What keeps a slate from being calculated with, in words; undefined when nothing does. */
export function slateFault(rows: readonly SlateRow[]): string | undefined {
  if (rows.length === 0) return 'Add a component, or begin with one of the slates above.';
  if (!(amountTotal(rows) > 0)) return 'Type an amount for at least one component.';
  return undefined;
}

/** What keeps a slate from being split into two groups, in words; undefined when nothing does. */
export function groupFault(rows: readonly SlateRow[]): string | undefined {
  const total = (group: Group) => amountTotal(rows.filter((row) => row.group === group));
  if (total('light') > 0 && total('heavy') > 0) return undefined;
  return 'Mark at least one component with an amount as light and one as heavy: one temperature can tell two groups apart.';
}
