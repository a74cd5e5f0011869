import { type InferAttributes, type InferCreationAttributes, Model, type Sequelize } from 'sequelize';
import { integer, real, time } from './columns';

/** One reading in SI; null where the historian gave no number. Bulk reads and writes go through `db/bulk`. */
export class TagValueRow extends Model<InferAttributes<TagValueRow>, InferCreationAttributes<TagValueRow>> {
  declare tagId: number;
  declare t: number;
  declare value: number | null;
  declare status: number;

  /** A class of its own for each open database. */
  static register(sequelize: Sequelize): typeof TagValueRow {
    return class extends TagValueRow {}.init(
      {
        tagId: integer({ primaryKey: true }),
        t: time({ primaryKey: true }),
        value: real({ allowNull: true }),
        status: integer(),
      },
      { sequelize, modelName: 'TagValueRow', tableName: 'tag_value', underscored: true, timestamps: false },
    );
  }
}
