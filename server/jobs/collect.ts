import type { Logger } from 'pino';
import type { Clock } from '../clock';
import { insertRows, type Cell } from '../db/bulk';
import type { Database } from '../db/database';
import type { SourceRow } from '../db/models/source-row';
import type { TagRow } from '../db/models/tag-row';
import type { EventBus } from '../events';
import { SourceFailure, type HistorianSource, type SourceSeries } from '../historian/historian-source';
import { toSi } from '../historian/to-si';
import type { JournalService } from '../journal/journal.service';
import type { SampleIntake } from '../samples/sample-intake';
import { liveSensors } from '../towers/live-sensors';
import type { SensorViews } from '../towers/sensor-views';
import { evaluateSensor } from './evaluate';

export interface CollectorDependencies {
  readonly database: Database;
  readonly clock: Clock;
  readonly events: EventBus;
  readonly journal: JournalService;
  readonly logger: Logger;
  readonly intake: SampleIntake;
  readonly views: SensorViews;
  readonly openSource: (row: SourceRow) => HistorianSource;
  readonly barometricPressure: () => Promise<number>;
}

const minute = 60_000;

/** Longest stretch read and stored in one transaction: a catch-up of days goes in days. */
const pageSpan = 24 * 60 * minute;

/**
 * Pulls every source's values since its watermark, stores them and evaluates the sensors that read them.
 *
 * A stretch of values, the estimates that follow from it, the sensors' states and the watermarks land in one transaction
 * or not at all; a repeat changes nothing.
 */
export class Collector {
  #lastCycle: { endedAt: number; ok: boolean } | null = null;

  constructor(private readonly deps: CollectorDependencies) {}

  /** How the last cycle ended; null before the first. */
  get lastCycle() {
    return this.#lastCycle;
  }

  /** One cycle over all sources, up to the whole minute that is now. A source that fails is noted and never thrown. */
  async runCycle(): Promise<void> {
    const { database, clock } = this.deps;
    const until = Math.floor(clock.now() / minute) * minute + 1;
    const sources = await database.models.sources.findAll({ where: { paused: false } });
    let ok = true;
    for (const source of sources) ok = (await this.#collectSource(source, until)) && ok;
    this.#lastCycle = { endedAt: clock.now(), ok };
  }

  async #collectSource(source: SourceRow, until: number): Promise<boolean> {
    const { database, logger, openSource } = this.deps;
    try {
      const historian = openSource(source);
      for (;;) {
        const tags = await database.models.tags.findAll({ where: { sourceId: source.id } });
        const waiting = tags.filter((tag) => tag.watermark !== null && tag.watermark < until);
        if (waiting.length === 0) break;
        const from = Math.min(...waiting.map((tag) => tag.watermark!));
        const to = Math.min(from + pageSpan, until);
        const behind = waiting.filter((tag) => tag.watermark! < to);
        const series = await readAll(
          historian,
          behind.map((tag) => tag.name),
          from,
          to,
        );
        await this.#store(source, behind, series, to);
      }
      await this.#noteContact(source, null);
      return true;
    } catch (error) {
      if (!(error instanceof SourceFailure))
        logger.error({ err: error, source: source.name }, 'collecting failed');
      const words =
        error instanceof SourceFailure
          ? error.words
          : 'The values could not be stored or evaluated; the log says why.';
      await this.#noteContact(source, words);
      return false;
    }
  }

  async #store(
    source: SourceRow,
    tags: readonly TagRow[],
    series: readonly SourceSeries[],
    to: number,
  ): Promise<void> {
    const { database, clock, events, intake, views } = this.deps;
    const barometricPressure = await this.deps.barometricPressure();
    const rows = tags.flatMap((tag) =>
      cellsOf(
        tag,
        series.filter((one) => one.tag === tag.name),
      ),
    );
    const changed = await database.write(async (transaction) => {
      await insertRows(
        transaction,
        'tag_value',
        ['tag_id', 't', 'value', 'status'],
        rows,
        'ON CONFLICT DO NOTHING',
      );
      await database.models.tags.update(
        { watermark: to },
        { where: { id: tags.map((tag) => tag.id) }, transaction },
      );
      const sensorIds: string[] = [];
      for (const sensor of await liveSensors(database, { sourceId: source.id }, transaction)) {
        const newest = await evaluateSensor(database, transaction, sensor, barometricPressure);
        if (newest) sensorIds.push(sensor.row.id);
      }
      // Results that came before their tags can be lined up now.
      return { sensorIds, samples: await intake.takePending(transaction) };
    });
    if (to >= Math.floor(clock.now() / minute) * minute)
      for (const id of changed.sensorIds) events.publish(await views.event(id));
    for (const { sampleId, sensorIds } of changed.samples)
      events.publish({ type: 'sample', now: clock.now(), sampleId, sensorIds: [...sensorIds] });
  }

  /** Notes that a source answered or why it did not; a change of that is written into the journal and told live. */
  async #noteContact(source: SourceRow, failure: string | null): Promise<void> {
    const { database, clock, events, journal } = this.deps;
    const connected = failure === null;
    const now = clock.now();
    const isChange = source.connected !== connected && !(source.connected === null && connected);
    await database.write(async (transaction) => {
      await source.update(
        { connected, lastError: failure, ...(connected ? { lastContactAt: now } : {}) },
        { transaction },
      );
      if (isChange)
        await journal.record(transaction, {
          t: now,
          userId: null,
          action: connected ? 'source-back' : 'source-lost',
          subject: { kind: 'source', id: String(source.id), name: source.name },
          changes: [],
          reason: failure ?? 'The historian answers again.',
        });
    });
    if (isChange)
      events.publish({
        type: 'source',
        now,
        sourceId: source.id,
        name: source.name,
        connected,
        words: failure ?? 'The historian answers again.',
      });
  }
}

async function readAll(
  historian: HistorianSource,
  names: readonly string[],
  from: number,
  to: number,
): Promise<SourceSeries[]> {
  const all: SourceSeries[] = [];
  let continuation: string | undefined;
  do {
    const page = await historian.readRaw(names, from, to, continuation);
    all.push(...page.series);
    continuation = page.continuation ?? undefined;
  } while (continuation !== undefined);
  return all;
}

/** A tag's values in SI, as rows of `tag_value`. */
function cellsOf(tag: TagRow, series: readonly SourceSeries[]): Cell[][] {
  const conversion = toSi(tag.quantity, tag.unit);
  if (!conversion)
    throw new SourceFailure(
      'failed',
      `The unit "${tag.unit}" of ${tag.name} is not one of ${tag.quantity}; correct the tag's unit or kind.`,
    );
  return series.flatMap(({ t, value, status }) =>
    t.map((time, i): Cell[] => {
      const raw = value[i] ?? null;
      return [tag.id, time, raw === null ? null : raw * conversion.factor + conversion.shift, status[i]!];
    }),
  );
}
