import { durationWords, formatNumber } from './numbers';

describe('numbers for people', () => {
  it.each([
    [1.615, 2, false, '1.61'],
    [-0.03, 2, true, '\u22120.03'],
    [0.09, 2, true, '+0.09'],
    [-0.001, 2, true, '0.00'],
    [1702.4, 1, false, '1702.4'],
    [16179, 0, false, '16\u00a0179'],
    [1234567.8, 1, false, '1\u00a0234\u00a0567.8'],
  ])('writes %d with %d decimals (signed: %s) as %s', (value, decimals, signed, text) => {
    expect(formatNumber(value, decimals, signed)).toBe(text);
  });

  it.each([
    [30_000, 'under 1 min'],
    [12 * 60_000, '12 min'],
    [6 * 3_600_000 + 10 * 60_000, '6 h 10 min'],
    [3 * 3_600_000 + 2 * 60_000, '3 h 02 min'],
    [5 * 3_600_000, '5 h'],
    [76 * 3_600_000, '3 d 4 h'],
    [72 * 3_600_000, '3 d'],
    [-5000, 'under 1 min'],
  ])('says %d ms as %s', (ms, words) => {
    expect(durationWords(ms)).toBe(words);
  });
});
