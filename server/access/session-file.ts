import { DataTypes, type Model, type ModelStatic } from 'sequelize';
import type { Migration } from '../db/migrate';
import { openSqliteFile, type SqliteFile } from '../db/sqlite-file';

/**
 * Sessions and failed sign-ins, in a file of their own: they are written by every person at any time and would otherwise
 * wait for the collector's transactions. Losing the file signs everybody out and nothing more.
 */
export interface SessionsDatabase extends SqliteFile {
  readonly sessions: ModelStatic<Model>;
}

export const sessionModelName = 'Session';

const migrations: readonly Migration[] = [
  {
    name: '01-sessions',
    statements: [
      `CREATE TABLE session (
        sid TEXT PRIMARY KEY NOT NULL,
        expires INTEGER NOT NULL,
        data TEXT NOT NULL
      ) STRICT`,
      'CREATE INDEX session_expires ON session (expires)',
      `CREATE TABLE sign_in_failure (
        username TEXT NOT NULL COLLATE NOCASE,
        address TEXT NOT NULL,
        failures INTEGER NOT NULL CHECK (failures > 0),
        last_at INTEGER NOT NULL,
        locked_until INTEGER,
        PRIMARY KEY (username, address)
      ) STRICT, WITHOUT ROWID`,
    ],
  },
];

export async function openSessionsDatabase(file: string): Promise<SessionsDatabase> {
  const opened = await openSqliteFile(file, migrations);
  const sessions = opened.sequelize.define(
    sessionModelName,
    {
      sid: { type: DataTypes.TEXT, primaryKey: true },
      expires: {
        type: DataTypes.BIGINT,
        allowNull: false,
        /** The store hands in a Date; a STRICT table keeps UTC milliseconds. */
        set(value: Date | number) {
          this.setDataValue('expires', Number(value));
        },
      },
      data: { type: DataTypes.TEXT, allowNull: false },
    },
    { tableName: 'session', timestamps: false },
  );
  return { ...opened, sessions };
}
