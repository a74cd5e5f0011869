import {
  liquidInteractions,
  type SimulatedComponent,
  simulatedComponents,
  type SimulatedComponentId,
} from './components';

const gasConstant = 8.314462618;

/**
 * K-values of the simulated plant, on purpose not those of the estimator: vapour pressures by Lee and Kesler with a
 * perturbed factor, liquid activities by the two-suffix Margules equation, vapour fugacities by the virial equation cut
 * after its second coefficient (Pitzer's correlation in Abbott's form), and the Poynting factor:
 *
 *   ln K_i = ln γ_i(x) + ln P_i^s + ln φ_i^s(T, P_i^s) + v_i (P − P_i^s)/RT − ln φ̂_i(T, P, y) − ln P
 *
 * Above its critical temperature a component's vapour pressure is the same formula extrapolated; ethane is there
 * everywhere in the tower, and φ^s keeps its liquid fugacity of the right size.
 *
 * An instance keeps its work space, so that a call allocates nothing: results are read from `lnK`, `K` and `slope`.
 *
 * @source Lee and Kesler, AIChE J. 21 (1975) 510 (coefficients from memory); Smith, Van Ness and Abbott, Introduction to
 * Chemical Engineering Thermodynamics, 7th ed. 2005 (Abbott's form and the combining rules from memory)
 */
export class SimulatedEquilibrium {
  readonly components: readonly SimulatedComponent[];
  /** Results of the last call: K [-], ln K, and ∂ln K/∂T at constant compositions [1/K]. */
  readonly K: Float64Array;
  readonly lnK: Float64Array;
  readonly slope: Float64Array;

  /** ln P^s = a + b/T + c ln T + d T⁶, T in K and P in Pa, per component. */
  readonly #vapourPressure: Float64Array;
  /** B_ij = p + q T^-1.6 + r T^-4.2 [m³/mol] and Margules' A_ij [-], for each pair j ≥ i in turn. */
  readonly #virial: Float64Array;
  readonly #margules: Float64Array;
  readonly #liquidVolume: Float64Array;
  // Work space of `evaluate`, per component: normalised compositions, B_ii, Σ y_j B_ij, Σ A_ij x_j and slopes.
  readonly #x: Float64Array;
  readonly #y: Float64Array;
  readonly #ownB: Float64Array;
  readonly #ownBSlope: Float64Array;
  readonly #crossB: Float64Array;
  readonly #crossBSlope: Float64Array;
  readonly #activity: Float64Array;

  constructor(ids: readonly SimulatedComponentId[], vapourInteractionPerCarbon: number) {
    const components = ids.map((id): SimulatedComponent => simulatedComponents[id]);
    const n = components.length;
    this.components = components;
    this.K = new Float64Array(n);
    this.lnK = new Float64Array(n);
    this.slope = new Float64Array(n);
    this.#vapourPressure = Float64Array.from(components.flatMap(leeKesler));
    this.#liquidVolume = Float64Array.from(components, (component) => component.liquidVolume);
    const pairs = components.flatMap((first, i) =>
      components.slice(i).map((second) => [first, second] as const),
    );
    this.#virial = Float64Array.from(
      pairs.flatMap(([first, second]) => pitzerAbbott(first, second, vapourInteractionPerCarbon)),
    );
    this.#margules = Float64Array.from(pairs, ([first, second]) => liquidInteraction(first.id, second.id));
    this.#x = new Float64Array(n);
    this.#y = new Float64Array(n);
    this.#ownB = new Float64Array(n);
    this.#ownBSlope = new Float64Array(n);
    this.#crossB = new Float64Array(n);
    this.#crossBSlope = new Float64Array(n);
    this.#activity = new Float64Array(n);
  }

  /** Vapour pressure of one component [Pa] at T [K]. */
  vapourPressure(index: number, T: number): number {
    const c = this.#vapourPressure;
    const at = index * 4;
    return Math.exp(c[at]! + c[at + 1]! / T + c[at + 2]! * Math.log(T) + c[at + 3]! * T ** 6);
  }

  /**
   * K-values at T [K], P [Pa], for a liquid x and a vapour y; both are read from `offset` on, need not sum to 1 and are
   * taken in proportion.
   */
  evaluate(T: number, P: number, x: Float64Array, xOffset: number, y: Float64Array, yOffset: number): void {
    const n = this.components.length;
    const xs = this.#x;
    const ys = this.#y;
    const virial = this.#virial;
    const margules = this.#margules;
    const crossB = this.#crossB;
    const crossBSlope = this.#crossBSlope;
    const activity = this.#activity;
    const ownB = this.#ownB;
    const ownBSlope = this.#ownBSlope;
    const lnT = Math.log(T);
    const lnP = Math.log(P);
    const T5 = T * T * T * T * T;
    const t16 = Math.exp(-1.6 * lnT);
    const t42 = Math.exp(-4.2 * lnT);
    const t16Slope = (-1.6 * t16) / T;
    const t42Slope = (-4.2 * t42) / T;
    let perX = 0;
    let perY = 0;
    for (let i = 0; i < n; i++) {
      perX += x[xOffset + i]!;
      perY += y[yOffset + i]!;
    }
    perX = 1 / perX;
    perY = 1 / perY;
    for (let i = 0; i < n; i++) {
      xs[i] = x[xOffset + i]! * perX;
      ys[i] = y[yOffset + i]! * perY;
      crossB[i] = 0;
      crossBSlope[i] = 0;
      activity[i] = 0;
    }
    let pair = 0;
    for (let i = 0; i < n; i++) {
      const xi = xs[i]!;
      const yi = ys[i]!;
      for (let j = i; j < n; j++, pair++) {
        const q = virial[pair * 3 + 1]!;
        const r = virial[pair * 3 + 2]!;
        const B = virial[pair * 3]! + q * t16 + r * t42;
        const BSlope = q * t16Slope + r * t42Slope;
        crossB[i]! += ys[j]! * B;
        crossBSlope[i]! += ys[j]! * BSlope;
        if (j === i) {
          ownB[i] = B;
          ownBSlope[i] = BSlope;
          continue;
        }
        const A = margules[pair]!;
        crossB[j]! += yi * B;
        crossBSlope[j]! += yi * BSlope;
        activity[i]! += A * xs[j]!;
        activity[j]! += A * xi;
      }
    }
    let mixtureB = 0;
    let mixtureBSlope = 0;
    let excess = 0;
    for (let i = 0; i < n; i++) {
      mixtureB += ys[i]! * crossB[i]!;
      mixtureBSlope += ys[i]! * crossBSlope[i]!;
      excess += 0.5 * xs[i]! * activity[i]!;
    }

    const c = this.#vapourPressure;
    const volumes = this.#liquidVolume;
    const { K, lnK, slope } = this;
    const perT = 1 / T;
    const perRT = perT / gasConstant;
    for (let i = 0, at = 0; i < n; i++, at += 4) {
      const lnPs = c[at]! + c[at + 1]! * perT + c[at + 2]! * lnT + c[at + 3]! * T5 * T;
      const lnPsSlope = (c[at + 2]! - c[at + 1]! * perT) * perT + 6 * c[at + 3]! * T5;
      const Ps = Math.exp(lnPs);
      const volume = volumes[i]!;
      // (B − v) Ps: fugacity of the saturated vapour, less the part of Poynting's factor that holds its pressure.
      const saturated = (ownB[i]! - volume) * Ps;
      const departures = saturated + (volume - 2 * crossB[i]! + mixtureB) * P;
      const value = activity[i]! - excess + lnPs + departures * perRT - lnP;
      lnK[i] = value;
      K[i] = Math.exp(value);
      slope[i] =
        lnPsSlope +
        (ownBSlope[i]! * Ps +
          saturated * lnPsSlope -
          (2 * crossBSlope[i]! - mixtureBSlope) * P -
          departures * perT) *
          perRT;
    }
  }
}

/** Coefficients a, b, c, d of ln P^s = a + b/T + c ln T + d T⁶ for Lee and Kesler's equation. */
function leeKesler({ tcK, pcPa, omega, vapourPressureFactor }: SimulatedComponent): number[] {
  const c = 1.28862 + 13.4721 * omega;
  return [
    5.92714 + 15.2518 * omega + c * Math.log(tcK) + Math.log(pcPa * vapourPressureFactor),
    -(6.09648 + 15.6875 * omega) * tcK,
    -c,
    (0.169347 + 0.43577 * omega) / tcK ** 6,
  ];
}

/** Coefficients p, q, r of B = p + q T^-1.6 + r T^-4.2 [m³/mol] for a pair, with the usual combining rules. */
function pitzerAbbott(first: SimulatedComponent, second: SimulatedComponent, perCarbon: number): number[] {
  const carbons = ({ molarMass }: SimulatedComponent) => Math.round((molarMass - 2.01588) / 14.02658);
  const interaction = perCarbon * Math.abs(carbons(first) - carbons(second));
  const compressibility = ({ omega }: SimulatedComponent) => 0.291 - 0.08 * omega;
  const volume = (one: SimulatedComponent) => (compressibility(one) * gasConstant * one.tcK) / one.pcPa;
  const omega = (first.omega + second.omega) / 2;
  const tc = Math.sqrt(first.tcK * second.tcK) * (1 - interaction);
  const vc = ((Math.cbrt(volume(first)) + Math.cbrt(volume(second))) / 2) ** 3;
  // R Tc/Pc of the pair, by its Zc = Pc Vc/(R Tc).
  const scale = vc / ((compressibility(first) + compressibility(second)) / 2);
  return [scale * (0.083 + 0.139 * omega), -scale * 0.422 * tc ** 1.6, -scale * 0.172 * omega * tc ** 4.2];
}

function liquidInteraction(first: string, second: string): number {
  const found = liquidInteractions.find(
    ([a, b]) => (a === first && b === second) || (a === second && b === first),
  );
  return found?.[2] ?? 0;
}
