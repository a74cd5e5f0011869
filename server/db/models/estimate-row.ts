import { type InferAttributes, type InferCreationAttributes, Model, type Sequelize } from 'sequelize';
import { integer, real, text, time } from './columns';

/** One evaluated minute. Bulk reads and writes go through `db/bulk`. */
export class EstimateRow extends Model<InferAttributes<EstimateRow>, InferCreationAttributes<EstimateRow>> {
  declare sensorId: string;
  declare t: number;
  declare versionId: number;
  declare temperature: number | null;
  declare pressure: number | null;
  declare value: number | null;
  declare low: number | null;
  declare high: number | null;
  declare rundown: number | null;
  declare offset: number;
  declare offsetVariance: number;
  declare sigmaShape: number | null;
  declare baseSampleId: number | null;
  declare quality: number;
  declare reasons: number;

  /** A class of its own for each open database. */
  static register(sequelize: Sequelize): typeof EstimateRow {
    return class extends EstimateRow {}.init(
      {
        sensorId: text({ primaryKey: true }),
        t: time({ primaryKey: true }),
        versionId: integer(),
        temperature: real({ allowNull: true }),
        pressure: real({ allowNull: true }),
        value: real({ allowNull: true }),
        low: real({ allowNull: true }),
        high: real({ allowNull: true }),
        rundown: real({ allowNull: true }),
        offset: real(),
        offsetVariance: real(),
        sigmaShape: real({ allowNull: true }),
        baseSampleId: integer({ allowNull: true }),
        quality: integer(),
        reasons: integer(),
      },
      { sequelize, modelName: 'EstimateRow', tableName: 'estimate', underscored: true, timestamps: false },
    );
  }
}
