import { aSensor, anEstimate } from './sensor-fixtures';
import { testNow } from '../core/testing';
import { assess, byNeed, summaryWords, type AssessedSensor } from './attention';
import { chanceWords, direction } from './sensor-words';

const minute = 60_000;
const hour = 60 * minute;

describe('who needs a look', () => {
  it('leaves a good value with a recent sample alone', () => {
    expect(assess(aSensor(), testNow).kind).toBe('calm');
  });

  it.each([
    ['off-limit', 'above limit', aSensor({ latest: anEstimate({ value: 0.0151 }) })],
    [
      'off-limit',
      'below limit',
      aSensor({ limits: { high: null, low: 0.95, target: null }, latest: anEstimate({ value: 0.949 }) }),
    ],
    ['bad', 'do not use this value', aSensor({ latest: anEstimate({ value: null, quality: 'Bad' }) })],
    ['bad', 'no value yet', aSensor({ latest: null })],
    ['stale', 'no new value', aSensor({ latest: anEstimate({ t: testNow - 3 * minute - 1 }) })],
    ['uncertain', 'use with care', aSensor({ latest: anEstimate({ quality: 'Uncertain' }) })],
    ['near-limit', 'may be above limit', aSensor({ latest: anEstimate({ high: 0.0151 }) })],
    ['sample-due', 'a sample is due', aSensor({ lastUsedSampleAt: testNow - 8 * hour - 1 })],
    ['sample-due', 'a sample is due', aSensor({ lastUsedSampleAt: null })],
  ])('says %s: %s', (kind, words, sensor) => {
    expect(assess(sensor, testNow)).toMatchObject({ kind, words });
  });

  it('takes a value at its limit and a minute three minutes old for well', () => {
    const sensor = aSensor({ latest: anEstimate({ value: 0.015, high: 0.015, t: testNow - 3 * minute }) });
    expect(assess(sensor, testNow).kind).toBe('calm');
  });

  it('puts off limit before bad, bad before uncertain, uncertain before due, and the rest last', () => {
    const rows = [
      aSensor({ id: 'calm' }),
      aSensor({ id: 'due', lastUsedSampleAt: null }),
      aSensor({ id: 'uncertain', latest: anEstimate({ quality: 'Uncertain' }) }),
      aSensor({ id: 'bad', latest: anEstimate({ value: null, quality: 'Bad' }) }),
      aSensor({ id: 'off', latest: anEstimate({ value: 0.02 }) }),
    ].map(assessed);
    expect(rows.sort(byNeed).map(({ sensor }) => sensor.id)).toEqual([
      'off',
      'bad',
      'uncertain',
      'due',
      'calm',
    ]);
  });

  it('puts the likelier one first among equals, and keeps places when chances differ by noise', () => {
    const rows = [
      aSensor({ id: 'a', towerName: 'Alpha', offLimitProbability: 0.11 }),
      aSensor({ id: 'b', towerName: 'Beta', offLimitProbability: 0.13 }),
      aSensor({ id: 'c', towerName: 'Gamma', offLimitProbability: 0.4 }),
    ].map(assessed);
    expect(rows.sort(byNeed).map(({ sensor }) => sensor.id)).toEqual(['c', 'a', 'b']);
  });

  it('sums the Board up in one sentence', () => {
    expect(
      summaryWords(
        [aSensor(), aSensor({ latest: null }), aSensor({ latest: anEstimate({ value: 1 }) })].map(assessed),
      ),
    ).toBe('3 products: 1 off limit, 1 without a usable value');
    expect(summaryWords([assessed(aSensor())])).toBe('1 product: all well');
  });
});

describe('the words of a row', () => {
  it.each([
    [0.0009, 0.015, 'rising'],
    [-0.0009, 0.015, 'falling'],
    [0.0001, 0.015, 'steady'],
    // In a purity of 95 % it is the other 5 % that move.
    [-0.002, 0.95, 'falling'],
    [null, 0.015, null],
  ])('calls a slope of %s per h against %s %s', (slope, reference, words) => {
    expect(direction(slope, reference)).toBe(words);
  });

  it.each([
    [0.81, '81 % likely above limit'],
    [0.004, 'under 1 % likely above limit'],
    [0.999, 'over 99 % likely above limit'],
    [null, ''],
  ])('says a chance of %s as "%s"', (offLimitProbability, words) => {
    expect(chanceWords(aSensor({ offLimitProbability }))).toBe(words);
  });

  it('says nothing of a chance where there is no limit', () => {
    expect(chanceWords(aSensor({ limits: { high: null, low: null, target: null } }))).toBe('');
  });
});

function assessed(sensor: ReturnType<typeof aSensor>): AssessedSensor {
  return { sensor, attention: assess(sensor, testNow) };
}
