import { describe, expect, it } from 'vitest';
import { bubblePoint, dewPoint, type Mixture } from '@shared/vle/equilibrium';
import { phaseEnvelope } from '@shared/vle/phase-envelope';
import { PengRobinson } from '@shared/vle/peng-robinson';

const mixtures: Mixture[] = [
  {
    method: 'peng-robinson',
    components: [
      { id: 'ethane', fraction: 0.012 },
      { id: 'propane', fraction: 0.966 },
      { id: 'isobutane', fraction: 0.014 },
      { id: 'n-butane', fraction: 0.008 },
    ],
  },
  {
    method: 'peng-robinson',
    components: [
      { id: 'ethane', fraction: 0.5 },
      { id: 'n-heptane', fraction: 0.5 },
    ],
  },
  {
    method: 'peng-robinson',
    components: [
      { id: 'methane', fraction: 0.7 },
      { id: 'n-butane', fraction: 0.3 },
    ],
  },
];

describe.each(mixtures)('the envelope of $components', (mixture) => {
  const envelope = phaseEnvelope(mixture);

  it('lies on the bubble and dew points solved one by one', () => {
    for (const point of envelope.bubble.slice(0, 8))
      expect(
        Math.abs(bubblePoint(mixture, { pressure: point.pressure }).temperature / point.temperature - 1),
      ).toBeLessThan(1e-9);
    for (const point of envelope.dew.slice(0, 8))
      expect(
        Math.abs(dewPoint(mixture, { pressure: point.pressure }).temperature / point.temperature - 1),
      ).toBeLessThan(1e-9);
  });

  it('meets the law of a critical point: d ln f is singular there (Heidemann and Khalil 1980, from memory)', () => {
    const { temperature, pressure } = envelope.critical!;
    const pr = new PengRobinson(mixture.components.map(({ id }) => id));
    const z = mixture.components.map(({ fraction }) => fraction);
    const smallest = (T: number) => {
      const state = pr.newState();
      pr.evaluate(T, pressure, z, 'vapour', state, true);
      return smallestEigenvalue(
        z.map((zi, i) =>
          z.map((zj, j) => Math.sqrt(zi * zj) * (state.dn[i * z.length + j]! + (i === j ? 1 / zi : 0) - 1)),
        ),
      );
    };
    // Away from the critical point the smallest eigenvalue of √(z_i z_j)·∂ ln f_i/∂n_j is some tenths.
    expect(Math.abs(smallest(temperature))).toBeLessThan(0.02);
    expect(smallest(1.15 * temperature)).toBeGreaterThan(0.05);
  });
});

/** Of a symmetric matrix whose other eigenvalue 0 belongs to √z (Gibbs–Duhem): that direction is lifted out of the way. */
function smallestEigenvalue(a: number[][]): number {
  const n = a.length;
  // Jacobi rotations.
  const m = a.map((row) => [...row]);
  for (let sweep = 0; sweep < 60; sweep++)
    for (let p = 0; p < n; p++)
      for (let q = p + 1; q < n; q++) {
        if (Math.abs(m[p]![q]!) < 1e-15) continue;
        const angle = 0.5 * Math.atan2(2 * m[p]![q]!, m[q]![q]! - m[p]![p]!);
        const [c, s] = [Math.cos(angle), Math.sin(angle)];
        for (let k = 0; k < n; k++) {
          const [x, y] = [m[k]![p]!, m[k]![q]!];
          m[k]![p] = c * x - s * y;
          m[k]![q] = s * x + c * y;
        }
        for (let k = 0; k < n; k++) {
          const [x, y] = [m[p]![k]!, m[q]![k]!];
          m[p]![k] = c * x - s * y;
          m[q]![k] = s * x + c * y;
        }
      }
  const values = m.map((row, i) => row[i]!).sort((x, y) => Math.abs(x) - Math.abs(y));
  // The first is Gibbs–Duhem's zero.
  return values[1]!;
}
