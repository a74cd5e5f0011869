import { components } from '@shared/vle/components';
import { pastedFigures, typedFractions, typedNumber } from './sample-draft';

const fields = ['ethane', 'propane', 'isobutane', 'n-butane'];
const paste = (text: string, first = 0) => pastedFigures(text, fields, first, components);

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
});

describe('a pasted result', () => {
  it('takes a column in the order of the fields, wherever it is pasted when it is as long as the form', () => {
    const taken = ['1.2', '96,3', '1.0', '1.5'].map((text, i) => ({ id: fields[i], text }));
    expect(paste('1.2\n96,3\n1.0\n1.5\n')).toEqual({ figures: taken, unread: [] });
    expect(paste('1.2\t96,3\t1.0\t1.5', 2)).toEqual({ figures: taken, unread: [] });
  });

  it('begins a shorter column at the field it is pasted into, and says what found no field', () => {
    expect(paste('1.0\n1.5\n0.2', 2)).toEqual({
      figures: [
        { id: 'isobutane', text: '1.0' },
        { id: 'n-butane', text: '1.5' },
      ],
      unread: ['0.2'],
    });
  });

  it('keeps the place of a figure that is no number, for the field to say so', () => {
    expect(paste('n.d.\n97.3\n1.2\n1.5')?.figures[0]).toEqual({ id: 'ethane', text: 'n.d.' });
  });

  it('takes names and figures in any order, by any of their names, without heading and total', () => {
    const text = 'Component\tmol %\nPropane\t97.3\ni-Butane\t0,8\nNC4\t1.5 %\nneopentane\t0.02\nTotal\t99.62';
    expect(paste(text)).toEqual({
      figures: [
        { id: 'propane', text: '97.3' },
        { id: 'isobutane', text: '0,8' },
        { id: 'n-butane', text: '1.5' },
        { id: 'neopentane', text: '0.02' },
      ],
      unread: [],
    });
  });

  it('takes names above figures, and a line with blanks between', () => {
    expect(paste('ethane\tpropane\n2.1\t97.9')?.figures).toEqual([
      { id: 'ethane', text: '2.1' },
      { id: 'propane', text: '97.9' },
    ]);
    expect(paste('carbon dioxide 0.1\npropane 99.9')?.figures.map(({ text }) => text)).toEqual([
      '0.1',
      '99.9',
    ]);
  });

  it('never puts one figure to two components: a formula that several have names none', () => {
    expect(paste('C3H8\t97\nC4H10\t3')).toEqual({
      figures: [{ id: 'propane', text: '97' }],
      unread: ['C4H10 3'],
    });
  });

  it('leaves an ordinary pasted number or word to the field', () => {
    expect(paste('97.3')).toBeNull();
    expect(paste('see\nreport')).toBeNull();
  });
});
