import type { SlateRow } from './desk-case';
import { groupFault, grouped, slateFault, withComponent } from './slate-edits';

const library = [
  { id: 'ethane', name: 'ethane', short: 'C2', formula: 'C2H6', normalBoilingPoint: 184.6 },
  { id: 'propane', name: 'propane', short: 'C3', formula: 'C3H8', normalBoilingPoint: 231 },
  { id: 'isobutane', name: 'isobutane', short: 'iC4', formula: 'C4H10', normalBoilingPoint: 261.4 },
  { id: 'n-butane', name: 'n-butane', short: 'nC4', formula: 'C4H10', normalBoilingPoint: 272.7 },
];
const slate: readonly SlateRow[] = [
  { id: 'ethane', amount: '1', group: 'light' },
  { id: 'propane', amount: '97', group: 'light' },
  { id: 'n-butane', amount: '2', group: 'heavy' },
];

describe('grouping a slate', () => {
  it('counts as heavy what boils higher than the component there is most of', () => {
    const pasted = slate.map(({ id, amount }) => ({ id, amount }));
    expect(grouped(pasted, library)).toEqual(slate);
  });

  it('puts a component that is added into its group and leaves the others as they were chosen', () => {
    const chosen = slate.map((row) => ({ ...row, group: 'light' as const }));
    expect(withComponent(chosen, 'isobutane', library)).toEqual([
      ...chosen,
      { id: 'isobutane', amount: '', group: 'heavy' },
    ]);
    expect(withComponent(chosen, 'propane', library)).toBe(chosen);
  });
});

describe('a slate that cannot be calculated with', () => {
  it('says what is missing', () => {
    expect(slateFault([])).toContain('Add a component');
    expect(slateFault([{ id: 'propane', amount: '0', group: 'light' }])).toContain('Type an amount');
    expect(slateFault(slate)).toBeUndefined();
  });

  it('says so when one of the groups is empty', () => {
    expect(groupFault(slate)).toBeUndefined();
    expect(groupFault(slate.filter((row) => row.group === 'light'))).toContain('one as heavy');
  });
});
