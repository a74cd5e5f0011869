import type { NewSample } from '@shared/api/samples';
import { namedComponent, type NamedComponent } from '../ui/find-component';

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

/** What was found in something pasted. */
export interface PastedFigures {
  /** By component; also of components that have no field yet. */
  readonly figures: readonly TypedFraction[];
  /** Lines that stand for no figure, as they were; headings and totals are not among them. */
  readonly unread: readonly string[];
}

const isTotal = (name: string) => /^(sum|total|totals)\b/i.test(name);

/**
 * Figures pasted from a report or a spreadsheet: lines of name and number in any order, the same across in two lines, or a bare
 * column (or row) of numbers for the fields in their order.
 *
 * @param fields components of the form's fields, in their order
 * @param first field that was pasted into: a column shorter than the form begins there
 * @returns null when it is no list of figures, but ordinary text for one field
 */
export function pastedFigures(
  pasted: string,
  fields: readonly string[],
  first: number,
  library: readonly NamedComponent[],
): PastedFigures | null {
  const rows = pasted
    .split(/\r?\n/)
    .map(cellsOf)
    .filter((cells) => cells.some((cell) => cell !== ''));
  if (rows.length < 2 && (rows[0]?.length ?? 0) < 2) return null;
  return bareColumn(rows, fields, first) ?? namedFigures(upright(rows), library);
}

/** Cells part at tabs and semicolons; in a line without, the figure is what stands after the last blank. */
function cellsOf(line: string): readonly string[] {
  const trimmed = line.trim();
  const parts = /\t|;/.test(line)
    ? line.split(/\t|;/)
    : (/^(.*\S)\s+(\S+(?:\s*%)?)$/.exec(trimmed)?.slice(1) ?? [trimmed]);
  return parts.map((cell) => cell.replace(/%\s*$|^\s*"|"\s*$/g, '').trim());
}

function bareColumn(
  rows: readonly (readonly string[])[],
  fields: readonly string[],
  first: number,
): PastedFigures | null {
  const cells =
    rows.length === 1 ? rows[0]! : rows.every((row) => row.length === 1) ? rows.map(([cell]) => cell!) : [];
  const count = cells.filter(isNumber).length;
  // One "n.d." among numbers keeps its place; a column of names is none of numbers.
  if (count === 0 || count < cells.length / 2) return null;
  const start = cells.length >= fields.length ? 0 : first;
  return {
    figures: cells.flatMap((text, i) => {
      const id = fields[start + i];
      return id === undefined ? [] : [{ id, text }];
    }),
    unread: cells.slice(Math.max(0, fields.length - start)),
  };
}

function namedFigures(
  rows: readonly (readonly string[])[],
  library: readonly NamedComponent[],
): PastedFigures | null {
  const figures: TypedFraction[] = [];
  const unread: string[] = [];
  rows.forEach((cells, index) => {
    const [name = '', ...others] = cells.filter((cell) => cell !== '');
    const component = namedComponent(name, library);
    const text = others.find(isNumber) ?? others[0];
    if (component && text !== undefined) figures.push({ id: component.id, text });
    else if (!isTotal(name) && (index > 0 || others.some(isNumber))) unread.push(cells.join(' ').trim());
  });
  return figures.length > 0 ? { figures, unread } : null;
}

/** Two lines, names above figures, become a line for each name. */
function upright(rows: readonly (readonly string[])[]): readonly (readonly string[])[] {
  const [names, amounts] = rows;
  const isAcross =
    rows.length === 2 &&
    names !== undefined &&
    amounts !== undefined &&
    !names.some(isNumber) &&
    amounts.filter(isNumber).length > 1;
  return isAcross ? names.map((name, column) => [name, amounts[column] ?? '']) : rows;
}

function isNumber(cell: string): boolean {
  const value = typedNumber(cell);
  return value !== undefined && !Number.isNaN(value);
}
