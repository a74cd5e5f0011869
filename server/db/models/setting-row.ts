import { type InferAttributes, type InferCreationAttributes, Model, type Sequelize } from 'sequelize';
import { json, text } from './columns';

/** One group of settings as a JSON object. */
export class SettingRow extends Model<InferAttributes<SettingRow>, InferCreationAttributes<SettingRow>> {
  declare key: string;
  declare value: Record<string, unknown>;

  /** A class of its own for each open database. */
  static register(sequelize: Sequelize): typeof SettingRow {
    return class extends SettingRow {}.init(
      {
        key: text({ primaryKey: true }),
        value: json('value'),
      },
      { sequelize, modelName: 'SettingRow', tableName: 'setting', underscored: true, timestamps: false },
    );
  }
}
