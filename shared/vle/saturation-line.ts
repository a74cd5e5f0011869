import { solveInPlace } from '../numerics/linear';
import type { Component } from './components';
import { PengRobinson, type Phase, type PhaseState } from './peng-robinson';

/** A point of a saturation line: ln K of every component, ln T, ln P in one vector of length n + 2. */
export type LinePoint = Float64Array;

/**
 * The saturation line of one Peng-Robinson mixture: the feed is one phase (`feedPhase`), the other is incipient.
 *
 * Unknowns are ln K_i, ln T and ln P; equations are equality of fugacities, Σ(y − x) = 0, and one of the unknowns held
 * (Michelsen's continuation). Any of them may be held, so the line can be followed through its turning points and its
 * critical point.
 * @source michelsen1980
 */
export class SaturationLine {
  readonly n: number;
  readonly feed: Float64Array;
  readonly #pr: PengRobinson;
  readonly #feed: PhaseState;
  readonly #other: PhaseState;
  readonly #w: Float64Array;
  readonly #jacobian: Float64Array;
  readonly #residual: Float64Array;
  readonly #otherPhase: Phase;

  constructor(
    readonly components: readonly Component[],
    z: ArrayLike<number>,
    readonly feedPhase: Phase,
    pr = new PengRobinson(components.map((c) => c.id)),
  ) {
    const n = (this.n = components.length);
    this.feed = Float64Array.from(z);
    this.#pr = pr;
    this.#feed = pr.newState();
    this.#other = pr.newState();
    this.#w = new Float64Array(n);
    this.#jacobian = new Float64Array((n + 2) * (n + 2));
    this.#residual = new Float64Array(n + 2);
    this.#otherPhase = feedPhase === 'vapour' ? 'liquid' : 'vapour';
  }

  /** Incipient phase's unnormalised amounts: x = z/K below a vapour, y = zK above a liquid. */
  #fillIncipient(u: LinePoint): number {
    const sign = this.feedPhase === 'vapour' ? -1 : 1;
    let sum = 0;
    for (let i = 0; i < this.n; i++) sum += this.#w[i] = this.feed[i]! * Math.exp(sign * u[i]!);
    return sum;
  }

  /** Mole fractions of the incipient phase at a solved point. */
  incipient(u: LinePoint): number[] {
    const sum = this.#fillIncipient(u);
    return Array.from(this.#w, (w) => w / sum);
  }

  /**
   * Newton on all unknowns with `u[held] = value`.
   * @param longest step in ln K and ln P; a fifteenth of it in ln T
   * @returns number of iterations, or 0 when it did not converge; `u` is changed in place
   */
  solve(u: LinePoint, held: number, value: number, most = 60, longest = 3): number {
    const { n } = this;
    const m = n + 2;
    const J = this.#jacobian,
      r = this.#residual;
    for (let iteration = 1; iteration <= most; iteration++) {
      this.#fillSystem(u, held, value);
      let norm = 0;
      for (let i = 0; i < m; i++) norm = Math.max(norm, Math.abs(r[i]!));
      if (!Number.isFinite(norm)) return 0;
      if (!solveInPlace(J, r, m)) return 0;
      let largest = 0;
      for (let i = 0; i < m; i++) largest = Math.max(largest, Math.abs(r[i]!));
      if (!Number.isFinite(largest)) return 0;
      // Long steps are cut, those of the temperature most.
      let factor = 1;
      for (let i = 0; i < m; i++)
        factor = Math.min(factor, (i === n ? longest / 15 : longest) / Math.abs(r[i]!));
      for (let i = 0; i < m; i++) u[i]! -= factor * r[i]!;
      // Newton squares the error: after a step this small nothing but round-off is left, which near the critical point,
      // where the system is all but singular, is more than elsewhere.
      if (largest < 1e-13 || (largest < 1e-7 && norm < 1e-11)) return iteration;
    }
    return 0;
  }

  #fillSystem(u: LinePoint, held: number, value: number): void {
    const { n } = this;
    const m = n + 2;
    const J = this.#jacobian.fill(0),
      r = this.#residual;
    const T = Math.exp(u[n]!),
      P = Math.exp(u[n + 1]!);
    const sum = this.#fillIncipient(u);
    const w = this.#w;
    const sign = this.feedPhase === 'vapour' ? -1 : 1;
    for (let i = 0; i < n; i++) w[i]! /= sum;
    this.#pr.evaluate(T, P, this.feed, this.feedPhase, this.#feed);
    this.#pr.evaluate(T, P, w, this.#otherPhase, this.#other, true);
    // ln K + ln φ(y) − ln φ(x): the incipient phase is the liquid under a vapour feed, the vapour over a liquid feed.
    for (let i = 0; i < n; i++) {
      const other = this.#other,
        feed = this.#feed;
      r[i] = u[i]! + sign * (other.lnPhi[i]! - feed.lnPhi[i]!);
      for (let j = 0; j < n; j++) J[i * m + j] = sign * other.dn[i * n + j]! * w[j]! * sign;
      J[i * m + i]! += 1;
      J[i * m + n] = sign * T * (other.dT[i]! - feed.dT[i]!);
      J[i * m + n + 1] = sign * P * (other.dP[i]! - feed.dP[i]!);
    }
    r[n] = Math.log(sum);
    for (let j = 0; j < n; j++) J[n * m + j] = sign * w[j]!;
    r[n + 1] = u[held]! - value;
    J[(n + 1) * m + held] = 1;
  }

  /**
   * Whether the phases of a solved point are a vapour and a liquid: the vapour fills more than three times its co-volume
   * (the critical point of the equation lies at 3.95), and more than the liquid. Two liquids are no answer here.
   */
  isVapourOverLiquid(u: LinePoint): boolean {
    const [T, P] = [Math.exp(u[this.n]!), Math.exp(u[this.n + 1]!)];
    this.#pr.evaluate(T, P, this.feed, this.feedPhase, this.#feed);
    this.#pr.evaluate(T, P, this.incipient(u), this.#otherPhase, this.#other);
    const [vapour, liquid] =
      this.feedPhase === 'vapour' ? [this.#feed, this.#other] : [this.#other, this.#feed];
    return vapour.Z > 3 * vapour.B && vapour.Z / vapour.B > liquid.Z / liquid.B;
  }

  /** du/d(held) along the line at a solved point. */
  tangent(u: LinePoint, held: number): Float64Array | undefined {
    this.#fillSystem(u, held, u[held]!);
    const r = this.#residual.fill(0);
    r[this.n + 1] = 1;
    return solveInPlace(this.#jacobian, r, this.n + 2) ? Float64Array.from(r) : undefined;
  }
}
