import type { NewSample } from '@shared/api/samples';

/** One field of the entry form, as typed. */
export interface TypedFraction {
  readonly id: string;
  /** mol %, as typed; empty where nothing was. */
  readonly text: string;
}

/** A number typed with a point or a decimal comma; NaN where it is none, undefined where nothing was typed. */
export function typedNumber(text: string): number | undefined {
  const trimmed = text.trim().replace(/\s/g, '');
  if (trimmed === '') return undefined;
  return /^[+-]?(\d+([.,]\d*)?|[.,]\d+)$/.test(trimmed) ? Number(trimmed.replace(',', '.')) : Number.NaN;
}

/** The typed mol % as mole fractions; an empty field is left out, so that it shows as missing. */
export function typedFractions(typed: readonly TypedFraction[]): NewSample['fractions'] {
  return typed.flatMap(({ id, text }) => {
    const percent = typedNumber(text);
    return percent === undefined ? [] : [{ id, fraction: percent / 100 }];
  });
}

/**
 * Figures pasted from a report or a spreadsheet: a column of numbers for the fields in their order, or lines of name and
 * number for the fields they name.
 *
 * @param names of each field's component, as a laboratory might write them, lower case
 * @returns the text for each field, undefined where the paste has nothing for it; null when it is no list of figures
 */
export function pastedFractions(
  pasted: string,
  names: readonly (readonly string[])[],
): (string | undefined)[] | null {
  const rows = pasted
    .split(/\r?\n/)
    .map((line) => line.split(/\t|;/).map((cell) => cell.trim()))
    .filter((cells) => cells.some((cell) => cell !== ''));
  if (rows.length < 2 && (rows[0]?.length ?? 0) < 2) return null;
  const isNumber = (cell: string | undefined) =>
    cell !== undefined && !Number.isNaN(typedNumber(cell) ?? Number.NaN);
  const [only] = rows;
  // One row of figures across, or one column of them.
  const column =
    rows.length === 1 && only!.every(isNumber)
      ? only!
      : rows.every((cells) => cells.length === 1 && isNumber(cells[0]))
        ? rows.map((cells) => cells[0]!)
        : null;
  if (column) return names.map((_, i) => column[i]);
  const found = names.map(
    (known) =>
      rows.find((cells) => known.includes((cells[0] ?? '').toLowerCase()) && isNumber(cells[1]))?.[1],
  );
  return found.some((text) => text !== undefined) ? found : null;
}
