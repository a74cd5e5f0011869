import { Sequelize, Transaction } from 'sequelize';
import sqlite3 from 'sqlite3';
import { migrate, type Migration } from './migrate';
import { WriteQueue } from './write-queue';

/**
 * Sequelize opens a new connection for each transaction and fires no hook for SQLite, so the settings are made where
 * every connection passes: in the driver's constructor, before the first statement can run.
 */
class TunedConnection extends sqlite3.Database {
  constructor(file: string, mode: number, opened: (error: Error | null) => void) {
    super(file, mode, (error) => {
      if (error) opened(error);
      else
        this.exec(
          'PRAGMA busy_timeout=5000; PRAGMA journal_mode=WAL; PRAGMA synchronous=NORMAL; PRAGMA foreign_keys=ON; PRAGMA recursive_triggers=ON',
          opened,
        );
    });
  }
}

/** An open, migrated SQLite file with one writer. */
export interface SqliteFile {
  readonly sequelize: Sequelize;
  /**
   * Runs a job in an IMMEDIATE transaction once the earlier ones have ended; all of it lands or nothing. Never await
   * HTTP, mail or a timer inside, and never another `write`.
   */
  write<T>(job: (transaction: Transaction) => Promise<T>): Promise<T>;
  close(): Promise<void>;
}

/**
 * Opens a file (made if missing) and brings its schema up to date.
 *
 * @param upTo name of the last migration to run; all of them when left out
 */
export async function openSqliteFile(
  file: string,
  migrations: readonly Migration[],
  upTo?: string,
): Promise<SqliteFile> {
  const sequelize = new Sequelize({
    dialect: 'sqlite',
    dialectModule: { ...sqlite3, Database: TunedConnection },
    storage: file,
    transactionType: Transaction.TYPES.IMMEDIATE,
    logging: false,
  });
  const queue = new WriteQueue();
  const write = <T>(job: (transaction: Transaction) => Promise<T>) =>
    queue.run(() => sequelize.transaction({ type: Transaction.TYPES.IMMEDIATE }, job));
  try {
    await sequelize.authenticate();
    await migrate({ sequelize, write }, migrations, upTo);
  } catch (error) {
    await sequelize.close();
    throw error;
  }
  return {
    sequelize,
    write,
    async close() {
      await queue.idle();
      await sequelize.close();
    },
  };
}
