import { correlationsInUse, interactionsInUse, provenanceWords } from './slate-sources';

describe('the sources of a slate', () => {
  it('name each pair’s published interaction, and say where there is none', () => {
    const found = interactionsInUse(['propane', 'methane', 'isopentane', 'n-pentane']).map(
      ({ a, b, kij }) => `${a.id} ${b.id} ${kij}`,
    );
    // Methane with propane 0.0119 and with isopentane -0.0056: DECHEMA Chemistry Data Series vol. VI, as in the ChemSep file.
    expect(found).toContain('propane methane 0.0119');
    expect(found).toContain('methane isopentane -0.0056');
    expect(found).toContain('isopentane n-pentane null');
    expect(found).toHaveLength(6);
  });

  it('name the correlation in use: the first choice, or the one chosen by hand', () => {
    const ids = ['propane', 'n-butane'];
    const [first] = correlationsInUse(ids, {});
    const [chosen, other] = correlationsInUse(ids, { propane: 'propane/antoine-poling' });
    expect(first?.rank).toBe(1);
    expect(chosen?.id).toBe('propane/antoine-poling');
    expect(other?.rank).toBe(1);
  });

  it('stand in words under each result', () => {
    expect(provenanceWords('peng-robinson', ['propane', 'isobutane'], {})).toMatch(
      /^Peng–Robinson: Peng and Robinson.*1976.*k_ij: DECHEMA.*constants: NIST REFPROP/,
    );
    expect(provenanceWords('peng-robinson', ['isopentane', 'n-pentane'], {})).toContain(
      'no k_ij is published',
    );
    const ideal = provenanceWords('ideal', ['propane', 'n-butane'], { propane: 'propane/antoine-poling' });
    expect(ideal).toContain('propane: Poling');
    expect(ideal).toContain('n-butane: ');
  });
});
