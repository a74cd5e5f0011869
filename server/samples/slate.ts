/**
 * A result's fractions in the order of a sensor's slate, summing to 1. What the slate does not have is left out: the
 * sensor's equilibrium does not know it.
 */
export function projectOnSlate(
  base: readonly { readonly id: string }[],
  fractions: readonly { readonly id: string; readonly fraction: number }[],
): number[] {
  const byId = new Map(fractions.map(({ id, fraction }) => [id, fraction]));
  const raw = base.map((part) => byId.get(part.id) ?? 0);
  const sum = raw.reduce((total, fraction) => total + fraction, 0);
  return raw.map((fraction) => fraction / sum);
}
