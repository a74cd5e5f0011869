import { componentById } from '../vle/components';
import { bubblePoint, dewPoint } from '../vle/equilibrium';
import { EquilibriumError } from '../vle/errors';
import { PengRobinson } from '../vle/peng-robinson';
import { saturate } from '../vle/saturation';
import { SaturationLine } from '../vle/saturation-line';
import { checkedState, compositionAt, type Inference, type InferenceModel, type Slate } from './inference';

/** Step of the central differences in h and in a base fraction; the solver itself is good to 1e-13. */
const difference = 1e-6;

/**
 * Inference with Peng-Robinson: the h whose saturation pressure at T is P, by Newton on ln P inside a bracket.
 * Sensitivities follow from the same function: ∂h/∂T = −(∂ln P/∂T)/(∂ln P/∂h), and so on.
 */
export function pengRobinsonInference(model: InferenceModel, slate: Slate): Inference {
  const components = slate.ids.map(componentById);
  const pr = new PengRobinson(slate.ids);
  const feed = model.relation === 'dew' ? 'vapour' : 'liquid';
  const point = model.relation === 'dew' ? dewPoint : bubblePoint;

  /** ln of the saturation pressure of a composition at T, and its slope d ln P/dT. */
  const saturation = (
    composition: ArrayLike<number>,
    T: number,
  ): { lnP: number; slope: number } | undefined => {
    const line = new SaturationLine(components, composition, feed, pr);
    const outcome = saturate(line, 'temperature', T);
    if (outcome.kind !== 'solved') return undefined;
    const tangent = line.tangent(outcome.point, line.n);
    return tangent && { lnP: outcome.point[line.n + 1]!, slope: tangent[line.n + 1]! / T };
  };

  return {
    model,
    infer(T, P) {
      checkedState(T, P);
      const lnP = Math.log(P);
      const off = (h: number) => {
        const there = saturation(compositionAt(slate, h), T);
        return there && there.lnP - lnP;
      };
      const { h, clamped } = solveFraction(off);
      const inside = Math.min(1 - 2 * difference, Math.max(2 * difference, h));
      const at = saturation(compositionAt(slate, h), T);
      const up = off(inside + difference),
        down = off(inside - difference);
      if (!at || up === undefined || down === undefined) throw beyondLine(T, P);
      const byH = (up - down) / (2 * difference);
      const composition = compositionAt(slate, h);
      const base = slate.ids.map((_, i) => -byShare(i, h) / byH);
      /** ∂ln P/∂z_i of the base: one component's share of its group grows at the cost of the others'. */
      function byShare(i: number, at: number): number {
        const inferredGroup = slate.inferred[i]!;
        const sum = inferredGroup ? slate.sums.inferred : slate.sums.other;
        const groupFraction = inferredGroup ? at : 1 - at;
        if (groupFraction === 0) return 0;
        const shifted = (step: number) => {
          const moved = composition.map((fraction, j) =>
            slate.inferred[j] === inferredGroup
              ? (fraction + (j === i ? (groupFraction * step) / sum : 0)) / (1 + step / sum)
              : fraction,
          );
          return saturation(moved, T)?.lnP ?? NaN;
        };
        return (
          (shifted(difference) - shifted(-Math.min(difference, (composition[i]! * sum) / groupFraction))) /
          (difference + Math.min(difference, (composition[i]! * sum) / groupFraction))
        );
      }
      return {
        groupFraction: h,
        composition,
        sensitivity: { temperature: -at.slope / byH, pressure: 1 / (P * byH), base },
        clamped,
        warnings: [],
      };
    },
    compositionAt: (h) => compositionAt(slate, h),
    equilibriumTemperature(composition, P) {
      const parts = slate.ids.map((id, i) => ({ id, fraction: composition[i]! }));
      const { temperature, slope } = point({ method: 'peng-robinson', components: parts }, { pressure: P });
      return { temperature, slope };
    },
  };
}

/** Root of a monotone function on 0…1 by the Illinois rule; clamped to the nearer end where it has none. */
function solveFraction(off: (h: number) => number | undefined): { h: number; clamped: boolean } {
  let low = 0,
    high = 1;
  let fLow = off(low),
    fHigh = off(high);
  // One end may have no saturation point at T (a light group above its critical temperature): draw it in.
  for (let tries = 0; tries < 8 && fLow === undefined; tries++) fLow = off((low += (high - low) / 4));
  for (let tries = 0; tries < 8 && fHigh === undefined; tries++) fHigh = off((high -= (high - low) / 4));
  if (fLow === undefined || fHigh === undefined)
    throw new EquilibriumError(
      'no-two-phase-solution',
      'No composition of this slate has a saturation point at this temperature.',
    );
  if (fLow === 0) return { h: low, clamped: false };
  if (fLow * fHigh > 0) return { h: Math.abs(fLow) < Math.abs(fHigh) ? low : high, clamped: true };
  let side = 0;
  for (let step = 0; step < 100; step++) {
    const h = (low * fHigh - high * fLow) / (fHigh - fLow);
    const f = off(h);
    if (f === undefined)
      throw new EquilibriumError(
        'not-converged',
        'The saturation line could not be followed between the ends of the slate.',
      );
    if (Math.abs(f) < 1e-13 || high - low < 1e-15) return { h, clamped: false };
    if (f * fHigh > 0) {
      high = h;
      fHigh = f;
      if (side === -1) fLow /= 2;
      side = -1;
    } else {
      low = h;
      fLow = f;
      if (side === 1) fHigh /= 2;
      side = 1;
    }
  }
  return { h: (low * fHigh - high * fLow) / (fHigh - fLow), clamped: false };
}

function beyondLine(T: number, P: number): EquilibriumError {
  return new EquilibriumError(
    'no-two-phase-solution',
    `No composition of this slate is at its saturation point at ${T.toFixed(2)} K and ${(P / 1000).toPrecision(4)} kPa.`,
  );
}
