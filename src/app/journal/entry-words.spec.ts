import type { JournalEntry } from '@shared/api/journal';
import { actionPhrase, actorName, changeTexts, fieldWords } from './entry-words';

const shown = {
  fraction: (moleFraction: number) => (moleFraction * 100).toFixed(2),
  fractionUnit: 'mol %',
  time: () => '2 Dec, 14:07 AST',
};

describe('an entry of the record in words', () => {
  it('reads an action this page knows, and one it does not know yet', () => {
    expect(actionPhrase('sample-entered')).toBe('entered a sample of');
    expect(actionPhrase('baseline-set')).toBe('baseline set:');
  });

  it('gives the system’s own acts to the product', () => {
    expect(actorName({ user: null } as JournalEntry)).toBe('Dewmark');
  });

  it('reads a field’s name', () => {
    expect(fieldWords('pressureCorrection')).toBe('pressure correction');
    expect(fieldWords('correction.gate')).toBe('correction gate');
  });

  it('puts fractions into the person’s unit', () => {
    expect(changeTexts({ field: 'value', from: null, to: 0.0121, unit: 'mol/mol' }, shown)).toEqual({
      field: 'value',
      from: 'nothing',
      to: '1.21',
      unit: 'mol %',
    });
  });

  it('puts moments into plant time', () => {
    expect(changeTexts({ field: 'drawnAt', from: null, to: 1, unit: 'ms' }, shown)).toMatchObject({
      to: '2 Dec, 14:07 AST',
      unit: '',
    });
  });

  it('leaves other quantities as they were written down', () => {
    expect(
      changeTexts({ field: 'offset', from: -0.12000000000000001, to: 0.05, unit: 'K' }, shown),
    ).toMatchObject({
      from: '\u22120.12',
      to: '0.05',
      unit: 'K',
    });
    expect(changeTexts({ field: 'q', from: 1e-9, to: 12000, unit: 'K²/h' }, shown)).toMatchObject({
      from: '1e-9',
      to: '12\u00a0000',
    });
  });
});
