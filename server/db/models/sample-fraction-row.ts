import { type InferAttributes, type InferCreationAttributes, Model, type Sequelize } from 'sequelize';
import { integer, real, text } from './columns';

/** Normalised mole fraction of one component in a result. */
export class SampleFractionRow extends Model<
  InferAttributes<SampleFractionRow>,
  InferCreationAttributes<SampleFractionRow>
> {
  declare sampleId: number;
  declare componentId: string;
  declare fraction: number;

  /** A class of its own for each open database. */
  static register(sequelize: Sequelize): typeof SampleFractionRow {
    return class extends SampleFractionRow {}.init(
      {
        sampleId: integer({ primaryKey: true }),
        componentId: text({ primaryKey: true }),
        fraction: real(),
      },
      {
        sequelize,
        modelName: 'SampleFractionRow',
        tableName: 'sample_fraction',
        underscored: true,
        timestamps: false,
      },
    );
  }
}
