import { solveInPlace } from '../numerics/linear';
import type { Component } from './components';
import { EquilibriumError } from './errors';
import type { IdealMixture } from './ideal';
import { PengRobinson } from './peng-robinson';
import { saturate } from './saturation';
import { SaturationLine } from './saturation-line';

/** A feed split in two; a single phase has vapour fraction 0 or 1 and both `x` and `y` equal to the feed. */
export interface Split {
  readonly vapourFraction: number;
  readonly x: readonly number[];
  readonly y: readonly number[];
  readonly K: readonly number[];
}

/** Shares of the two phases; each with all its digits, however small it is. They sum to 1. */
export interface Shares {
  readonly vapour: number;
  readonly liquid: number;
}

/**
 * Rachford-Rice: the shares with Σ z(K−1)/(L + V K) = 0.
 *
 * The smaller share is the one solved for, since the other is then 1 minus it without loss.
 * @returns shares inside the open interval of all-positive phases; a negative one says which single phase it is
 * @source rachford1952
 */
export function rachfordRice(z: ArrayLike<number>, K: ArrayLike<number>): Shares {
  const vapour = shareOf(z, K);
  if (!(vapour > 0.5) || vapour === Infinity) return { vapour, liquid: 1 - vapour };
  const liquid = shareOf(
    z,
    Float64Array.from(K, (k) => 1 / k),
  );
  return { vapour: 1 - liquid, liquid };
}

/** The share β with Σ z(K−1)/(1+β(K−1)) = 0, by Newton inside a bracket; ±Infinity where every K lies on one side of 1. */
function shareOf(z: ArrayLike<number>, K: ArrayLike<number>): number {
  const n = z.length;
  let least = Infinity;
  let most = -Infinity;
  for (let i = 0; i < n; i++) {
    least = Math.min(least, K[i]!);
    most = Math.max(most, K[i]!);
  }
  if (least >= 1) return Infinity;
  if (most <= 1) return -Infinity;
  let low = 1 / (1 - most);
  let high = 1 / (1 - least);
  let beta = low < 0 && high > 0 ? 0 : (low + high) / 2;
  for (let step = 0; step < 300; step++) {
    let f = 0;
    let slope = 0;
    for (let i = 0; i < n; i++) {
      const part = (K[i]! - 1) / (1 + beta * (K[i]! - 1));
      f += z[i]! * part;
      slope -= z[i]! * part * part;
    }
    // The sum only falls as β rises.
    if (f > 0) low = beta;
    else high = beta;
    let next = beta - f / slope;
    if (Math.abs(next - beta) <= 4e-16 * Math.abs(next)) return next;
    if (!(next > low && next < high)) next = (low + high) / 2;
    if (high - low <= 4e-16 * Math.abs(next)) return next;
    beta = next;
  }
  return beta;
}

function split(z: readonly number[], K: readonly number[], { vapour, liquid }: Shares): Split {
  if (vapour <= 0) return { vapourFraction: 0, x: z, y: z, K };
  if (liquid <= 0) return { vapourFraction: 1, x: z, y: z, K };
  const x = z.map((zi, i) => zi / (liquid + vapour * K[i]!));
  return { vapourFraction: vapour, x, y: x.map((xi, i) => xi * K[i]!), K };
}

const onlyVapour: Shares = { vapour: 2, liquid: -1 };
const onlyLiquid: Shares = { vapour: -1, liquid: 2 };

export function flashIdeal(ideal: IdealMixture, z: readonly number[], T: number, P: number): Split {
  ideal.evaluate(T);
  const K = Array.from(ideal.logP, (lnP) => Math.exp(lnP) / P);
  return split(z, K, rachfordRice(z, K));
}

/**
 * Two-phase split by Peng-Robinson: bubble and dew pressure at T say whether there are two phases, then Newton on ln K
 * and the vapour fraction together. Where one of the lines does not reach T, successive substitution from Wilson's
 * K-values decides; its trivial end means one phase.
 */
export function flashPengRobinson(
  components: readonly Component[],
  z: readonly number[],
  T: number,
  P: number,
): Split {
  const pr = new PengRobinson(components.map((c) => c.id));
  const dew = saturate(new SaturationLine(components, z, 'vapour', pr), 'temperature', T);
  if (dew.kind === 'solved' && P <= Math.exp(dew.point[components.length + 1]!))
    return split(
      z,
      z.map(() => NaN),
      onlyVapour,
    );
  const bubble = saturate(new SaturationLine(components, z, 'liquid', pr), 'temperature', T);
  if (bubble.kind === 'solved' && P >= Math.exp(bubble.point[components.length + 1]!))
    return split(
      z,
      z.map(() => NaN),
      onlyLiquid,
    );
  const n = components.length;
  const guesses: number[][] = [];
  if (dew.kind === 'solved' && bubble.kind === 'solved') {
    const share = (Math.log(P) - dew.point[n + 1]!) / (bubble.point[n + 1]! - dew.point[n + 1]!);
    guesses.push(z.map((_, i) => dew.point[i]! + share * (bubble.point[i]! - dew.point[i]!)));
  }
  if (dew.kind === 'solved') guesses.push(z.map((_, i) => dew.point[i]!));
  guesses.push(
    components.map(
      (c) =>
        Math.log(c.criticalPressure / P) + 5.373 * (1 + c.acentricFactor) * (1 - c.criticalTemperature / T),
    ),
  );
  for (const lnK of guesses) {
    const solved = solveSplit(pr, z, T, P, lnK);
    if (solved && solved.vapourFraction > 0 && solved.vapourFraction < 1) return solved;
  }
  if (dew.kind === 'solved' && bubble.kind === 'solved')
    throw new EquilibriumError(
      'not-converged',
      'The split did not converge between this mixture’s dew and bubble pressures: successive substitution and Newton were tried.',
    );
  // One phase beyond both lines: a dense fluid is called by which side of its pseudo-critical temperature it lies on.
  const pseudoCritical = components.reduce((sum, c, i) => sum + z[i]! * c.criticalTemperature, 0);
  return split(
    z,
    z.map(() => NaN),
    T > pseudoCritical ? onlyVapour : onlyLiquid,
  );
}

function solveSplit(
  pr: PengRobinson,
  z: readonly number[],
  T: number,
  P: number,
  start: readonly number[],
): Split | undefined {
  const n = z.length;
  const lnK = Float64Array.from(start);
  const vapour = pr.newState(),
    liquid = pr.newState();
  const x = new Float64Array(n),
    y = new Float64Array(n);
  const fill = (beta: number) => {
    let sx = 0,
      sy = 0;
    for (let i = 0; i < n; i++) {
      const K = Math.exp(lnK[i]!);
      sx += x[i] = z[i]! / (1 + beta * (K - 1));
      sy += y[i] = x[i]! * K;
    }
    for (let i = 0; i < n; i++) {
      x[i]! /= sx;
      y[i]! /= sy;
    }
  };
  let beta = 0.5;
  for (let step = 0; step < 12; step++) {
    beta = rachfordRice(z, Float64Array.from(lnK, Math.exp)).vapour;
    if (!Number.isFinite(beta)) return undefined;
    fill(beta);
    pr.evaluate(T, P, x, 'liquid', liquid);
    pr.evaluate(T, P, y, 'vapour', vapour);
    for (let i = 0; i < n; i++) lnK[i] = liquid.lnPhi[i]! - vapour.lnPhi[i]!;
    if (!lnK.some((value) => Math.abs(value) > 1e-7)) return undefined;
  }
  beta = rachfordRice(z, Float64Array.from(lnK, Math.exp)).vapour;
  if (!Number.isFinite(beta)) return undefined;
  const m = n + 1;
  const J = new Float64Array(m * m),
    r = new Float64Array(m);
  for (let step = 0; step < 60; step++) {
    fill(beta);
    pr.evaluate(T, P, x, 'liquid', liquid, true);
    pr.evaluate(T, P, y, 'vapour', vapour, true);
    J.fill(0);
    r[n] = 0;
    for (let j = 0; j < n; j++) {
      const K = Math.exp(lnK[j]!);
      const D = 1 + beta * (K - 1);
      const xk = -(x[j]! * beta * K) / D,
        yk = (y[j]! * (1 - beta)) / D;
      const xb = -(x[j]! * (K - 1)) / D,
        yb = K * xb;
      for (let i = 0; i < n; i++) {
        const dv = vapour.dn[i * n + j]!,
          dl = liquid.dn[i * n + j]!;
        J[i * m + j] = dv * yk - dl * xk + (i === j ? 1 : 0);
        J[i * m + n]! += dv * yb - dl * xb;
      }
      J[n * m + j] = yk - xk;
      J[n * m + n]! += yb - xb;
      const raw = z[j]! / D;
      r[n] += raw * K - raw;
      r[j] = lnK[j]! + vapour.lnPhi[j]! - liquid.lnPhi[j]!;
    }
    if (!solveInPlace(J, r, m)) return undefined;
    let largest = 0;
    for (let i = 0; i < m; i++) largest = Math.max(largest, Math.abs(r[i]!));
    if (!Number.isFinite(largest)) return undefined;
    const factor = largest > 0.5 ? 0.5 / largest : 1;
    for (let i = 0; i < n; i++) lnK[i]! -= factor * r[i]!;
    beta -= factor * r[n];
    if (!lnK.some((value) => Math.abs(value) > 1e-7)) return undefined;
    if (largest < 1e-12) break;
    if (step === 59) return undefined;
  }
  const K = Array.from(lnK, Math.exp);
  return split(z, K, rachfordRice(z, K));
}
