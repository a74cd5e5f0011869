import { matchingComponents, namedComponent } from '../ui/find-component';
import { readPastedSlate } from './pasted-slate';

const library = [
  { id: 'ethane', name: 'ethane', short: 'C2', formula: 'C2H6' },
  { id: 'propane', name: 'propane', short: 'C3', formula: 'C3H8' },
  { id: 'propylene', name: 'propylene', short: 'C3=', formula: 'C3H6' },
  { id: 'isobutane', name: 'isobutane', short: 'iC4', formula: 'C4H10' },
  { id: 'n-butane', name: 'n-butane', short: 'nC4', formula: 'C4H10' },
  { id: 'carbon-dioxide', name: 'carbon dioxide', short: 'CO2', formula: 'CO2' },
];
const read = (text: string) => readPastedSlate(text, library);
const rows = (text: string) => read(text).rows.map(({ id, amount }) => `${id} ${amount}`);

describe('a component', () => {
  it.each([
    ['Propane', 'propane'],
    ['c3', 'propane'],
    ['C3H8', 'propane'],
    ['C3=', 'propylene'],
    ['propene', 'propylene'],
    ['i-C4', 'isobutane'],
    ['IC4', 'isobutane'],
    ['i-butane', 'isobutane'],
    ['N-Butane', 'n-butane'],
    ['butane', 'n-butane'],
    ['Carbon Dioxide', 'carbon-dioxide'],
  ])('is found by %s', (text, id) => expect(namedComponent(text, library)?.id).toBe(id));

  it('is not guessed from a formula that two have', () => {
    expect(namedComponent('C4H10', library)).toBeUndefined();
    expect(namedComponent('', library)).toBeUndefined();
  });

  it('comes first in the list when the text names it, before those that only begin so', () => {
    expect(matchingComponents('c3', library).map(({ id }) => id)).toEqual(['propane', 'propylene']);
    expect(matchingComponents('C4H10', library).map(({ id }) => id)).toEqual(['isobutane', 'n-butane']);
    expect(matchingComponents('but', library).map(({ id }) => id)).toEqual(['n-butane', 'isobutane']);
    expect(matchingComponents('xyz', library)).toEqual([]);
  });
});

describe('a slate from a spreadsheet', () => {
  it('is read one component a line, past headings and totals', () => {
    const text = 'Component\tmol %\r\nC2\t1.2\r\nPropane\t96.6\r\niC4\t2,2 %\r\nTotal\t100.0\r\n';
    expect(rows(text)).toEqual(['ethane 1.2', 'propane 96.6', 'isobutane 2.2']);
    expect(read(text).remarks).toEqual([]);
  });

  it('is read with the components across, with and without headings', () => {
    expect(rows('C2\tC3\tiC4\n1.2\t96.6\t2.2')).toEqual(['ethane 1.2', 'propane 96.6', 'isobutane 2.2']);
    expect(rows('sample\tC2\tC3\nmol %\t3\t97')).toEqual(['ethane 3', 'propane 97']);
  });

  it('keeps figures under their own names where a cell is empty', () => {
    expect(rows('C2\tC3\tiC4\n1.2\t\t2.2')).toEqual(['ethane 1.2', 'isobutane 2.2']);
    expect(read('C2\tC3\tiC4\n1.2\t\t2.2').remarks).toEqual([
      'propane has no usable amount and was left out',
    ]);
  });

  it('is read where blanks or semicolons part the cells', () => {
    expect(rows('carbon dioxide 0.4\npropane   99.6')).toEqual(['carbon-dioxide 0.4', 'propane 99.6']);
    expect(rows('propane;"97,5"\nn-butane;2,5')).toEqual(['propane 97.5', 'n-butane 2.5']);
  });

  it('says what it left out, and why', () => {
    const { rows: taken, remarks } = read('propane\t97\nC6+\t2\nn-butane\tn/a\nethane\t-1');
    expect(taken.map(({ id }) => id)).toEqual(['propane']);
    expect(remarks).toEqual([
      '“C6+” is not in the library and was left out',
      'n-butane has no usable amount (“n/a”) and was left out',
      'ethane has no usable amount (“-1”) and was left out',
    ]);
  });

  it('adds up a component that stands there twice', () => {
    expect(rows('nC4\t1.5\nn-butane\t0.3\npropane\t98.2')).toEqual(['n-butane 1.8', 'propane 98.2']);
    expect(read('nC4\t1.5\nn-butane\t0.3').remarks).toEqual([
      'n-butane stood there twice: the amounts were added',
    ]);
  });

  it('that is no slate at all says so', () => {
    expect(read('')).toEqual({ rows: [], remarks: ['there was no component with an amount in it'] });
    expect(read('good morning')).toEqual({
      rows: [],
      remarks: ['there was no component with an amount in it'],
    });
  });
});
