import {
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';
import type { SampleState } from '@shared/api/sensors';
import { integer, real, rowId, text, time } from './columns';

/** One laboratory result; `enteredBy` is null when the system itself took it in. */
export class SampleRow extends Model<InferAttributes<SampleRow>, InferCreationAttributes<SampleRow>> {
  declare id: CreationOptional<number>;
  declare towerId: string;
  declare point: 'overhead' | 'bottoms';
  declare drawnAt: number;
  declare receivedAt: number;
  declare enteredAt: number;
  declare enteredBy: CreationOptional<number | null>;
  declare reportedSum: number;
  declare remark: CreationOptional<string>;
  declare state: SampleState;
  declare stateReason: CreationOptional<string>;
  declare verdict: CreationOptional<'accepted' | 'rejected' | null>;

  /** A class of its own for each open database. */
  static register(sequelize: Sequelize): typeof SampleRow {
    return class extends SampleRow {}.init(
      {
        id: rowId,
        towerId: text(),
        point: text(),
        drawnAt: time(),
        receivedAt: time(),
        enteredAt: time(),
        enteredBy: integer({ allowNull: true }),
        reportedSum: real(),
        remark: text({ defaultValue: '' }),
        state: text(),
        stateReason: text({ defaultValue: '' }),
        verdict: text({ allowNull: true }),
      },
      { sequelize, modelName: 'SampleRow', tableName: 'sample', underscored: true, timestamps: false },
    );
  }
}
