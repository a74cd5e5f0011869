import {
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';
import { flag, json, rowId, text, time } from './columns';

/** Where readings come from. */
export class SourceRow extends Model<InferAttributes<SourceRow>, InferCreationAttributes<SourceRow>> {
  declare id: CreationOptional<number>;
  declare name: string;
  declare kind: 'http';
  declare settings: Record<string, unknown>;
  declare paused: CreationOptional<boolean>;
  declare connected: CreationOptional<boolean | null>;
  declare lastError: CreationOptional<string | null>;
  declare lastContactAt: CreationOptional<number | null>;

  /** A class of its own for each open database. */
  static register(sequelize: Sequelize): typeof SourceRow {
    return class extends SourceRow {}.init(
      {
        id: rowId,
        name: text(),
        kind: text(),
        settings: json('settings'),
        paused: flag('paused', { defaultValue: false }),
        connected: flag('connected', { allowNull: true }),
        lastError: text({ allowNull: true }),
        lastContactAt: time({ allowNull: true }),
      },
      { sequelize, modelName: 'SourceRow', tableName: 'source', underscored: true, timestamps: false },
    );
  }
}
