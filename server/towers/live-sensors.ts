import type { SensorParameters } from '@shared/api/sensor-parameters';
import { initialKnowledge, inferenceOf, type Knowledge } from '@shared/correction/correction-chain';
import { firstMinuteState, type MinuteState, type PreparedSensor } from '@shared/replay/evaluate-minute';
import type { Transaction } from 'sequelize';
import type { Database } from '../db/database';
import type { SensorRow } from '../db/models/sensor-row';
import type { SensorVersionRow } from '../db/models/sensor-version-row';
import type { TagRow } from '../db/models/tag-row';

/** What a sensor carries from cycle to cycle, kept as JSON beside it; JSON keeps every bit of a double. */
export interface SensorState {
  readonly minute: MinuteState;
  readonly knowledge: Knowledge;
}

/** A sensor with its live version and the tags it reads. */
export interface LiveSensor {
  readonly row: SensorRow;
  readonly version: SensorVersionRow;
  readonly parameters: SensorParameters;
  readonly tags: {
    readonly temperature: TagRow;
    readonly pressure: TagRow;
    readonly differentialPressure: TagRow | undefined;
  };
  readonly state: SensorState;
}

/** Sensors that have a live version, with their tags. A sensor whose tag is gone is left out: it has nothing to read. */
export async function liveSensors(
  database: Database,
  where: { sourceId?: number; towerId?: string; point?: 'overhead' | 'bottoms' } = {},
  transaction?: Transaction,
): Promise<LiveSensor[]> {
  const { sensors, sensorVersions, tags } = database.models;
  const { sourceId, ...place } = where;
  const rows = await sensors.findAll({
    where: place,
    order: [
      ['towerId', 'ASC'],
      ['ordinal', 'ASC'],
    ],
    transaction,
  });
  const versions = await sensorVersions.findAll({
    where: { id: rows.flatMap((row) => row.liveVersionId ?? []) },
    transaction,
  });
  const allTags = await tags.findAll({ order: [['id', 'ASC']], transaction });
  const byName = (name: string | undefined) => allTags.find((tag) => tag.name === name);
  return rows.flatMap((row): LiveSensor[] => {
    const version = versions.find((candidate) => candidate.id === row.liveVersionId);
    if (!version) return [];
    const { parameters } = version;
    const temperature = byName(parameters.tags.temperature);
    const pressure = byName(parameters.tags.pressure);
    if (!temperature || !pressure) return [];
    if (sourceId !== undefined && temperature.sourceId !== sourceId) return [];
    return [
      {
        row,
        version,
        parameters,
        tags: { temperature, pressure, differentialPressure: byName(parameters.tags.differentialPressure) },
        state: (row.state as SensorState | null) ?? {
          minute: firstMinuteState,
          knowledge: initialKnowledge(parameters, version.madeLiveAt ?? version.createdAt),
        },
      },
    ];
  });
}

/** Makes a sensor ready to evaluate minutes with what is known now. */
export function prepare(
  sensor: LiveSensor,
  knowledge: Knowledge,
  barometricPressure: number,
): PreparedSensor {
  return {
    parameters: sensor.parameters,
    inference: inferenceOf(sensor.parameters, knowledge.base),
    pressureDatum: pressureDatum(sensor, barometricPressure),
  };
}

/** What makes the pressure tag's readings absolute [Pa]. */
export function pressureDatum(sensor: LiveSensor, barometricPressure: number): number {
  return sensor.tags.pressure.quantity === 'pressure-gauge' ? barometricPressure : 0;
}
