import { afterAll, describe, expect, it } from 'vitest';
import { bubblePoint } from '@shared/vle/equilibrium';
import { rachfordRice } from '@shared/vle/flash';
import { boilingPoints, splits, vapourPressures } from './data/published-figures';
import { WorstDeviations } from './support/worst-deviations';

const worst = new WorstDeviations();
afterAll(() => worst.print('handbooks and textbooks'));

/** One pound-force a square inch [Pa]. */
const psi = 6894.757293168361;

/**
 * The first-choice correlations lie within 0.3 % of the reference equations, which at a normal boiling point is 0.1 K. Two
 * printed values are further off than that from other printed ones: the older table's isobutane (261.53 K; the CRC Handbook
 * has 261.45), and 1,3-butadiene, printed from a tenth of a degree Celsius.
 */
const apart = new Map([
  ['isobutane kidnay2006', 0.13],
  ['1-3-butadiene crc2014', 0.15],
]);

describe('normal boiling points', () => {
  it.each(boilingPoints)('$id as in $source', ({ id, printed, source }) => {
    const { temperature } = bubblePoint(
      { method: 'ideal', components: [{ id, fraction: 1 }] },
      { pressure: 101_325 },
    );
    const off = Math.abs(temperature - printed);
    worst.note(`normal boiling points of ${source} [K]`, off);
    expect(off).toBeLessThanOrEqual(apart.get(`${id} ${source}`) ?? 0.1);
  });
});

describe('vapour pressures', () => {
  it.each(vapourPressures)('$id at $temperature K as in $source', ({ id, temperature, printed, source }) => {
    const { pressure } = bubblePoint({ method: 'ideal', components: [{ id, fraction: 1 }] }, { temperature });
    const off = Math.abs(pressure / psi / printed - 1);
    worst.note(`vapour pressures of ${source.split(',')[0]!} (relative)`, off);
    // 0.3 %: what the first-choice correlations keep to against the reference equations.
    expect(off).toBeLessThanOrEqual(0.003);
  });
});

describe('splits at known K-values', () => {
  it.each(splits)('$printed by $source', ({ z, K, printed, halfDigit }) => {
    const off = Math.abs(rachfordRice(z, K).vapour - printed);
    worst.note('Rachford-Rice examples (absolute)', off);
    expect(off).toBeLessThanOrEqual(halfDigit);
  });
});
