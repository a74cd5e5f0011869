import {
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';
import { integer, text } from './columns';

/** A distillation tower. */
export class TowerRow extends Model<InferAttributes<TowerRow>, InferCreationAttributes<TowerRow>> {
  declare id: string;
  declare name: string;
  declare description: CreationOptional<string>;
  declare ordinal: CreationOptional<number>;

  /** A class of its own for each open database. */
  static register(sequelize: Sequelize): typeof TowerRow {
    return class extends TowerRow {}.init(
      {
        id: text({ primaryKey: true }),
        name: text(),
        description: text({ defaultValue: '' }),
        ordinal: integer({ defaultValue: 0 }),
      },
      { sequelize, modelName: 'TowerRow', tableName: 'tower', underscored: true, timestamps: false },
    );
  }
}
