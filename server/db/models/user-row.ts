import {
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';
import type { Role } from '@shared/api/session';
import { flag, rowId, text, time } from './columns';

/** Someone who may sign in. */
export class UserRow extends Model<InferAttributes<UserRow>, InferCreationAttributes<UserRow>> {
  declare id: CreationOptional<number>;
  declare username: string;
  declare name: string;
  declare role: Role;
  declare passwordHash: string;
  declare disabled: CreationOptional<boolean>;
  declare createdAt: number;

  /** A class of its own for each open database. */
  static register(sequelize: Sequelize): typeof UserRow {
    return class extends UserRow {}.init(
      {
        id: rowId,
        username: text(),
        name: text(),
        role: text(),
        passwordHash: text(),
        disabled: flag('disabled', { defaultValue: false }),
        createdAt: time(),
      },
      { sequelize, modelName: 'UserRow', tableName: 'user', underscored: true, timestamps: false },
    );
  }
}
