import {
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';
import { integer, real, text } from './columns';

/** What one sample did to one sensor's offset. */
export class CorrectionRow extends Model<
  InferAttributes<CorrectionRow>,
  InferCreationAttributes<CorrectionRow>
> {
  declare sensorId: string;
  declare sampleId: number;
  declare decision: 'used' | 'held' | 'rejected';
  declare value: number;
  declare temperature: number;
  declare pressure: number;
  declare observedOffset: number;
  declare innovation: number;
  declare innovationVariance: number;
  declare gain: number;
  declare offsetBefore: number;
  declare offsetAfter: number;
  declare varianceBefore: number;
  declare varianceAfter: number;
  declare shapeError: CreationOptional<number | null>;
  declare readingsVariance: number;

  /** A class of its own for each open database. */
  static register(sequelize: Sequelize): typeof CorrectionRow {
    return class extends CorrectionRow {}.init(
      {
        sensorId: text({ primaryKey: true }),
        sampleId: integer({ primaryKey: true }),
        decision: text(),
        value: real(),
        temperature: real(),
        pressure: real(),
        observedOffset: real(),
        innovation: real(),
        innovationVariance: real(),
        gain: real(),
        offsetBefore: real(),
        offsetAfter: real(),
        varianceBefore: real(),
        varianceAfter: real(),
        shapeError: real({ allowNull: true }),
        readingsVariance: real({ defaultValue: 0 }),
      },
      {
        sequelize,
        modelName: 'CorrectionRow',
        tableName: 'correction',
        underscored: true,
        timestamps: false,
      },
    );
  }
}
