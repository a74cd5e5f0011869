import { packReasons, qualities } from '@shared/inference/quality';
import type { Reading } from '@shared/inference/judge-readings';
import { evaluateMinute, type MinuteEstimate } from '@shared/replay/evaluate-minute';
import type { Transaction } from 'sequelize';
import { insertRows, readSeries, type Cell } from '../db/bulk';
import type { Database } from '../db/database';
import type { TagRow } from '../db/models/tag-row';
import { prepare, type LiveSensor, type SensorState } from '../towers/live-sensors';

const minute = 60_000;

/** Walks along one tag's values and answers the newest one at or before a minute. */
class ReadingCursor {
  #next = 0;
  constructor(
    private readonly series: { t: number[]; value: (number | null)[]; status: (number | null)[] },
  ) {}

  at(t: number): Reading | null {
    while (this.#next < this.series.t.length && this.series.t[this.#next]! <= t) this.#next++;
    const i = this.#next - 1;
    return i < 0
      ? null
      : { t: this.series.t[i]!, value: this.series.value[i]!, status: this.series.status[i]! };
  }
}

/**
 * Evaluates every minute of one sensor that its tags have been read past, in order, and stores the estimates and the
 * sensor's state. It reads the values back from the table, so that a later replay sees the same bits.
 *
 * @returns the newest estimate, undefined when there was nothing to do
 */
export async function evaluateSensor(
  database: Database,
  transaction: Transaction,
  sensor: LiveSensor,
  barometricPressure: number,
): Promise<MinuteEstimate | undefined> {
  const { tags, parameters, row } = sensor;
  const readPast = Math.min(tags.temperature.watermark ?? 0, tags.pressure.watermark ?? 0);
  const from = row.evaluatedTo;
  // The last whole minute whose values have all been read.
  const until = Math.floor((readPast - 1) / minute) * minute + minute;
  if (from === null || from >= until) return undefined;
  const lookBack = from - parameters.validity.staleMinutes * minute;
  const cursorOf = async (tag: TagRow | undefined) =>
    tag &&
    new ReadingCursor(
      await readSeries(database.sequelize, {
        table: 'tag_value',
        key: { column: 'tag_id', value: tag.id },
        columns: ['value', 'status'],
        from: lookBack,
        to: until,
        transaction,
      }),
    );
  const temperature = await cursorOf(tags.temperature);
  const pressure = await cursorOf(tags.pressure);
  const differentialPressure = await cursorOf(tags.differentialPressure);
  const prepared = prepare(sensor, sensor.state.knowledge, barometricPressure);
  let state = sensor.state.minute;
  const estimates: MinuteEstimate[] = [];
  for (let t = Math.ceil(from / minute) * minute; t < until; t += minute) {
    const answer = evaluateMinute(prepared, sensor.state.knowledge, state, {
      t,
      temperature: temperature?.at(t) ?? null,
      pressure: pressure?.at(t) ?? null,
      differentialPressure: differentialPressure?.at(t) ?? null,
    });
    state = answer.state;
    estimates.push(answer.estimate);
  }
  await storeEstimates(transaction, row.id, sensor.version.id, estimates);
  const after: SensorState = { minute: state, knowledge: sensor.state.knowledge };
  await row.update({ state: after, evaluatedTo: until }, { transaction });
  return estimates.at(-1);
}

const columns = [
  'sensor_id',
  't',
  'version_id',
  'temperature',
  'pressure',
  'value',
  'low',
  'high',
  'rundown',
  'offset',
  'offset_variance',
  'sigma_shape',
  'base_sample_id',
  'quality',
  'reasons',
] as const;

async function storeEstimates(
  transaction: Transaction,
  sensorId: string,
  versionId: number,
  estimates: readonly MinuteEstimate[],
): Promise<void> {
  const rows = estimates.map((e): Cell[] => [
    sensorId,
    e.t,
    versionId,
    e.temperature,
    e.pressure,
    e.value,
    e.low,
    e.high,
    e.rundown,
    e.offset,
    e.offsetVariance,
    e.sigmaShape,
    e.baseSampleId,
    qualities.indexOf(e.quality),
    packReasons(e.reasons),
  ]);
  // A minute that was shown stays as it was shown.
  await insertRows(transaction, 'estimate', columns, rows, 'ON CONFLICT DO NOTHING');
}
