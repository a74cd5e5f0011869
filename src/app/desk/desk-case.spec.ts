import { amountFault, amountTotal, normalised, typedNumber, type SlateRow } from './desk-case';

const row = (id: string, amount: string): SlateRow => ({ id, amount, group: 'light' });

describe('a typed number', () => {
  it.each([
    ['97.1', 97.1],
    ['97,1', 97.1],
    ['0,125', 0.125],
    [' 1 700 ', 1700],
    ['1\u00a0700', 1700],
    ['\u221242', -42],
    ['.5', 0.5],
    ['5.', 5],
    ['2e-3', 0.002],
  ])('reads %j as %f', (text, value) => expect(typedNumber(text)).toBe(value));

  it.each([
    '',
    'abc',
    '1.2.3',
    '1,2,3',
    '--1',
    '1,700',
    '1,700.5',
    '1e',
    '1e999',
    'NaN',
    'Infinity',
    '0x10',
    '97 %',
  ])('does not take %j for one', (text) => expect(typedNumber(text)).toBeUndefined());
});

describe('the amounts of a slate', () => {
  it('say in words what is wrong with them', () => {
    expect(amountFault('')).toBeUndefined();
    expect(amountFault('x')).toBe('Write a number, such as 97.1.');
    expect(amountFault('-1')).toBe('An amount cannot be negative.');
    expect(amountFault('1e12')).toContain('too much');
    expect(amountFault('0')).toBeUndefined();
  });

  it('are scaled to 100 without changing their proportions', () => {
    const rows = normalised([row('propane', '30'), row('n-butane', '10'), row('ethane', '')]);
    expect(rows.map((each) => each.amount)).toEqual(['75', '25', '']);
    expect(amountTotal(rows)).toBe(100);
  });

  it('stay as they are when there is nothing to scale', () => {
    const rows = [row('propane', '0'), row('n-butane', 'x')];
    expect(normalised(rows)).toEqual(rows);
  });
});
