import { componentById } from '@shared/vle/components';
import type { Mixture } from '@shared/vle/equilibrium';
import { EquilibriumError } from '@shared/vle/errors';
import { attempt, type Outcome } from './desk-answer';
import { amountFault, typedNumber, type AmountBasis, type DeskCase } from './desk-case';
import { slateFault } from './slate-edits';

/** The mixture that a slate's amounts stand for, in mole fractions; refused in words while they stand for none. */
export function mixtureOf({
  rows,
  basis,
  method,
  correlations,
}: Pick<DeskCase, 'rows' | 'basis' | 'method' | 'correlations'>): Outcome<Mixture> {
  return attempt(() => {
    const faulty = rows.find(({ amount }) => amountFault(amount) !== undefined);
    if (faulty) throw notYet(`Correct the amount of ${componentById(faulty.id).name} first.`);
    const fault = slateFault(rows);
    if (fault !== undefined) throw notYet(fault);
    const moles = rows.map(({ id, amount }) => molesOf(id, typedNumber(amount) ?? 0, basis));
    const total = moles.reduce((sum, each) => sum + each, 0);
    return {
      method,
      correlations: method === 'ideal' ? correlations : undefined,
      components: rows.map(({ id }, i) => ({ id, fraction: (moles[i] ?? 0) / total })),
    };
  });
}

function molesOf(id: string, amount: number, basis: AmountBasis): number {
  const component = componentById(id);
  if (basis === 'mole' || amount === 0) return amount;
  if (basis === 'mass') return amount / component.molarMass;
  if (!component.liquidAt60F)
    throw notYet(
      `${component.name} is no liquid at 60 °F, so it has no liquid volume: give amounts in mol % or mass %.`,
    );
  return amount * component.liquidAt60F.density;
}

function notYet(words: string): EquilibriumError {
  return new EquilibriumError('not-a-composition', words);
}
