import { readLink, writeFollowLink, writeLink } from './case-link';
import type { DeskCase } from './desk-case';
import { caseOf, presetSlates } from './slates';

const start = caseOf(presetSlates[0]);
const known = new Set(['ethane', 'propane', 'isobutane', 'n-butane', 'isopentane', 'n-pentane']);
const isKnown = (id: string) => known.has(id);

describe('a link', () => {
  const other: DeskCase = {
    rows: [
      { id: 'n-butane', amount: '99.05', group: 'light' },
      { id: 'n-pentane', amount: '0,95', group: 'heavy' },
    ],
    basis: 'volume',
    method: 'ideal',
    correlations: { 'n-butane': 'n-butane/dippr101-perry8' },
    temperature: 322.1234567890123,
    pressure: 612_345.678,
    answer: 'bubble-at-temperature',
    relation: 'bubble',
    target: 0.0125,
    pair: ['n-pentane', 'n-butane'],
    thermometer: 'AA',
    pressureTolerance: 750,
  };

  it('restores the very same case, whatever the desk showed before', () => {
    const { case: restored, sensorId, faults } = readLink(writeLink(other), start, isKnown);
    const typedWithPoint = other.rows.map((row) => ({ ...row, amount: row.amount.replace(',', '.') }));
    expect(restored).toEqual({ ...other, rows: typedWithPoint });
    expect(sensorId).toBeNull();
    expect(faults).toEqual([]);
  });

  it.each(presetSlates.filter((preset) => preset.case.rows.every(({ id }) => isKnown(id))))(
    'restores the preset $name',
    (preset) => expect(readLink(writeLink(caseOf(preset)), other, isKnown).case).toEqual(caseOf(preset)),
  );

  it('leaves out a row whose amount is not finished', () => {
    const rows = [...other.rows, { id: 'propane', amount: '1.', group: 'light' as const }];
    const unfinished = [...rows, { id: 'ethane', amount: '', group: 'light' as const }];
    const { case: restored } = readLink(writeLink({ ...other, rows: unfinished }), start, isKnown);
    expect(restored.rows.map(({ id }) => id)).toEqual(['n-butane', 'n-pentane', 'propane']);
  });

  it('that follows a sensor carries no readings, which are the sensor’s own', () => {
    const query = writeFollowLink(other, 'debutaniser-c5');
    expect(query).not.toHaveProperty('t');
    expect(query).not.toHaveProperty('slate');
    expect(readLink(query, start, isKnown).sensorId).toBe('debutaniser-c5');
  });
});

describe('a damaged link', () => {
  it.each([
    ['slate', 'propane'],
    ['slate', 'propane:97:l,propane:3:h'],
    ['slate', 'propane:-3:l'],
    ['slate', 'pro pane:97:l'],
    ['basis', 'weight'],
    ['method', '<script>'],
    ['t', 'NaN'],
    ['t', '-5'],
    ['t', '1e99'],
    ['p', '0'],
    ['answer', 'x'],
    ['product', 'middle'],
    ['target', '1.2'],
    ['pair', 'propane:propane'],
    ['class', 'D'],
    ['within', '-1'],
    ['correlations', 'propane'],
  ])('with %s=%s keeps what was there and names the part', (key, text) => {
    const { case: restored, faults } = readLink(
      { [key]: text, target: key === 'target' ? text : '0.3' },
      start,
      isKnown,
    );
    expect(restored).toEqual({ ...start, target: key === 'target' ? start.target : 0.3 });
    expect(faults).toHaveLength(1);
    expect(faults[0]).toContain(`(${key})`);
  });

  it('with a component the library lacks says which, and keeps the others', () => {
    const { case: restored, faults } = readLink({ slate: 'propane:97:l,unobtainium:3:h' }, start, isKnown);
    expect(restored.rows.map(({ id }) => id)).toEqual(['propane']);
    expect(faults).toEqual(['the library has no unobtainium']);
  });
});
