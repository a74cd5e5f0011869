export type Cell = string | number | null;
export type Table = readonly (readonly Cell[])[];

/**
 * A cell's text for a file that a spreadsheet will open. What begins like a formula would be run there, so an apostrophe goes
 * before it; numbers are ours and keep their minus.
 *
 * @source OWASP ASVS 5.0 V1.2.10
 */
function cellText(cell: Cell): string {
  if (cell === null) return '';
  if (typeof cell === 'number') return Number.isFinite(cell) ? String(cell) : '';
  return /^[=+\-@\t\r\n]/.test(cell) ? `'${cell}` : cell;
}

/** Comma-separated, lines ending in CR LF (RFC 4180). */
export function toCsv(table: Table): string {
  const quoted = (text: string) => (/[",\r\n]/.test(text) ? `"${text.replace(/"/g, '""')}"` : text);
  return table.map((cells) => `${cells.map((cell) => quoted(cellText(cell))).join(',')}\r\n`).join('');
}

/** Tab-separated, for the clipboard: spreadsheets put it into cells. */
export function toTsv(table: Table): string {
  const flat = (text: string) => text.replace(/[\t\r\n]+/g, ' ');
  return table.map((cells) => `${cells.map((cell) => flat(cellText(cell))).join('\t')}\n`).join('');
}
