import {
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';
import type { SensorParameters } from '@shared/api/sensor-parameters';
import { integer, json, rowId, text, time } from './columns';

/** One set of parameters of a sensor; a live one never changes in place. */
export class SensorVersionRow extends Model<
  InferAttributes<SensorVersionRow>,
  InferCreationAttributes<SensorVersionRow>
> {
  declare id: CreationOptional<number>;
  declare sensorId: string;
  declare number: number;
  declare state: 'draft' | 'submitted' | 'trial' | 'live' | 'retired';
  declare parameters: SensorParameters;
  declare reason: CreationOptional<string>;
  declare createdBy: CreationOptional<number | null>;
  declare createdAt: number;
  declare madeLiveAt: CreationOptional<number | null>;

  /** A class of its own for each open database. */
  static register(sequelize: Sequelize): typeof SensorVersionRow {
    return class extends SensorVersionRow {}.init(
      {
        id: rowId,
        sensorId: text(),
        number: integer(),
        state: text(),
        parameters: json('parameters'),
        reason: text({ defaultValue: '' }),
        createdBy: integer({ allowNull: true }),
        createdAt: time(),
        madeLiveAt: time({ allowNull: true }),
      },
      {
        sequelize,
        modelName: 'SensorVersionRow',
        tableName: 'sensor_version',
        underscored: true,
        timestamps: false,
      },
    );
  }
}
