import { componentById } from './components';
import { interactionRows } from './data/interaction-rows';

/** Molar gas constant [J/(mol K)], exact since 2019 (SI). */
export const gasConstant = 8.31446261815324;
/** Ω_a and Ω_b of Peng and Robinson at full precision (the rounded 0.45724 and 0.07780 move a dew temperature by 5 mK). */
const omegaA = 0.45723552892138;
const omegaB = 0.07779607390388846;
const delta1 = 1 + Math.SQRT2;
const delta2 = 1 - Math.SQRT2;

const interactions = new Map(
  interactionRows.flatMap(
    ([a, b, k]) =>
      [
        [`${a} ${b}`, k],
        [`${b} ${a}`, k],
      ] as const,
  ),
);

/** Published k_ij, zero where none is. */
export function interaction(a: string, b: string): number {
  return interactions.get(`${a} ${b}`) ?? 0;
}

export type Phase = 'liquid' | 'vapour';

/** ln φ of every component in one phase, with its slopes; arrays are reused by the next call on the same object. */
export interface PhaseState {
  /** Compressibility factor of the root taken, and the dimensionless co-volume bP/RT. */
  Z: number;
  B: number;
  readonly lnPhi: Float64Array;
  /** ∂ ln φ/∂T [1/K], ∂ ln φ/∂P [1/Pa]. */
  readonly dT: Float64Array;
  readonly dP: Float64Array;
  /** ∂ ln φ_i/∂n_j at Σn = 1, row by row. */
  readonly dn: Float64Array;
}

/**
 * Peng-Robinson equation of state with van der Waals one-fluid mixing.
 *
 * √α = 1 + κ(1 − √(T/Tc)), κ = 0.37464 + 1.54226 ω − 0.26992 ω² (the 1976 form for every component).
 * @source peng1976
 */
export class PengRobinson {
  readonly n: number;
  readonly #rootAc: Float64Array;
  readonly #kappa: Float64Array;
  readonly #tc: Float64Array;
  readonly #b: Float64Array;
  /** 1 − k_ij, row by row. */
  readonly #mix: Float64Array;
  // Functions of temperature, kept for the temperature they were made at.
  #temperature = NaN;
  readonly #root: Float64Array;
  readonly #rootSlope: Float64Array;
  readonly #aij: Float64Array;
  readonly #aijSlope: Float64Array;
  readonly #sum: Float64Array;
  readonly #sumSlope: Float64Array;
  readonly #q: Float64Array;

  constructor(ids: readonly string[]) {
    const parts = ids.map(componentById);
    const n = (this.n = ids.length);
    this.#tc = Float64Array.from(parts, (c) => c.criticalTemperature);
    this.#rootAc = Float64Array.from(
      parts,
      (c) => (Math.sqrt(omegaA) * gasConstant * c.criticalTemperature) / Math.sqrt(c.criticalPressure),
    );
    this.#kappa = Float64Array.from(
      parts,
      ({ acentricFactor: w }) => 0.37464 + 1.54226 * w - 0.26992 * w * w,
    );
    this.#b = Float64Array.from(
      parts,
      (c) => (omegaB * gasConstant * c.criticalTemperature) / c.criticalPressure,
    );
    this.#mix = new Float64Array(n * n);
    for (let i = 0; i < n; i++)
      for (let j = 0; j < n; j++) this.#mix[i * n + j] = 1 - (i === j ? 0 : interaction(ids[i]!, ids[j]!));
    this.#root = new Float64Array(n);
    this.#rootSlope = new Float64Array(n);
    this.#aij = new Float64Array(n * n);
    this.#aijSlope = new Float64Array(n * n);
    this.#sum = new Float64Array(n);
    this.#sumSlope = new Float64Array(n);
    this.#q = new Float64Array(n);
  }

  newState(): PhaseState {
    const { n } = this;
    return {
      Z: NaN,
      B: NaN,
      lnPhi: new Float64Array(n),
      dT: new Float64Array(n),
      dP: new Float64Array(n),
      dn: new Float64Array(n * n),
    };
  }

  #atTemperature(T: number): void {
    if (T === this.#temperature) return;
    const { n } = this;
    const root = this.#root,
      slope = this.#rootSlope;
    for (let i = 0; i < n; i++) {
      const m = this.#kappa[i]!,
        ra = this.#rootAc[i]!,
        tr = Math.sqrt(T / this.#tc[i]!);
      root[i] = ra * (1 + m * (1 - tr));
      slope[i] = (-ra * m * tr) / (2 * T);
    }
    for (let i = 0; i < n; i++)
      for (let j = 0; j < n; j++) {
        const k = this.#mix[i * n + j]!;
        this.#aij[i * n + j] = k * root[i]! * root[j]!;
        this.#aijSlope[i * n + j] = k * (slope[i]! * root[j]! + root[i]! * slope[j]!);
      }
    this.#temperature = T;
  }

  /** Evaluates one phase at T [K], P [Pa] and mole fractions w (their sum is taken as 1). */
  evaluate(
    T: number,
    P: number,
    w: ArrayLike<number>,
    phase: Phase,
    out: PhaseState,
    withCompositionSlopes = false,
  ): void {
    this.#atTemperature(T);
    const { n } = this;
    const S = this.#sum,
      dS = this.#sumSlope,
      q = this.#q,
      bi = this.#b;
    let a = 0,
      da = 0,
      b = 0;
    for (let i = 0; i < n; i++) {
      let s = 0,
        ds = 0;
      for (let j = 0; j < n; j++) {
        s += w[j]! * this.#aij[i * n + j]!;
        ds += w[j]! * this.#aijSlope[i * n + j]!;
      }
      S[i] = s;
      dS[i] = ds;
      a += w[i]! * s;
      da += w[i]! * ds;
      b += w[i]! * bi[i]!;
    }
    const RT = gasConstant * T;
    const A = (a * P) / (RT * RT),
      B = (b * P) / RT;
    const Z = cubicRoot(A, B, phase);
    out.Z = Z;
    out.B = B;
    const FZ = 3 * Z * Z - 2 * (1 - B) * Z + (A - 3 * B * B - 2 * B);
    const FA = Z - B;
    const FB = Z * Z - (6 * B + 2) * Z - A + 2 * B + 3 * B * B;
    const u = Z + delta1 * B,
      v = Z + delta2 * B;
    const L = Math.log(u / v);
    const c = A / (B * 2 * Math.SQRT2);
    const lnZB = Math.log(Z - B);
    const AT = A * (da / a - 2 / T),
      BT = -B / T;
    const ZT = -(FA * AT + FB * BT) / FZ;
    const ZP = -(FA * A + FB * B) / (FZ * P);
    const BP = B / P;
    const LT = (ZT + delta1 * BT) / u - (ZT + delta2 * BT) / v;
    const LP = (ZP + delta1 * BP) / u - (ZP + delta2 * BP) / v;
    const cT = c * (da / a - 1 / T);
    for (let i = 0; i < n; i++) {
      const r = bi[i]! / b;
      const qi = (2 * S[i]!) / a - r;
      q[i] = qi;
      out.lnPhi[i] = r * (Z - 1) - lnZB - c * qi * L;
      const qT = (2 * dS[i]!) / a - (2 * S[i]! * da) / (a * a);
      out.dT[i] = r * ZT - (ZT - BT) / (Z - B) - cT * qi * L - c * qT * L - c * qi * LT;
      out.dP[i] = r * ZP - (ZP - BP) / (Z - B) - c * qi * LP;
    }
    if (!withCompositionSlopes) return;
    for (let j = 0; j < n; j++) {
      const rj = bi[j]! / b;
      const Bj = B * rj,
        Aj = (A * 2 * S[j]!) / a;
      const Zj = -(FA * Aj + FB * Bj) / FZ;
      const Lj = (Zj + delta1 * Bj) / u - (Zj + delta2 * Bj) / v;
      const cj = c * q[j]!;
      for (let i = 0; i < n; i++) {
        const r = bi[i]! / b;
        const qij = (2 * this.#aij[i * n + j]!) / a - (4 * S[i]! * S[j]!) / (a * a) + r * rj;
        out.dn[i * n + j] =
          -r * rj * (Z - 1) + r * Zj - (Zj - Bj) / (Z - B) - cj * q[i]! * L - c * qij * L - c * q[i]! * Lj;
      }
    }
    // From free fractions to mole numbers at Σn = 1: adding j also thins every other component.
    for (let i = 0; i < n; i++) {
      let mean = 0;
      for (let k = 0; k < n; k++) mean += w[k]! * out.dn[i * n + k]!;
      for (let j = 0; j < n; j++) out.dn[i * n + j]! -= mean;
    }
  }
}

/**
 * Root of Z³ − (1−B)Z² + (A−3B²−2B)Z − (AB−B²−B³) = 0: the smallest above B for a liquid, the largest for a vapour.
 * Cardano's root is polished by Newton, which brings the last digits back.
 */
export function cubicRoot(A: number, B: number, phase: Phase): number {
  const c2 = B - 1,
    c1 = A - 3 * B * B - 2 * B,
    c0 = -(A * B - B * B - B * B * B);
  const p = c1 - (c2 * c2) / 3;
  const q = (2 * c2 * c2 * c2) / 27 - (c2 * c1) / 3 + c0;
  const shift = -c2 / 3;
  const discriminant = (q * q) / 4 + (p * p * p) / 27;
  let Z: number;
  if (discriminant > 0) {
    const root = Math.sqrt(discriminant);
    // The larger cube root first: the other follows from their product without cancellation.
    const first = Math.cbrt(q > 0 ? -q / 2 - root : -q / 2 + root);
    Z = shift + first - (first === 0 ? 0 : p / (3 * first));
  } else {
    const r = Math.sqrt(-p / 3);
    const angle = Math.acos(Math.max(-1, Math.min(1, r === 0 ? 0 : -q / (2 * r * r * r)))) / 3;
    const largest = shift + 2 * r * Math.cos(angle);
    const smallest = shift + 2 * r * Math.cos(angle + (2 * Math.PI) / 3);
    Z = phase === 'vapour' || smallest <= B ? largest : smallest;
  }
  for (let step = 0; step < 3; step++) {
    const f = ((Z + c2) * Z + c1) * Z + c0;
    const d = (3 * Z + 2 * c2) * Z + c1;
    if (d === 0) break;
    const next = Z - f / d;
    if (!(next > B)) break;
    if (next === Z) break;
    Z = next;
  }
  return Z;
}
