import { pastedFractions, typedFractions, typedNumber } from './sample-draft';

const names = [
  ['ethane', 'c2'],
  ['propane', 'c3'],
  ['n-butane', 'nc4'],
];

describe('a typed result', () => {
  it.each([
    ['1.25', 1.25],
    ['1,25', 1.25],
    [' 96 ', 96],
    ['.5', 0.5],
  ])('reads %j as a number', (text, value) => {
    expect(typedNumber(text)).toBe(value);
  });

  it('tells nothing typed from something that is no number', () => {
    expect(typedNumber('  ')).toBeUndefined();
    expect(typedNumber('1.2.3')).toBeNaN();
    expect(typedNumber('n.d.')).toBeNaN();
  });

  it('leaves empty fields out, so that they show as missing', () => {
    expect(
      typedFractions([
        { id: 'ethane', text: '2' },
        { id: 'propane', text: '' },
      ]),
    ).toEqual([{ id: 'ethane', fraction: 0.02 }]);
  });

  it('takes a pasted column in the order of the fields', () => {
    expect(pastedFractions('1.2\n97,3\n1.5\n', names)).toEqual(['1.2', '97,3', '1.5']);
  });

  it('takes pasted names and figures, in whatever order', () => {
    expect(pastedFractions('Propane\t97.3\nNC4\t1.5', names)).toEqual([undefined, '97.3', '1.5']);
  });

  it('leaves an ordinary pasted number to the field', () => {
    expect(pastedFractions('97.3', names)).toBeNull();
  });
});
