import { RandomStream } from './random';
import { Wander } from './wander';

/** What a tower shows at the end of a minute: K, Pa absolute, kg/s. */
export interface TowerState {
  readonly overheadTemperature: number;
  readonly overheadPressure: number;
  readonly pressureDrop: number;
  readonly trayTemperature: number;
  readonly traySetPoint: number;
  readonly reboilerTemperature: number;
  readonly drumTemperature: number;
  readonly refluxMass: number;
  readonly feedMass: number;
  readonly distillateMass: number;
  readonly bottomsMass: number;
}

/** Units tags are in, and how they are come by. */
const units = {
  '°C': (value: number) => value - 273.15,
  kPa: (value: number) => value / 1000,
  'kPa gauge': (value: number, barometer: number) => (value - barometer) / 1000,
  't/h': (value: number) => value * 3.6,
} as const;

export interface InstrumentSpec {
  readonly tag: string;
  readonly description: string;
  readonly measures: keyof TowerState;
  readonly unit: keyof typeof units;
  /** A set-point: exact, and holding until it is moved. */
  readonly isSetPoint?: boolean;
  /** First-order lag of the sensing element [s]. */
  readonly lagSeconds?: number;
  /** Noise: deviation in the tag's unit, or as a share of the reading, and how long it hangs together [min]. */
  readonly noise?: { readonly deviation: number; readonly minutes: number; readonly isShare?: boolean };
  /** Constant error, and how far that walks in a week (deviation), both in the tag's unit. */
  readonly offset?: { readonly start: number; readonly walkPerWeek: number };
  /** Where it is connected: constant difference to what it should measure, in the tag's unit. */
  readonly location?: number;
}

/** Digits after the point a value is stored with: far below every noise. */
const storedDigits = 1000;

/** One instrument: what it measures, made late, wrong and noisy. */
export class Instrument {
  reading = Number.NaN;
  readonly #noise: Wander;
  readonly #walk: RandomStream;
  #lagged = Number.NaN;
  #offset: number;

  constructor(
    readonly spec: InstrumentSpec,
    seed: number,
  ) {
    const { noise } = spec;
    this.#noise = new Wander(
      { deviation: noise?.deviation ?? 0, hours: (noise?.minutes ?? 1) / 60 },
      new RandomStream(seed, `${spec.tag} noise`),
    );
    this.#walk = new RandomStream(seed, `${spec.tag} walk`);
    this.#offset = spec.offset?.start ?? 0;
  }

  nextMinute(state: TowerState, barometer: number): number {
    const { spec } = this;
    const actual = units[spec.unit](state[spec.measures], barometer);
    if (spec.isSetPoint) return (this.reading = round(actual));
    const follows = spec.lagSeconds === undefined ? 1 : 1 - Math.exp(-60 / spec.lagSeconds);
    this.#lagged = Number.isNaN(this.#lagged) ? actual : this.#lagged + follows * (actual - this.#lagged);
    if (spec.offset) this.#offset += (spec.offset.walkPerWeek / Math.sqrt(7 * 1440)) * this.#walk.normal();
    const noise = this.#noise.nextMinute() * (spec.noise?.isShare ? actual : 1);
    return (this.reading = round(this.#lagged + (spec.location ?? 0) + this.#offset + noise));
  }
}

function round(value: number): number {
  return Math.round(value * storedDigits) / storedDigits;
}
