import type { EquilibriumWarning } from './errors';
import { EquilibriumError } from './errors';
import { evaluateLogPressure, vapourPressureOf, type VapourPressure } from './vapour-pressure';

/** Lowest and highest temperature a saturation temperature is looked for at [K]. */
const coldest = 30;
const hottest = 1500;

/**
 * Raoult's law for one list of components: K_i = P_sat,i(T)/P.
 *
 * `evaluate` leaves ln P_sat and its slope in arrays that the next call reuses.
 */
export class IdealMixture {
  readonly n: number;
  readonly correlations: readonly VapourPressure[];
  /** ln(P_sat/Pa) and d ln P_sat/dT [1/K] at the temperature last evaluated. */
  readonly logP: Float64Array;
  readonly slope: Float64Array;
  /** Ranges stated for the rows in use, and above which temperature another row steps in. */
  readonly #low: Float64Array;
  readonly #high: Float64Array;

  constructor(ids: readonly string[], chosen: Readonly<Record<string, string>> = {}) {
    this.correlations = ids.map((id) => vapourPressureOf(id, chosen[id]));
    this.n = ids.length;
    this.logP = new Float64Array(this.n);
    this.slope = new Float64Array(this.n);
    this.#low = Float64Array.from(this.correlations, ({ row }) => row.low);
    this.#high = Float64Array.from(this.correlations, ({ row }) => row.high);
  }

  /** @throws EquilibriumError where a chosen correlation has no value at T */
  evaluate(T: number): void {
    const { logP, slope, correlations } = this;
    for (let i = 0; i < this.n; i++) {
      evaluateLogPressure(correlations[i]!.rowAt(T), T, logP, slope, i);
      if (Number.isNaN(logP[i]))
        throw new EquilibriumError(
          'no-two-phase-solution',
          `${correlations[i]!.row.id} has no value at ${T.toFixed(2)} K, above its critical temperature; leave the choice of correlation open.`,
        );
    }
  }

  /** ln of the saturation pressure of feed z at T, and its slope d ln P/dT: bubble Σ z P_sat, dew 1/Σ(z/P_sat). */
  #saturation(kind: 'bubble' | 'dew', z: ArrayLike<number>, T: number): { lnP: number; slope: number } {
    this.evaluate(T);
    const sign = kind === 'bubble' ? 1 : -1;
    // Scaled by the largest term, so that neither sum leaves the range of a double.
    let largest = -Infinity;
    for (let i = 0; i < this.n; i++) if (z[i]! > 0) largest = Math.max(largest, sign * this.logP[i]!);
    let sum = 0;
    let weighted = 0;
    for (let i = 0; i < this.n; i++) {
      const term = z[i]! * Math.exp(sign * this.logP[i]! - largest);
      sum += term;
      weighted += term * this.slope[i]!;
    }
    return { lnP: sign * (Math.log(sum) + largest), slope: weighted / sum };
  }

  saturationPressure(
    kind: 'bubble' | 'dew',
    z: ArrayLike<number>,
    T: number,
  ): { pressure: number; slope: number } {
    const { lnP, slope } = this.#saturation(kind, z, T);
    const pressure = Math.exp(lnP);
    return { pressure, slope: 1 / (slope * pressure) };
  }

  /** Newton on ln P in 1/T, which is nearly a straight line, kept inside a bracket that only shrinks. */
  saturationTemperature(
    kind: 'bubble' | 'dew',
    z: ArrayLike<number>,
    P: number,
    start: number,
  ): { temperature: number; slope: number } {
    const target = Math.log(P);
    let low = coldest;
    let high = this.#ceiling();
    let T = Math.min(Math.max(start, low), high);
    for (let step = 0; step < 200; step++) {
      const { lnP, slope } = this.#saturation(kind, z, T);
      const off = lnP - target;
      if (off > 0) high = Math.min(high, T);
      else low = Math.max(low, T);
      const inverse = 1 / T + off / (slope * T * T);
      let next = 1 / inverse;
      if (Math.abs(next - T) <= 4e-15 * T) return { temperature: T, slope: 1 / (slope * P) };
      if (!(next > low && next < high)) next = (low + high) / 2;
      if (high - low < 1e-12 * T) break;
      T = next;
    }
    const { lnP, slope } = this.#saturation(kind, z, T);
    if (Math.abs(lnP - target) < 1e-9) return { temperature: T, slope: 1 / (slope * P) };
    throw new EquilibriumError(
      'no-two-phase-solution',
      `No ${kind} point at ${(P / 1000).toPrecision(4)} kPa between ${low.toFixed(0)} and ${high.toFixed(0)} K with these vapour pressure correlations.`,
    );
  }

  /** Highest temperature at which every correlation in use has a value. */
  #ceiling(): number {
    return this.correlations.reduce((lowest, correlation) => Math.min(lowest, correlation.highest), hottest);
  }

  /** Correlations used outside the range their source states; the usual answer, none, is always the same array. */
  warnings(T: number): readonly EquilibriumWarning[] {
    let found: EquilibriumWarning[] | undefined;
    for (let i = 0; i < this.n; i++) {
      if (T >= this.#low[i]! && T <= this.#high[i]!) continue;
      const warning = this.correlations[i]!.warning(T);
      if (warning) (found ??= []).push(warning);
    }
    return found ?? noWarnings;
  }
}

const noWarnings: readonly EquilibriumWarning[] = [];
