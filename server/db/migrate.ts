import { QueryTypes, type Sequelize, type Transaction } from 'sequelize';
import { Umzug } from 'umzug';

/** One step of the schema. A step that has landed is never edited; changes are further steps, in SQL `ALTER`. */
export interface Migration {
  readonly name: string;
  readonly statements: readonly string[];
}

interface Target {
  readonly sequelize: Sequelize;
  write<T>(job: (transaction: Transaction) => Promise<T>): Promise<T>;
}

/**
 * Runs the steps that have not run yet, each in one transaction with the note that it ran: a process killed in between
 * leaves either the old schema or the new one, never a step that would run twice.
 */
export async function migrate(
  target: Target,
  migrations: readonly Migration[],
  upTo?: string,
): Promise<void> {
  await target.write((transaction) =>
    target.sequelize.query(
      'CREATE TABLE IF NOT EXISTS migration (name TEXT PRIMARY KEY NOT NULL) STRICT, WITHOUT ROWID',
      { transaction },
    ),
  );
  const umzug = new Umzug({
    migrations: migrations.map((migration) => ({
      name: migration.name,
      up: () =>
        target.write(async (transaction) => {
          for (const statement of migration.statements)
            await target.sequelize.query(statement, { transaction });
          await target.sequelize.query('INSERT INTO migration (name) VALUES ($1)', {
            bind: [migration.name],
            transaction,
          });
        }),
    })),
    storage: {
      // Noted by the step itself, in its own transaction.
      logMigration: () => Promise.resolve(),
      unlogMigration: ({ name }) =>
        Promise.reject(new Error(`${name} cannot be undone: restore a backup instead.`)),
      executed: () => landed(target.sequelize),
    },
    logger: undefined,
  });
  const done = await landed(target.sequelize);
  refuseNewerSchema(done, migrations);
  if (upTo === undefined) await umzug.up();
  else if (!done.includes(upTo)) await umzug.up({ to: upTo });
}

async function landed(sequelize: Sequelize): Promise<string[]> {
  const rows = await sequelize.query<{ name: string }>('SELECT name FROM migration ORDER BY name', {
    type: QueryTypes.SELECT,
  });
  return rows.map((row) => row.name);
}

/** A database written by a later release must not be written to by this one. */
function refuseNewerSchema(done: readonly string[], migrations: readonly Migration[]): void {
  const unknown = done.filter((name) => !migrations.some((migration) => migration.name === name));
  if (unknown.length > 0)
    throw new Error(
      `The database was made by a later release of Dewmark (it has the schema step ${unknown.join(', ')}); start that release, or restore a backup.`,
    );
}
