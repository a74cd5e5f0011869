import type { Correction, Sample, samplePage, samplesQuery } from '@shared/api/samples';
import { Op, type WhereOptions } from 'sequelize';
import type * as z from 'zod';
import type { Database } from '../db/database';
import type { CorrectionRow } from '../db/models/correction-row';
import type { SampleRow } from '../db/models/sample-row';
import { Problem } from '../http/problem';

/** Samples as screens and scripts read them. */
export class SampleViews {
  constructor(private readonly database: Database) {}

  async byId(id: number): Promise<Sample> {
    const row = await this.database.models.samples.findByPk(id);
    if (!row) throw new Problem(404, 'unknown-sample', `There is no sample ${id}.`);
    return (await this.#toApi([row]))[0]!;
  }

  /** Newest drawn first; the cursor is the last one's time and id. */
  async list(query: z.infer<typeof samplesQuery>): Promise<z.infer<typeof samplePage>> {
    const conditions: WhereOptions<SampleRow>[] = [];
    if (query.towerId !== undefined) conditions.push({ towerId: query.towerId });
    if (query.state !== undefined) conditions.push({ state: query.state });
    if (query.cursor !== undefined) {
      const [drawnAt, id] = query.cursor.split('-').map(Number);
      if (!Number.isSafeInteger(drawnAt) || !Number.isSafeInteger(id))
        throw new Problem(400, 'bad-request', 'The cursor must be the `next` of an earlier page.');
      conditions.push({
        [Op.or]: [{ drawnAt: { [Op.lt]: drawnAt! } }, { drawnAt: drawnAt!, id: { [Op.lt]: id! } }],
      });
    }
    const rows = await this.database.models.samples.findAll({
      where: { [Op.and]: conditions },
      order: [
        ['drawnAt', 'DESC'],
        ['id', 'DESC'],
      ],
      limit: query.limit + 1,
    });
    const page = rows.slice(0, query.limit);
    const last = page.at(-1);
    return {
      items: await this.#toApi(page),
      next: rows.length > query.limit && last ? `${last.drawnAt}-${last.id}` : null,
    };
  }

  async #toApi(rows: readonly SampleRow[]): Promise<Sample[]> {
    const { towers, users, sampleFractions, corrections } = this.database.models;
    const ids = rows.map((row) => row.id);
    const fractions = await sampleFractions.findAll({ where: { sampleId: ids } });
    const corrected = await corrections.findAll({ where: { sampleId: ids } });
    const towerNames = new Map((await towers.findAll()).map((tower) => [tower.id, tower.name]));
    const userNames = new Map(
      (await users.findAll({ where: { id: rows.flatMap((row) => row.enteredBy ?? []) } })).map((user) => [
        user.id,
        user.name,
      ]),
    );
    return rows.map((row) => ({
      id: row.id,
      towerId: row.towerId,
      towerName: towerNames.get(row.towerId) ?? row.towerId,
      point: row.point,
      drawnAt: row.drawnAt,
      receivedAt: row.receivedAt,
      enteredAt: row.enteredAt,
      enteredBy:
        row.enteredBy === null ? 'the laboratory' : (userNames.get(row.enteredBy) ?? 'a former user'),
      fractions: fractions
        .filter((one) => one.sampleId === row.id)
        .map((one) => ({ id: one.componentId, fraction: one.fraction })),
      reportedSum: row.reportedSum,
      remark: row.remark,
      state: row.state,
      stateReason: row.stateReason,
      corrections: corrected.filter((one) => one.sampleId === row.id).map(correctionToApi),
    }));
  }
}

function correctionToApi(row: CorrectionRow): Correction {
  const {
    sensorId,
    decision,
    value,
    temperature,
    pressure,
    observedOffset,
    innovation,
    innovationVariance,
    gain,
    offsetBefore,
    offsetAfter,
    varianceBefore,
    varianceAfter,
  } = row;
  return {
    sensorId,
    decision,
    value,
    temperature,
    pressure,
    observedOffset,
    innovation,
    innovationVariance,
    gain,
    offsetBefore,
    offsetAfter,
    varianceBefore,
    varianceAfter,
  };
}
