import {
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  Model,
  type Sequelize,
} from 'sequelize';
import type { JournalEntry } from '@shared/api/journal';
import type { Role } from '@shared/api/session';
import { integer, json, rowId, text, time } from './columns';

/** One line of the record; name and role are those of the moment. Written by the journal service alone, never changed. */
export class JournalEntryRow extends Model<
  InferAttributes<JournalEntryRow>,
  InferCreationAttributes<JournalEntryRow>
> {
  declare id: CreationOptional<number>;
  declare t: number;
  declare userId: number | null;
  declare userName: string | null;
  declare userRole: Role | null;
  declare action: string;
  declare subjectKind: string;
  declare subjectId: string;
  declare subjectName: string;
  declare changes: JournalEntry['changes'];
  declare reason: string;
  declare previousHash: string;
  declare hash: string;

  /** A class of its own for each open database. */
  static register(sequelize: Sequelize): typeof JournalEntryRow {
    return class extends JournalEntryRow {}.init(
      {
        id: rowId,
        t: time(),
        userId: integer({ allowNull: true }),
        userName: text({ allowNull: true }),
        userRole: text({ allowNull: true }),
        action: text(),
        subjectKind: text(),
        subjectId: text(),
        subjectName: text(),
        changes: json('changes'),
        reason: text(),
        previousHash: text(),
        hash: text(),
      },
      {
        sequelize,
        modelName: 'JournalEntryRow',
        tableName: 'journal_entry',
        underscored: true,
        timestamps: false,
      },
    );
  }
}
