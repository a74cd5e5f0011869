import {
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';
import { integer, rowId, text, time } from './columns';

/** A remark of a person on a moment of a trend. */
export class NoteRow extends Model<InferAttributes<NoteRow>, InferCreationAttributes<NoteRow>> {
  declare id: CreationOptional<number>;
  declare sensorId: string;
  declare t: number;
  declare text: string;
  declare authorId: number;
  declare writtenAt: number;

  /** A class of its own for each open database. */
  static register(sequelize: Sequelize): typeof NoteRow {
    return class extends NoteRow {}.init(
      {
        id: rowId,
        sensorId: text(),
        t: time(),
        text: text(),
        authorId: integer(),
        writtenAt: time(),
      },
      { sequelize, modelName: 'NoteRow', tableName: 'note', underscored: true, timestamps: false },
    );
  }
}
