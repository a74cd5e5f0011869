import type { SampleOutcome } from '@shared/api/samples';
import type {
  Estimate,
  SamplePoint,
  Sensor,
  SensorDetail,
  Tower,
  Trend,
  TrendQuery,
} from '@shared/api/sensors';
import type { StreamEvent } from '@shared/api/stream';
import { applyOffset, smallestFraction } from '@shared/correction/observe-offset';
import { varianceAt } from '@shared/correction/offset-filter';
import { bandOf, standardUncertainty } from '@shared/inference/band';
import { nextMove } from '@shared/inference/next-move';
import { offLimitProbability } from '@shared/inference/off-limit';
import { qualities, unpackReasons } from '@shared/inference/quality';
import { slopePerHour } from '@shared/inference/slope';
import { thinSeries } from '@shared/inference/thin-series';
import { inferenceOf } from '@shared/correction/correction-chain';
import { EquilibriumError } from '@shared/vle/errors';
import { Op } from 'sequelize';
import type { Clock } from '../clock';
import { readSeries } from '../db/bulk';
import type { Database } from '../db/database';
import type { EstimateRow } from '../db/models/estimate-row';
import type { SensorRow } from '../db/models/sensor-row';
import { Problem } from '../http/problem';
import { liveSensors, type LiveSensor } from './live-sensors';

const hour = 3_600_000;
const minute = 60_000;

/** Towers and sensors as screens and scripts read them. */
export class SensorViews {
  constructor(
    private readonly database: Database,
    private readonly clock: Clock,
  ) {}

  async towers(): Promise<Tower[]> {
    const { towers, sensors } = this.database.models;
    const all = await sensors.findAll({ order: [['ordinal', 'ASC']], attributes: ['id', 'towerId'] });
    return (await towers.findAll({ order: [['ordinal', 'ASC']] })).map((tower) => ({
      id: tower.id,
      name: tower.name,
      description: tower.description,
      sensorIds: all.filter((sensor) => sensor.towerId === tower.id).map((sensor) => sensor.id),
    }));
  }

  async list(): Promise<Sensor[]> {
    const rows = await this.database.models.sensors.findAll({
      order: [
        ['towerId', 'ASC'],
        ['ordinal', 'ASC'],
      ],
    });
    const live = await liveSensors(this.database);
    return Promise.all(
      rows.map((row) =>
        this.#toApi(
          row,
          live.find((sensor) => sensor.row.id === row.id),
        ),
      ),
    );
  }

  async byId(id: string): Promise<SensorDetail> {
    const row = await this.#row(id);
    const live = (await liveSensors(this.database, { towerId: row.towerId })).find(
      (sensor) => sensor.row.id === id,
    );
    const sensor = await this.#toApi(row, live);
    const { latest } = sensor;
    return {
      ...sensor,
      version: live
        ? {
            id: live.version.id,
            number: live.version.number,
            madeLiveAt: live.version.madeLiveAt ?? live.version.createdAt,
            parameters: live.parameters,
          }
        : null,
      nextMove:
        live && latest
          ? nextMove({
              parameters: live.parameters,
              inference: inferenceOf(live.parameters, live.state.knowledge.base),
              offset: live.state.knowledge.offset,
              quality: latest.quality,
              temperature: latest.temperature,
              pressure: latest.pressure,
            })
          : { kind: 'none', because: 'There is no inferred value yet.' },
    };
  }

  /** The live event that tells screens of a sensor's newest state. */
  async event(id: string): Promise<StreamEvent> {
    const row = await this.#row(id);
    const live = (await liveSensors(this.database, { towerId: row.towerId })).find(
      (sensor) => sensor.row.id === id,
    );
    return { type: 'sensor', now: this.clock.now(), sensor: await this.#toApi(row, live) };
  }

  /** Value and band of the newest readings with what is known now: what a sample just changed, before the next minute. */
  async present(id: string): Promise<SampleOutcome['effects'][number]['before']> {
    const row = await this.#row(id);
    const live = (await liveSensors(this.database, { towerId: row.towerId })).find(
      (sensor) => sensor.row.id === id,
    );
    const newest = await this.#newestRow(id);
    if (!live) return { value: null, low: null, high: null, offset: 0 };
    const { knowledge } = live.state;
    const none = { value: null, low: null, high: null, offset: knowledge.offset };
    if (
      newest?.temperature == null ||
      newest.pressure === null ||
      newest.quality === qualities.indexOf('Bad')
    )
      return none;
    const { parameters } = live;
    try {
      const { value, byOffset, result } = applyOffset(
        inferenceOf(parameters, knowledge.base),
        parameters.correction.domain,
        newest.temperature,
        newest.pressure,
        knowledge.offset,
      );
      const deviation = standardUncertainty(value, {
        byTemperature: result.sensitivity.temperature,
        byPressure: result.sensitivity.pressure,
        byOffset,
        offsetVariance: varianceAt(knowledge, newest.t, parameters.correction.driftVariancePerHour),
        temperature: parameters.noise.temperature,
        pressure: parameters.noise.pressure,
        shapeRelative: knowledge.shapeRelative,
      });
      return { value, ...bandOf(Math.max(value, smallestFraction), deviation), offset: knowledge.offset };
    } catch (error) {
      if (!(error instanceof EquilibriumError)) throw error;
      return none;
    }
  }

  /** Columns for drawing, each line thinned by itself so that none loses an extreme. */
  async trend(id: string, { from, to, points }: TrendQuery): Promise<Trend> {
    await this.#row(id);
    if (from >= to)
      throw new Problem(400, 'bad-request', 'The trend must begin before it ends.', {
        errors: { from: 'must be before to' },
      });
    const all = await readSeries(this.database.sequelize, {
      table: 'estimate',
      key: { column: 'sensor_id', value: id },
      columns: ['value', 'low', 'high', 'quality', 'rundown', 'temperature', 'pressure', 'offset'],
      from,
      to,
    });
    const line = (column: readonly (number | null)[]) => {
      const { indices } = thinSeries(all.t, column, points);
      return { t: indices.map((i) => all.t[i]!), value: indices.map((i) => column[i] ?? null) };
    };
    const { indices, stretch } = thinSeries(all.t, all.value, points);
    return {
      sensorId: id,
      from,
      to,
      bucketMinutes: Math.max(1, Math.round(stretch / minute)),
      inferred: {
        t: indices.map((i) => all.t[i]!),
        value: indices.map((i) => all.value[i] ?? null),
        low: indices.map((i) => all.low[i] ?? null),
        high: indices.map((i) => all.high[i] ?? null),
        quality: indices.map((i) => all.quality[i]!),
      },
      rundown: line(all.rundown),
      temperature: line(all.temperature),
      pressure: line(all.pressure),
      offset: line(all.offset),
      samples: await this.#samples(id, from, to),
      notes: await this.#notes(id, from, to),
    };
  }

  async #row(id: string): Promise<SensorRow> {
    const row = await this.database.models.sensors.findByPk(id);
    if (!row) throw new Problem(404, 'unknown-sensor', `There is no sensor "${id}".`);
    return row;
  }

  async #newestRow(id: string): Promise<EstimateRow | null> {
    // Not findOne: seeing a column of the key in `where`, it leaves the LIMIT out and reads every minute there is.
    const [newest] = await this.database.models.estimates.findAll({
      where: { sensorId: id },
      order: [['t', 'DESC']],
      limit: 1,
    });
    return newest ?? null;
  }

  async #toApi(row: SensorRow, live: LiveSensor | undefined): Promise<Sensor> {
    const tower = await this.database.models.towers.findByPk(row.towerId);
    const newest = await this.#newestRow(row.id);
    const latest = newest && toEstimate(newest);
    const lastHour = newest
      ? await readSeries(this.database.sequelize, {
          table: 'estimate',
          key: { column: 'sensor_id', value: row.id },
          columns: ['value'],
          from: newest.t - hour,
          to: newest.t + 1,
        })
      : { t: [], value: [] };
    const limits = {
      high: live?.parameters.limits.high ?? null,
      low: live?.parameters.limits.low ?? null,
      target: live?.parameters.limits.target ?? null,
    };
    const [lastSample] = await this.#samples(row.id, 0, this.clock.now() + minute, 1);
    return {
      id: row.id,
      towerId: row.towerId,
      towerName: tower?.name ?? row.towerId,
      name: row.name,
      symbol: row.symbol,
      point: row.point,
      limits,
      latest,
      slopePerHour: slopePerHour(lastHour.t, lastHour.value),
      offLimitProbability:
        latest?.value == null || latest.low === null || latest.high === null
          ? null
          : offLimitProbability(latest.value, { low: latest.low, high: latest.high }, limits),
      lastSample: lastSample ?? null,
      lastUsedSampleAt: live?.state.knowledge.lastUsedAt ?? null,
    };
  }

  /** A sensor's samples in [from, to), oldest first; with `newest`, only that many of the newest. */
  async #samples(sensorId: string, from: number, to: number, newest?: number): Promise<SamplePoint[]> {
    const { corrections, samples } = this.database.models;
    const drawn = await samples.findAll({
      where: { towerId: await this.#towerOf(sensorId), drawnAt: { [Op.gte]: from, [Op.lt]: to } },
      order: [['drawnAt', 'DESC']],
      limit: newest === undefined ? undefined : newest * 4,
    });
    const rows = await corrections.findAll({
      where: { sensorId, sampleId: drawn.map((sample) => sample.id) },
    });
    const points = drawn.flatMap((sample): SamplePoint[] => {
      const row = rows.find((one) => one.sampleId === sample.id);
      if (!row) return [];
      const standardisedInnovation = row.innovation / Math.sqrt(row.innovationVariance);
      return [
        {
          id: sample.id,
          drawnAt: sample.drawnAt,
          value: row.value,
          state: sample.state,
          standardisedInnovation,
        },
      ];
    });
    return points.slice(0, newest).reverse();
  }

  async #towerOf(sensorId: string): Promise<string> {
    return (await this.#row(sensorId)).towerId;
  }

  async #notes(sensorId: string, from: number, to: number): Promise<Trend['notes']> {
    const { notes, users } = this.database.models;
    const rows = await notes.findAll({
      where: { sensorId, t: { [Op.gte]: from, [Op.lt]: to } },
      order: [['t', 'ASC']],
    });
    const authors = new Map(
      (await users.findAll({ where: { id: rows.map((row) => row.authorId) } })).map((user) => [
        user.id,
        user.name,
      ]),
    );
    return rows.map((row) => ({
      id: row.id,
      t: row.t,
      text: row.text,
      author: authors.get(row.authorId) ?? 'a former user',
    }));
  }
}

function toEstimate(row: EstimateRow): Estimate {
  const { t, value, low, high, rundown, temperature, pressure, offset, versionId, baseSampleId } = row;
  return {
    t,
    value,
    low,
    high,
    rundown,
    temperature,
    pressure,
    offset,
    versionId,
    baseSampleId,
    offsetDeviation: Math.sqrt(row.offsetVariance),
    quality: qualities[row.quality]!,
    reasons: unpackReasons(row.reasons),
  };
}
