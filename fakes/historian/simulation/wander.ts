import type { RandomStream } from './random';

/** How a quantity strays from its usual value. */
export interface WanderSpec {
  /** Standard deviation in the long run, jumps left out. */
  readonly deviation: number;
  /** Time in which it forgets where it was [h]. */
  readonly hours: number;
  /** Sudden steps: mean time between them [h] and their deviation; they fade like everything else. */
  readonly jumps?: { readonly everyHours: number; readonly deviation: number };
}

/** A mean-reverting random walk around zero, sampled exactly each minute, with an occasional step. */
export class Wander {
  value: number;
  readonly #keep: number;
  readonly #kick: number;

  constructor(
    private readonly spec: WanderSpec,
    private readonly random: RandomStream,
  ) {
    this.#keep = Math.exp(-1 / (60 * spec.hours));
    this.#kick = spec.deviation * Math.sqrt(1 - this.#keep ** 2);
    this.value = spec.deviation * random.normal();
  }

  /** The value one minute on. */
  nextMinute(): number {
    this.value = this.value * this.#keep + this.#kick * this.random.normal();
    const { jumps } = this.spec;
    if (jumps !== undefined && this.random.uniform() < 1 / (60 * jumps.everyHours))
      this.value += jumps.deviation * this.random.normal();
    return this.value;
  }
}
