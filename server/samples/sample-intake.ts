import type { NewSample, SampleOutcome } from '@shared/api/samples';
import type { User } from '@shared/api/session';
import { alignmentEnd, alignmentStart, alignReadings } from '@shared/correction/align-readings';
import { checkSample } from '@shared/correction/check-sample';
import {
  correctionChain,
  inferenceOf,
  type CorrectionLink,
  type LinedUpSample,
} from '@shared/correction/correction-chain';
import { rebase } from '@shared/correction/base-composition';
import { readingsVariance, type ObservedReadings } from '@shared/correction/observe-offset';
import { qualityOfStatus } from '@shared/api/historian';
import { EquilibriumError } from '@shared/vle/errors';
import { Op, type Transaction } from 'sequelize';
import type { Clock } from '../clock';
import { readSeries } from '../db/bulk';
import type { Database } from '../db/database';
import type { CorrectionRow } from '../db/models/correction-row';
import type { SampleRow } from '../db/models/sample-row';
import type { TagRow } from '../db/models/tag-row';
import type { EventBus } from '../events';
import { Problem } from '../http/problem';
import type { JournalService } from '../journal/journal.service';
import { liveSensors, pressureDatum, type LiveSensor, type SensorState } from '../towers/live-sensors';
import type { SensorViews } from '../towers/sensor-views';
import type { SampleViews } from './sample-views';
import { projectOnSlate } from './slate';

export interface IntakeDependencies {
  readonly database: Database;
  readonly clock: Clock;
  readonly events: EventBus;
  readonly journal: JournalService;
  readonly sampleViews: SampleViews;
  readonly sensorViews: SensorViews;
  readonly barometricPressure: () => Promise<number>;
}

/** What one sample did: the sensors it concerned. */
interface Taken {
  readonly sampleId: number;
  readonly sensorIds: readonly string[];
}

/** What became of a sample at one sensor. */
type Fate =
  | { readonly state: 'used' | 'held' | 'rejected'; readonly reason: string }
  | { readonly state: 'pending'; readonly reason: string };

/** The one way in for laboratory results: check, line up, gate, apply, write down. */
export class SampleIntake {
  constructor(private readonly deps: IntakeDependencies) {}

  /**
   * Records one result and corrects every sensor at its sample point.
   *
   * Safe to repeat: the same result again changes nothing; a different one for the same point and time is refused.
   * @throws Problem 404 for an unknown tower, 409 for a different result, 422 for one that cannot be entered
   */
  async record(draft: NewSample, user: User): Promise<SampleOutcome> {
    const { database, clock, events, sampleViews, sensorViews } = this.deps;
    const now = clock.now();
    const tower = await database.models.towers.findByPk(draft.towerId);
    if (!tower) throw new Problem(404, 'unknown-tower', `There is no tower "${draft.towerId}".`);
    const place = { towerId: draft.towerId, point: draft.point };
    const concerned = await liveSensors(database, place);
    const slate = [...new Set(concerned.flatMap((sensor) => sensor.parameters.base.map((part) => part.id)))];
    const check = checkSample(draft, slate, now);
    if (Object.keys(check.errors).length > 0)
      throw new Problem(422, 'sample-refused', Object.values(check.errors).join(' '), {
        errors: check.errors,
      });
    const before = await Promise.all(concerned.map((sensor) => sensorViews.present(sensor.row.id)));

    const { taken, alreadyThere } = await database.write(async (transaction) => {
      const same = await database.models.samples.findOne({
        where: { ...place, drawnAt: draft.drawnAt },
        transaction,
      });
      if (same) {
        await this.#refuseDifferent(same, check.normalised, transaction);
        return { taken: { sampleId: same.id, sensorIds: [] }, alreadyThere: true };
      }
      const sample = await database.models.samples.create(
        {
          ...place,
          drawnAt: draft.drawnAt,
          receivedAt: draft.receivedAt,
          enteredAt: now,
          enteredBy: user.id,
          reportedSum: check.sum,
          remark: draft.remark,
          state: 'pending',
          stateReason: '',
        },
        { transaction },
      );
      await database.models.sampleFractions.bulkCreate(
        check.normalised.map(({ id, fraction }) => ({ sampleId: sample.id, componentId: id, fraction })),
        { transaction },
      );
      await this.deps.journal.record(transaction, {
        t: now,
        userId: user.id,
        action: 'sample-entered',
        subject: { kind: 'sample', id: String(sample.id), name: `${tower.name}, ${draft.point}` },
        changes: check.normalised.map(({ id, fraction }) => ({
          field: id,
          from: null,
          to: Number((100 * fraction).toPrecision(6)),
          unit: 'mol %',
        })),
        reason: [draft.remark, ...check.remarks].filter(Boolean).join(' '),
      });
      return { taken: await this.#take(sample, user.id, transaction), alreadyThere: false };
    });

    const sample = await sampleViews.byId(taken.sampleId);
    const after = await Promise.all(concerned.map((sensor) => sensorViews.present(sensor.row.id)));
    if (!alreadyThere) {
      events.publish({ type: 'sample', now, sampleId: taken.sampleId, sensorIds: [...taken.sensorIds] });
      for (const id of taken.sensorIds) events.publish(await sensorViews.event(id));
    }
    return {
      sample,
      alreadyThere,
      effects: concerned.map(({ row }, i) => ({
        sensorId: row.id,
        sensorName: row.name,
        before: before[i]!,
        after: after[i]!,
      })),
    };
  }

  /** Takes the samples that waited for the tags of their time. To be called in the transaction that stored those tags. */
  async takePending(transaction: Transaction): Promise<Taken[]> {
    const waiting = await this.deps.database.models.samples.findAll({
      where: { state: 'pending' },
      order: [['drawnAt', 'ASC']],
      transaction,
    });
    const taken: Taken[] = [];
    for (const sample of waiting) {
      const one = await this.#take(sample, null, transaction);
      if (sample.state !== 'pending') taken.push(one);
    }
    return taken;
  }

  async #refuseDifferent(
    same: SampleRow,
    fractions: readonly { id: string; fraction: number }[],
    transaction: Transaction,
  ): Promise<void> {
    const stored = await this.deps.database.models.sampleFractions.findAll({
      where: { sampleId: same.id },
      transaction,
    });
    const isSame =
      stored.length === fractions.length &&
      fractions.every(({ id, fraction }) =>
        stored.some((row) => row.componentId === id && Math.abs(row.fraction - fraction) < 1e-9),
      );
    if (!isSame)
      throw new Problem(
        409,
        'sample-differs',
        'Another result is already entered for this point and time. Check the time it was drawn; a corrected result is entered by correcting the first one.',
      );
  }

  /** Lines a sample up with every sensor at its point and takes the corrections again in order of drawing. */
  async #take(sample: SampleRow, userId: number | null, transaction: Transaction): Promise<Taken> {
    const { database } = this.deps;
    const concerned = await liveSensors(
      database,
      { towerId: sample.towerId, point: sample.point },
      transaction,
    );
    const barometricPressure = await this.deps.barometricPressure();
    const fates: Fate[] = [];
    for (const sensor of concerned)
      fates.push(await this.#takeAt(sensor, sample, userId, barometricPressure, transaction));
    const order = ['held', 'pending', 'rejected', 'used'] as const;
    const fate = order.flatMap((state) => fates.filter((one) => one.state === state))[0] ?? {
      state: 'pending' as const,
      reason: 'No sensor is live at this sample point.',
    };
    await sample.update({ state: fate.state, stateReason: fate.reason }, { transaction });
    return { sampleId: sample.id, sensorIds: concerned.map((sensor) => sensor.row.id) };
  }

  async #takeAt(
    sensor: LiveSensor,
    sample: SampleRow,
    userId: number | null,
    barometricPressure: number,
    transaction: Transaction,
  ): Promise<Fate> {
    const { journal, clock } = this.deps;
    const { parameters, tags } = sensor;
    const end = alignmentEnd(sample.drawnAt, parameters.alignment);
    const readPast = Math.min(tags.temperature.watermark ?? 0, tags.pressure.watermark ?? 0);
    if (readPast <= end)
      return {
        state: 'pending',
        reason: 'The readings of the time it was drawn have not been collected yet.',
      };
    const composition = await this.#compositionOf(sensor, sample.id, transaction);
    const readings = await this.#lineUp(sensor, sample.drawnAt, composition, barometricPressure, transaction);
    if ('reason' in readings) return readings;
    const others = await this.#linedUpSamples(sensor, transaction);
    const { links, knowledge } = correctionChain(parameters, sensor.version.madeLiveAt ?? 0, [
      ...others.filter((other) => other.sampleId !== sample.id),
      {
        sampleId: sample.id,
        drawnAt: sample.drawnAt,
        composition,
        readings,
        verdict: sample.verdict ?? undefined,
      },
    ]);
    const kept = new Map(others.map((other) => [other.sampleId, other.readings]));
    kept.set(sample.id, readings);
    await this.#storeLinks(sensor.row.id, links, kept, transaction);
    const link = links.find((one) => one.sampleId === sample.id)!;
    const state: SensorState = { minute: sensor.state.minute, knowledge };
    await sensor.row.update({ state }, { transaction });
    await journal.record(transaction, {
      t: clock.now(),
      userId,
      action: link.decision === 'used' ? 'sample-used' : 'sample-held',
      subject: { kind: 'sensor', id: sensor.row.id, name: `${sensor.row.name}` },
      changes: [
        {
          field: 'offset',
          from: rounded(sensor.state.knowledge.offset),
          to: rounded(knowledge.offset),
          unit: offsetUnit(parameters.correction.domain),
        },
      ],
      reason: reasonOf(link, parameters.correction.gate),
    });
    return {
      state: link.decision,
      reason: link.decision === 'used' ? '' : reasonOf(link, parameters.correction.gate),
    };
  }

  async #compositionOf(sensor: LiveSensor, sampleId: number, transaction: Transaction): Promise<number[]> {
    const rows = await this.deps.database.models.sampleFractions.findAll({
      where: { sampleId },
      transaction,
    });
    return projectOnSlate(
      sensor.parameters.base,
      rows.map((row) => ({ id: row.componentId, fraction: row.fraction })),
    );
  }

  /** The readings of the time a sample speaks of, or why there are none to compare it with. */
  async #lineUp(
    sensor: LiveSensor,
    drawnAt: number,
    composition: readonly number[],
    barometricPressure: number,
    transaction: Transaction,
  ): Promise<ObservedReadings | Fate> {
    const { parameters, tags } = sensor;
    const from = alignmentStart(drawnAt, parameters.alignment);
    const to = alignmentEnd(drawnAt, parameters.alignment) + 1;
    const temperature = await this.#usable(tags.temperature, from, to, transaction);
    const pressure = await this.#usable(tags.pressure, from, to, transaction);
    const datum = pressureDatum(sensor, barometricPressure) + parameters.pressureCorrection;
    const t = [...temperature.keys()].filter((time) => pressure.has(time));
    const aligned = alignReadings(
      {
        t,
        temperature: t.map((time) => temperature.get(time)!),
        pressure: t.map((time) => pressure.get(time)! + datum),
      },
      drawnAt,
      parameters.alignment,
    );
    if (!aligned)
      return {
        state: 'held',
        reason:
          'Less than half of the readings of that time can be used; there is nothing to compare the result with.',
      };
    try {
      const own = inferenceOf(parameters, rebase(parameters.base, composition));
      const { slope } = own.equilibriumTemperature(composition, aligned.pressure);
      return {
        temperature: aligned.temperature,
        pressure: aligned.pressure,
        variance: readingsVariance(aligned, slope, parameters.noise),
      };
    } catch (error) {
      if (!(error instanceof EquilibriumError)) throw error;
      return {
        state: 'held',
        reason: `The result has no saturation point at the pressure of that time: ${error.detail}`,
      };
    }
  }

  /** Good or Uncertain values of one tag by their time. */
  async #usable(
    tag: TagRow,
    from: number,
    to: number,
    transaction: Transaction,
  ): Promise<Map<number, number>> {
    const { t, value, status } = await readSeries(this.deps.database.sequelize, {
      table: 'tag_value',
      key: { column: 'tag_id', value: tag.id },
      columns: ['value', 'status'],
      from,
      to,
      transaction,
    });
    return new Map(
      t.flatMap((time, i) =>
        value[i] == null || qualityOfStatus(status[i]!) === 'Bad' ? [] : [[time, value[i]] as const],
      ),
    );
  }

  /** Every sample that has been lined up with this sensor before. */
  async #linedUpSamples(sensor: LiveSensor, transaction: Transaction): Promise<LinedUpSample[]> {
    const { corrections, samples, sampleFractions } = this.deps.database.models;
    const rows = await corrections.findAll({ where: { sensorId: sensor.row.id }, transaction });
    const ids = rows.map((row) => row.sampleId);
    const drawn = await samples.findAll({ where: { id: { [Op.in]: ids } }, transaction });
    const fractions = await sampleFractions.findAll({
      where: { sampleId: { [Op.in]: ids } },
      raw: true,
      transaction,
    });
    const fractionsOf = new Map<number, { id: string; fraction: number }[]>();
    for (const row of fractions) {
      const list = fractionsOf.get(row.sampleId) ?? [];
      list.push({ id: row.componentId, fraction: row.fraction });
      fractionsOf.set(row.sampleId, list);
    }
    return rows.map((row: CorrectionRow) => {
      const sample = drawn.find((one) => one.id === row.sampleId)!;
      return {
        sampleId: row.sampleId,
        drawnAt: sample.drawnAt,
        composition: projectOnSlate(sensor.parameters.base, fractionsOf.get(row.sampleId) ?? []),
        readings: { temperature: row.temperature, pressure: row.pressure, variance: row.readingsVariance },
        verdict: sample.verdict ?? undefined,
      };
    });
  }

  async #storeLinks(
    sensorId: string,
    links: readonly CorrectionLink[],
    readings: ReadonlyMap<number, ObservedReadings>,
    transaction: Transaction,
  ): Promise<void> {
    const { corrections, samples } = this.deps.database.models;
    const stored = await corrections.findAll({ where: { sensorId }, transaction });
    for (const link of links) {
      const own = readings.get(link.sampleId)!;
      const row = {
        sensorId,
        sampleId: link.sampleId,
        decision: link.decision,
        value: link.value,
        temperature: own.temperature,
        pressure: own.pressure,
        readingsVariance: own.variance,
        observedOffset: link.observed,
        innovation: link.innovation,
        innovationVariance: link.innovationVariance,
        gain: link.gain,
        offsetBefore: link.offsetBefore,
        offsetAfter: link.offset,
        varianceBefore: link.varianceBefore,
        varianceAfter: link.variance,
        shapeError: link.shapeError,
      };
      const before = stored.find((one) => one.sampleId === link.sampleId);
      // A sample drawn before the late one is as it was: nothing to write.
      if (
        before?.offsetAfter === row.offsetAfter &&
        before.innovation === row.innovation &&
        before.varianceAfter === row.varianceAfter
      )
        continue;
      await corrections.upsert(row, { transaction });
      if (before && before.decision !== link.decision)
        await samples.update({ state: link.decision }, { where: { id: link.sampleId }, transaction });
    }
  }
}

function reasonOf(link: CorrectionLink, gate: number): string {
  const sigmas = Math.abs(link.innovation) / Math.sqrt(link.innovationVariance);
  const side = link.innovation > 0 ? 'above' : 'below';
  const words = `${sigmas.toFixed(1)} σ ${side} what the sensor expected`;
  return link.decision === 'held'
    ? `Held: ${words}; the gate is ${gate} σ. Nothing was changed.`
    : `Used: ${words}.`;
}

function rounded(offset: number): number {
  return Number(offset.toFixed(4));
}

/** Unit of an offset, by what it is added to. */
export function offsetUnit(domain: 'temperature' | 'ln-fraction' | 'fraction'): string {
  return domain === 'temperature' ? 'K' : domain === 'fraction' ? 'mol/mol' : 'ln units';
}
