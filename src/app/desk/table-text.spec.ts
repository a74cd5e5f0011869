import { toCsv, toTsv } from './table-text';

/** Cells that a spreadsheet would take for formulas, and their escape; OWASP ASVS 5.0 V1.2.10 and RFC 4180. */
const escaped: readonly (readonly [string, string])[] = [
  ['=SUM(A1:A2)', "'=SUM(A1:A2)"],
  ['+1', "'+1"],
  ['-late sample', "'-late sample"],
  ['@cmd', "'@cmd"],
  ['\tx', "'\tx"],
  ['plain', 'plain'],
  ['says "ok", twice', '"says ""ok"", twice"'],
  ['=1,2', '"\'=1,2"'],
  ['two\nlines', '"two\nlines"'],
];

describe('a table for spreadsheets', () => {
  it.each(escaped)('writes the text %j as %j', (text, cell) => expect(toCsv([[text]])).toBe(`${cell}\r\n`));

  it('leaves numbers as they are, and nothing where there is none', () => {
    expect(toCsv([['K', -1.5, 1e-7, null, Number.NaN]])).toBe('K,-1.5,1e-7,,\r\n');
  });

  it('parts cells by tabs for the clipboard, with no tab or line end inside one', () => {
    expect(
      toTsv([
        ['a\tb\r\nc', 'd'],
        ['=x', -2],
      ]),
    ).toBe("a b c\td\n'=x\t-2\n");
  });
});
