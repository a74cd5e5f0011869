import {
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';
import { integer, json, text, time } from './columns';

/** What is inferred at one end of a tower. `state` is what the evaluation carries from minute to minute; all minutes before `evaluatedTo` are done. */
export class SensorRow extends Model<InferAttributes<SensorRow>, InferCreationAttributes<SensorRow>> {
  declare id: string;
  declare towerId: string;
  declare name: string;
  declare symbol: string;
  declare point: 'overhead' | 'bottoms';
  declare ordinal: CreationOptional<number>;
  declare liveVersionId: CreationOptional<number | null>;
  declare state: CreationOptional<object | null>;
  declare evaluatedTo: CreationOptional<number | null>;

  /** A class of its own for each open database. */
  static register(sequelize: Sequelize): typeof SensorRow {
    return class extends SensorRow {}.init(
      {
        id: text({ primaryKey: true }),
        towerId: text(),
        name: text(),
        symbol: text(),
        point: text(),
        ordinal: integer({ defaultValue: 0 }),
        liveVersionId: integer({ allowNull: true }),
        state: json('state', { allowNull: true }),
        evaluatedTo: time({ allowNull: true }),
      },
      { sequelize, modelName: 'SensorRow', tableName: 'sensor', underscored: true, timestamps: false },
    );
  }
}
