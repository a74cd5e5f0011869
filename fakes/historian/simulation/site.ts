import { MinuteTable } from './minute-table';
import { TowerSimulation } from './tower';
import type { TowerSpec } from './tower-spec';
import { Weather } from './weather';

export const minute = 60_000;

/** Minutes simulated before the first one kept, so that a tower begins in the middle of its life. */
const runningIn = 2 * 1440;

/** Where samples are drawn. */
export const samplePoints = ['overhead', 'rundown', 'bottoms'] as const;
export type SamplePoint = (typeof samplePoints)[number];

/** What was read and what was true on one tower, by minute. */
export interface TowerRecord {
  readonly spec: TowerSpec;
  /** One column an instrument, in the order of the spec. */
  readonly readings: MinuteTable;
  /** Mole fractions: one column a component, for each sample point in turn. */
  readonly truth: MinuteTable;
}

/**
 * All towers of the site under one weather, from `startAt` on. The same seed and start give the same bits for the same
 * minutes, whether simulated in one go or minute by minute.
 */
export class SiteSimulation {
  readonly startAt: number;
  readonly seed: number;
  readonly records: readonly TowerRecord[];
  readonly weather: Weather;
  readonly towers: readonly TowerSimulation[];
  /** The minute the towers have reached [UTC ms]. */
  #reached: number;

  /** @param startAt time of the first value [UTC ms], a whole minute */
  constructor(towers: readonly TowerSpec[], seed: number, startAt: number) {
    if (startAt % minute !== 0)
      throw new RangeError(`the simulation starts on a whole minute, not at ${startAt}`);
    this.startAt = startAt;
    this.seed = seed;
    this.weather = new Weather(seed);
    this.towers = towers.map((spec) => new TowerSimulation(spec, seed));
    this.records = towers.map((spec) => ({
      spec,
      readings: new MinuteTable(spec.instruments.length),
      truth: new MinuteTable(spec.components.length * samplePoints.length),
    }));
    this.#reached = startAt - runningIn * minute;
  }

  /** Last minute recorded [UTC ms]; before the first call of `advanceTo` that of the running-in. */
  get reached(): number {
    return this.#reached;
  }

  /** Simulates up to the last whole minute that is not after `now` [UTC ms]. */
  advanceTo(now: number): void {
    while (this.#reached + minute <= now) {
      this.weather.nextMinute(this.#reached);
      this.#reached += minute;
      const isKept = this.#reached >= this.startAt;
      this.towers.forEach((tower, i) => {
        tower.nextMinute(this.weather);
        if (isKept) this.#keep(tower, this.records[i]!);
      });
    }
  }

  /** The row of a time in the records, counted from 0 at `startAt`; whole only on whole minutes. */
  rowOf(t: number): number {
    return (t - this.startAt) / minute;
  }

  /** Largest difference between what went into a tower and what came out or stayed, relative to what went in. */
  worstImbalance(): number {
    return Math.max(...this.towers.map((tower) => tower.worstImbalance()));
  }

  #keep(tower: TowerSimulation, { readings, truth }: TowerRecord): void {
    readings.append((set) =>
      tower.instruments.forEach((instrument, column) => set(column, instrument.reading)),
    );
    truth.append((set) => {
      const n = tower.overhead.length;
      samplePoints.forEach((point, p) => tower[point].forEach((fraction, i) => set(p * n + i, fraction)));
    });
  }
}
