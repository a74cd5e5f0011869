import { type HistorianTag, type HistorianValue, statusCodes } from '@shared/api/historian';
import { minute, type SiteSimulation, type TowerRecord } from './simulation/site';

/** Some values of one tag, oldest first. */
export interface Stretch {
  readonly t: number[];
  readonly value: (number | null)[];
  readonly status: number[];
  /** Time to read on from, null when the interval is at its end. */
  readonly next: number | null;
}

/** Where a tag's values come from. */
interface TagSource {
  readonly tag: HistorianTag;
  /** @param now nothing later is given [UTC ms] */
  latest(now: number): Omit<HistorianValue, 'tag'>;
  stretch(from: number, to: number, limit: number, now: number): Stretch;
  write?(value: HistorianValue): void;
}

/**
 * The tags of the historian and their values: those of the simulated instruments, and those that others write.
 *
 * Between `SiteSimulation`, which knows what instruments read, and the answers, which come from here, is the place where
 * a fault would change, hide or delay values.
 */
export class Archive {
  readonly #sources: ReadonlyMap<string, TagSource>;

  constructor(simulation: SiteSimulation) {
    const sources: TagSource[] = simulation.records.flatMap((record) => [
      ...record.spec.instruments.map((_, column) => new InstrumentTag(simulation, record, column)),
      ...record.spec.writable.map(
        ({ tag, description, unit }) =>
          new WrittenTag({ name: tag, description, unit, stepped: false, writable: true }),
      ),
    ]);
    this.#sources = new Map(
      sources.sort((a, b) => (a.tag.name < b.tag.name ? -1 : 1)).map((source) => [source.tag.name, source]),
    );
  }

  /** All tags in the order of their names. */
  tags(): HistorianTag[] {
    return [...this.#sources.values()].map(({ tag }) => tag);
  }

  has(name: string): boolean {
    return this.#sources.has(name);
  }

  latest(name: string, now: number): HistorianValue {
    const source = this.#sources.get(name);
    if (!source) return { tag: name, t: now, value: null, status: statusCodes.Bad_NodeIdUnknown };
    return { tag: name, ...source.latest(now) };
  }

  /** Values of a known tag in [from, to), at most `limit`, none after `now`. */
  stretch(name: string, from: number, to: number, limit: number, now: number): Stretch {
    return this.#sources.get(name)!.stretch(from, to, limit, now);
  }

  /** Takes one value; answers how that went. */
  write(value: HistorianValue): number {
    const source = this.#sources.get(value.tag);
    if (!source) return statusCodes.Bad_NodeIdUnknown;
    if (!source.write) return statusCodes.Bad_NotWritable;
    source.write(value);
    return statusCodes.Good;
  }
}

/** A simulated instrument: one value at each whole minute. */
class InstrumentTag implements TagSource {
  readonly tag: HistorianTag;

  constructor(
    private readonly simulation: SiteSimulation,
    private readonly record: TowerRecord,
    private readonly column: number,
  ) {
    const { tag, description, unit, isSetPoint } = record.spec.instruments[column]!;
    this.tag = { name: tag, description, unit, stepped: isSetPoint ?? false, writable: false };
  }

  latest(now: number): Omit<HistorianValue, 'tag'> {
    const t = Math.floor(now / minute) * minute;
    return this.#at(this.simulation.rowOf(t)) ?? { t: now, value: null, status: statusCodes.Bad_NoData };
  }

  stretch(from: number, to: number, limit: number, now: number): Stretch {
    const first = Math.max(0, Math.ceil(this.simulation.rowOf(from)));
    const end = Math.min(
      Math.ceil(this.simulation.rowOf(to)),
      Math.floor(this.simulation.rowOf(now)) + 1,
      this.record.readings.length,
    );
    const found: Stretch = { t: [], value: [], status: [], next: null };
    const stop = Math.min(end, first + limit);
    for (let row = first; row < stop; row++) {
      const reading = this.#at(row)!;
      found.t.push(reading.t);
      found.value.push(reading.value);
      found.status.push(reading.status);
    }
    return { ...found, next: stop < end ? this.simulation.startAt + stop * minute : null };
  }

  #at(row: number): Omit<HistorianValue, 'tag'> | undefined {
    const value = this.record.readings.at(this.column, row);
    if (Number.isNaN(value)) return undefined;
    return { t: this.simulation.startAt + row * minute, value, status: statusCodes.Good };
  }
}

/** A tag that others write to; its values live as long as the process. */
class WrittenTag implements TagSource {
  /** Oldest first. */
  #values: HistorianValue[] = [];

  constructor(readonly tag: HistorianTag) {}

  latest(now: number): Omit<HistorianValue, 'tag'> {
    const last = this.#values.findLast(({ t }) => t <= now);
    if (!last) return { t: now, value: null, status: statusCodes.Bad_NoData };
    return { t: last.t, value: last.value, status: last.status };
  }

  stretch(from: number, to: number, limit: number, now: number): Stretch {
    const within = this.#values.filter(({ t }) => t >= from && t < to && t <= now);
    const given = within.slice(0, limit);
    return {
      t: given.map(({ t }) => t),
      value: given.map(({ value }) => value),
      status: given.map(({ status }) => status),
      next: within[limit]?.t ?? null,
    };
  }

  write(value: HistorianValue): void {
    const at = this.#values.findLastIndex(({ t }) => t <= value.t);
    const isSameTime = this.#values[at]?.t === value.t;
    this.#values.splice(isSameTime ? at : at + 1, isSameTime ? 1 : 0, value);
  }
}
