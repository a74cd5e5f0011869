import {
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';
import type { Quantity } from './quantity';
import { integer, rowId, text, time } from './columns';

/** One measured point of a source. */
export class TagRow extends Model<InferAttributes<TagRow>, InferCreationAttributes<TagRow>> {
  declare id: CreationOptional<number>;
  declare sourceId: number;
  declare name: string;
  declare description: CreationOptional<string>;
  declare unit: string;
  declare quantity: Quantity;
  declare watermark: CreationOptional<number | null>;

  /** A class of its own for each open database. */
  static register(sequelize: Sequelize): typeof TagRow {
    return class extends TagRow {}.init(
      {
        id: rowId,
        sourceId: integer(),
        name: text(),
        description: text({ defaultValue: '' }),
        unit: text(),
        quantity: text(),
        watermark: time({ allowNull: true }),
      },
      { sequelize, modelName: 'TagRow', tableName: 'tag', underscored: true, timestamps: false },
    );
  }
}
