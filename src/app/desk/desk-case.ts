import type { ThermometerClass } from '@shared/inference/instruments';

export const methods = ['ideal', 'peng-robinson'] as const;
export const bases = ['mole', 'mass', 'volume'] as const;
/** What amounts count: moles, mass, or volume of liquid at 15 °C. */
export type AmountBasis = (typeof bases)[number];
export const groups = ['light', 'heavy'] as const;
export type Group = (typeof groups)[number];
export const relations = ['dew', 'bubble'] as const;
/** Top product at its dew point, or bottom product at its bubble point. */
export type Relation = (typeof relations)[number];
/** The states of which phases can be looked at; "at" names what is held. */
export const answers = [
  'flash',
  'bubble-at-pressure',
  'dew-at-pressure',
  'bubble-at-temperature',
  'dew-at-temperature',
] as const;
export type Answer = (typeof answers)[number];

/** One line of the slate. The amount stays as it was typed: whoever writes `97.` is not done yet. */
export interface SlateRow {
  readonly id: string;
  readonly amount: string;
  readonly group: Group;
}

/** Everything the desk's figures follow from, and all a link must carry. K, Pa absolute, mol/mol. */
export interface DeskCase {
  readonly rows: readonly SlateRow[];
  readonly basis: AmountBasis;
  readonly method: (typeof methods)[number];
  /** Component id to vapour pressure row, where not the first choice. */
  readonly correlations: Readonly<Record<string, string>>;
  readonly temperature: number;
  readonly pressure: number;
  readonly answer: Answer;
  readonly relation: Relation;
  /** What the relation's own group is to be: the heavy one's of a top, the light one's of a bottom product. */
  readonly target: number;
  /** The two components of the T–x–y plot; null for the two of which there is most. */
  readonly pair: readonly [string, string] | null;
  readonly thermometer: ThermometerClass;
  /** Half the width of the pressure transmitter's tolerance. */
  readonly pressureTolerance: number;
}

/** The group that a relation's product is judged by: what does not belong there. */
export function impurityOf(relation: Relation): Group {
  return relation === 'dew' ? 'heavy' : 'light';
}

/** A typed number, with point or decimal comma; undefined while it is none, and for `1,700`, which can be meant two ways. */
export function typedNumber(text: string): number | undefined {
  const plain = text
    .trim()
    .replace(/[\u2212\u2013]/g, '-')
    .replace(/[\s\u00a0\u202f]/g, '');
  if (/^[+-]?[1-9]\d{0,2},\d{3}$/.test(plain)) return undefined;
  if (!/^[+-]?(\d+([.,]\d*)?|[.,]\d+)(e[+-]?\d{1,3})?$/i.test(plain)) return undefined;
  const value = Number(plain.replace(',', '.'));
  return Number.isFinite(value) ? value : undefined;
}

/** What is wrong with a row's amount, in words; undefined when nothing is. One that is still missing counts as none. */
export function amountFault(amount: string): string | undefined {
  if (amount.trim() === '') return undefined;
  const value = typedNumber(amount);
  if (value === undefined) return 'Write a number, such as 97.1.';
  if (value < 0) return 'An amount cannot be negative.';
  if (value > 1e9) return 'This is too much: use per cent.';
  return undefined;
}

/** Sum of the amounts that can be read. */
export function amountTotal(rows: readonly SlateRow[]): number {
  return rows.reduce((sum, row) => sum + (typedNumber(row.amount) ?? 0), 0);
}

/** The amounts scaled to sum to 100; what cannot be read stays. */
export function normalised(rows: readonly SlateRow[]): readonly SlateRow[] {
  const total = amountTotal(rows);
  if (!(total > 0)) return rows;
  return rows.map((row) => {
    const value = typedNumber(row.amount);
    return value === undefined ? row : { ...row, amount: shortest((100 * value) / total) };
  });
}

/** A number as a person would type it, with at most six significant digits. */
export function shortest(value: number): string {
  return String(Number(value.toPrecision(6)));
}
