import type { GroupedComponent } from '../inference/inference';

/** Shape errors that the set-up's own figure counts for, when a sensor's samples are still few. */
const priorWeight = 5;

/** How many of the latest shape errors speak. */
const remembered = 20;

/**
 * The slate after a sample: its fractions, each group keeping the proportions it had where the result has none of it.
 *
 * @param composition mole fractions in the order of the base, summing to 1
 */
export function rebase(
  base: readonly GroupedComponent[],
  composition: readonly number[],
): GroupedComponent[] {
  const sumOf = (group: 'light' | 'heavy', fractions: readonly number[]) =>
    base.reduce((sum, part, i) => sum + (part.group === group ? fractions[i]! : 0), 0);
  const was = base.map((part) => part.fraction);
  // A group the laboratory did not find keeps a trace, so that its proportions stay defined.
  const trace = 1e-6;
  const raw = base.map((part, i) =>
    sumOf(part.group, composition) > 0 ? composition[i]! : (trace * was[i]!) / sumOf(part.group, was),
  );
  const sum = raw.reduce((total, fraction) => total + fraction, 0);
  return base.map((part, i) => ({ ...part, fraction: raw[i]! / sum }));
}

/**
 * Scatter of h caused by the changing proportions inside the groups, as a share of h: the root mean square of the latest
 * shape errors, with the set-up's figure counted as a few of them.
 */
export function shapeScatter(errors: readonly number[], setUp: number): number {
  const latest = errors.slice(-remembered);
  const sum = latest.reduce((total, error) => total + error * error, priorWeight * setUp * setUp);
  return Math.sqrt(sum / (latest.length + priorWeight));
}
