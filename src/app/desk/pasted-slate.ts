import { shortest, typedNumber } from './desk-case';
import { namedComponent, type NamedComponent } from '../ui/find-component';

export interface PastedSlate {
  readonly rows: readonly { readonly id: string; readonly amount: string }[];
  /** What was left out or changed, in words; empty when all was taken as it stood. */
  readonly remarks: readonly string[];
}

/** Names that stand beneath a table's figures and are no component. */
const isTotal = (name: string) => /^(sum|total|totals|balance check)\b/i.test(name);

/**
 * Reads components and amounts copied from a spreadsheet: one a line, or one a column with the amounts in the second line. Cells
 * part at tabs, semicolons or blanks; headings and totals are passed over.
 */
export function readPastedSlate(text: string, library: readonly NamedComponent[]): PastedSlate {
  const table = text
    .split(/\r?\n/)
    .map(cellsOf)
    .filter((cells) => cells.some((cell) => cell !== ''));
  const found = new Map<string, string>();
  const remarks: string[] = [];
  pairsOf(table).forEach(([name, amount], index) => {
    if (isTotal(name)) return;
    const component = namedComponent(name, library);
    const value = amount === undefined ? undefined : typedNumber(amount);
    if (!component) {
      // The first line without a figure is a heading, not a mistake.
      if (index > 0 || value !== undefined) remarks.push(`“${name}” is not in the library and was left out`);
      return;
    }
    if (value === undefined || value < 0) {
      remarks.push(
        `${component.name} has no usable amount${amount ? ` (“${amount}”)` : ''} and was left out`,
      );
      return;
    }
    const before = found.get(component.id);
    if (before !== undefined) remarks.push(`${component.name} stood there twice: the amounts were added`);
    found.set(component.id, shortest(value + Number(before ?? 0)));
  });
  if (found.size === 0 && remarks.length === 0) remarks.push('there was no component with an amount in it');
  return { rows: [...found].map(([id, amount]) => ({ id, amount })), remarks };
}

/** Empty cells stay: figures belong to the name in their own column. */
function cellsOf(line: string): readonly string[] {
  const parted = /\t|;/.test(line) ? line.split(/\t|;/) : partAtLastBlank(line);
  return parted.map((cell) => cell.replace(/^\s*"|"\s*$|%/g, '').trim());
}

/** A name may hold blanks (`carbon dioxide 1.2`): the amount is what stands after the last one. */
function partAtLastBlank(line: string): readonly string[] {
  const parts = /^(.*\S)\s+(\S+\s*%?)\s*$/.exec(line.trim());
  return parts?.[2] !== undefined && isNumber(parts[2].replace('%', ''))
    ? [parts[1] ?? '', parts[2]]
    : [line];
}

function pairsOf(table: readonly (readonly string[])[]): readonly (readonly [string, string | undefined])[] {
  const [names, amounts] = table;
  const isAcross =
    table.length === 2 &&
    names !== undefined &&
    amounts !== undefined &&
    !names.some(isNumber) &&
    amounts.filter(isNumber).length > 1;
  if (isAcross)
    return names.map((name, column) => [name, amounts[column]] as const).filter(([name]) => name !== '');
  return table.map((cells) => {
    const [name = '', ...others] = cells.filter((cell) => cell !== '');
    return [name, others.find(isNumber) ?? others[0]];
  });
}

function isNumber(cell: string): boolean {
  return typedNumber(cell) !== undefined;
}
