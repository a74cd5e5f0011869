import { migrations } from './migrations';
import { registerModels, type Models } from './models';
import { openSqliteFile, type SqliteFile } from './sqlite-file';

/** The plant's database. Only this folder and the service that owns a table touch its models. */
export interface Database extends SqliteFile {
  readonly models: Models;
}

/**
 * Opens the plant's database, made if missing, its schema brought up to date.
 *
 * @param options.upTo name of the last migration to run, for tests of upgrades
 */
export async function openDatabase(file: string, options: { upTo?: string } = {}): Promise<Database> {
  const opened = await openSqliteFile(file, migrations, options.upTo);
  return { ...opened, models: registerModels(opened.sequelize) };
}
