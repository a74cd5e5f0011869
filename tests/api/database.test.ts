import { join } from 'node:path';
import { QueryTypes, type Model, type ModelStatic } from 'sequelize';
import { expect, it, onTestFinished } from 'vitest';
import { insertRows, readSeries } from '../../server/db/bulk';
import { openDatabase, type Database } from '../../server/db/database';
import { migrations } from '../../server/db/migrations';
import { temporaryFolder } from './support/temporary-folder';

async function open(file = join(temporaryFolder(), 'plant.sqlite'), upTo?: string): Promise<Database> {
  const database = await openDatabase(file, { upTo });
  onTestFinished(() => database.close());
  return database;
}

const select = <T extends object>(database: Database, sql: string) =>
  database.sequelize.query<T>(sql, { type: QueryTypes.SELECT });

const schemaOf = (database: Database) =>
  select<{ type: string; name: string; sql: string | null }>(
    database,
    'SELECT type, name, sql FROM sqlite_schema ORDER BY type, name',
  );

async function withTag(database: Database): Promise<number> {
  const source = await database.models.sources.create({ name: 'North', kind: 'http', settings: { a: [1] } });
  const tag = await database.models.tags.create({
    sourceId: source.id,
    name: 'TI-1',
    unit: 'degC',
    quantity: 'temperature',
  });
  return tag.id;
}

it('sets its pragmas on the shared connection and on those of transactions', async () => {
  const database = await open();
  const read = async (transaction?: Parameters<Parameters<Database['write']>[0]>[0]) => {
    const names = ['journal_mode', 'foreign_keys', 'busy_timeout', 'synchronous', 'recursive_triggers'];
    const rows = await Promise.all(
      names.map((name) =>
        database.sequelize.query<Record<string, unknown>>(`SELECT * FROM pragma_${name}`, {
          type: QueryTypes.SELECT,
          transaction,
        }),
      ),
    );
    return rows.map(([row]) => Object.values(row!)[0]);
  };
  const expected = ['wal', 1, 5000, 1, 1];
  expect(await read()).toEqual(expected);
  expect(await database.write((transaction) => read(transaction))).toEqual(expected);
});

it('has a column for each attribute of each model, with the same key and the same nullability, and no other', async () => {
  const database = await open();
  const tables = await select<{ name: string }>(
    database,
    "SELECT name FROM sqlite_schema WHERE type = 'table' AND name NOT LIKE 'sqlite_%' AND name <> 'migration' ORDER BY name",
  );
  const models = Object.values(database.models);
  expect(models.map((model) => model.getTableName()).sort()).toEqual(tables.map((table) => table.name));
  for (const model of models) {
    const columns = await select<{ name: string; notnull: number; pk: number; type: string }>(
      database,
      `SELECT * FROM pragma_table_info('${model.tableName}')`,
    );
    const described = columns.map((column) => ({
      name: column.name,
      isKey: column.pk > 0,
      mayBeNull: column.notnull === 0 && column.pk === 0,
    }));
    const declared = Object.values((model as ModelStatic<Model>).getAttributes()).map((attribute) => ({
      name: attribute.field,
      isKey: attribute.primaryKey === true,
      mayBeNull: attribute.allowNull === true,
    }));
    expect({ table: model.tableName, columns: declared }).toEqual({
      table: model.tableName,
      columns: described,
    });
  }
});

it('upgrades a database of each earlier schema with its rows intact to the very schema of a fresh one', async () => {
  const fresh = await schemaOf(await open());
  for (const { name } of migrations.slice(0, -1)) {
    const file = join(temporaryFolder(), 'plant.sqlite');
    const older = await openDatabase(file, { upTo: name });
    await older.sequelize.query(
      "INSERT INTO user VALUES (7, 'ada', 'Ada', 'engineer', 'hash', 0, 1700000000000)",
    );
    await older.sequelize.query('INSERT INTO setting VALUES (\'site\', \'{"name":"Old name"}\')');
    const hasPlant = name !== migrations[0]!.name;
    if (hasPlant) {
      const tag = await withTag(older);
      await older.write((transaction) =>
        insertRows(
          transaction,
          'tag_value',
          ['tag_id', 't', 'value', 'status'],
          [[tag, 60_000, 0.1 + 0.2, 0]],
        ),
      );
      await older.sequelize.query("INSERT INTO tower VALUES ('old-tower', 'Old', '', 0)");
    }
    await older.close();

    const upgraded = await open(file);
    expect(await schemaOf(upgraded)).toEqual(fresh);
    expect((await upgraded.models.users.findByPk(7))?.username).toBe('ada');
    expect((await upgraded.models.settings.findByPk('site'))?.value).toEqual({ name: 'Old name' });
    expect((await upgraded.models.tagValues.findAll()).map((row) => row.value)).toEqual(
      hasPlant ? [0.1 + 0.2] : [],
    );
    expect(await upgraded.models.towers.count()).toBe(hasPlant ? 1 : 0);
    expect(await select(upgraded, 'PRAGMA foreign_key_check')).toEqual([]);
  }
});

it('refuses a database that a later release has written to', async () => {
  const file = join(temporaryFolder(), 'plant.sqlite');
  const database = await openDatabase(file);
  await database.sequelize.query("INSERT INTO migration VALUES ('99-from-the-future')");
  await database.close();
  await expect(openDatabase(file)).rejects.toThrow(/later release.*99-from-the-future/);
});

it('leaves nothing of a migration step that fails half way', async () => {
  const file = join(temporaryFolder(), 'plant.sqlite');
  const older = await openDatabase(file, { upTo: migrations[0]!.name });
  await older.sequelize.query('CREATE TABLE tower (in_the_way TEXT)');
  await older.close();
  await expect(openDatabase(file)).rejects.toThrow(/tower already exists/);
  const again = await openDatabase(file, { upTo: migrations[0]!.name });
  onTestFinished(() => again.close());
  const names = (await schemaOf(again)).map((entry) => entry.name);
  expect(names).toContain('tower');
  expect(names).not.toContain('source');
});

it('gives back every bit of a double, and null for what is no number', async () => {
  const database = await open();
  const tag = await withTag(database);
  const values: number[] = [5e-324, Number.MAX_VALUE, -0.1, 1 / 3, 1e15 + 0.3, 2 ** 53, 1e9 + 1 / 7];
  for (let i = 0; i < 20_000; i++) values.push((Math.sin(i) * 1e5 + i / 7) * 10 ** ((i % 61) - 30));
  const rows = values.map((value, minute) => [tag, minute * 60_000, value, minute % 3]);
  rows.push([tag, values.length * 60_000, NaN, 2], [tag, (values.length + 1) * 60_000, Infinity, 2]);
  await database.write((transaction) =>
    insertRows(transaction, 'tag_value', ['tag_id', 't', 'value', 'status'], rows),
  );
  const read = await readSeries(database.sequelize, {
    table: 'tag_value',
    key: { column: 'tag_id', value: tag },
    columns: ['value', 'status'],
    from: 0,
    to: 1e13,
  });
  expect(read.t).toEqual(rows.map((row) => row[1]));
  expect(read.status).toEqual(rows.map((row) => row[3]));
  const differing = values.filter((value, index) => !Object.is(value, read.value[index]));
  expect(differing).toEqual([]);
  expect(read.value.slice(values.length)).toEqual([null, null]);
});

it('reads a stretch from its first moment up to but without its last', async () => {
  const database = await open();
  const tag = await withTag(database);
  const minutes = [0, 1, 2, 30_000, 30_001].map((minute) => minute * 60_000);
  await database.write((transaction) =>
    insertRows(
      transaction,
      'tag_value',
      ['tag_id', 't', 'value', 'status'],
      minutes.map((t) => [tag, t, t, 0]),
    ),
  );
  const read = (from: number, to: number) =>
    readSeries(database.sequelize, {
      table: 'tag_value',
      key: { column: 'tag_id', value: tag },
      columns: ['value'],
      from,
      to,
    });
  expect((await read(60_000, 30_001 * 60_000)).t).toEqual(minutes.slice(1, 4));
  expect((await read(5 * 60_000, 6 * 60_000)).t).toEqual([]);
});

it('follows the conflict clause for rows that are there already', async () => {
  const database = await open();
  const tag = await withTag(database);
  const insert = (value: number, clause?: string) =>
    database.write((transaction) =>
      insertRows(transaction, 'tag_value', ['tag_id', 't', 'value', 'status'], [[tag, 0, value, 0]], clause),
    );
  const stored = async () => (await database.models.tagValues.findAll()).map((row) => row.value);
  await insert(1);
  await insert(2, 'ON CONFLICT DO NOTHING');
  expect(await stored()).toEqual([1]);
  await insert(3, 'ON CONFLICT (tag_id, t) DO UPDATE SET value = excluded.value');
  expect(await stored()).toEqual([3]);
  await expect(insert(4)).rejects.toThrow(/UNIQUE constraint/);
});

it('runs fifty writers and fifty readers at once without a busy database and loses no write', async () => {
  const database = await open();
  const tag = await withTag(database);
  const writers = Array.from({ length: 50 }, (_, writer) =>
    database.write(async (transaction) => {
      const count = await database.models.tagValues.count({ transaction });
      await insertRows(
        transaction,
        'tag_value',
        ['tag_id', 't', 'value', 'status'],
        Array.from({ length: 100 }, (_, i) => [tag, count + i, writer, 0]),
      );
    }),
  );
  const readers = Array.from({ length: 50 }, () => database.models.tagValues.count());
  await Promise.all([...writers, ...readers]);
  expect(await database.models.tagValues.count()).toBe(5000);
});

it('undoes a write that fails, and goes on with the next', async () => {
  const database = await open();
  const failing = database.write(async (transaction) => {
    await database.models.towers.create({ id: 'gone', name: 'Gone' }, { transaction });
    throw new Error('on purpose');
  });
  const next = database.write((transaction) =>
    database.models.towers.create({ id: 'kept', name: 'Kept' }, { transaction }),
  );
  await expect(failing).rejects.toThrow('on purpose');
  await next;
  expect((await database.models.towers.findAll()).map((tower) => tower.id)).toEqual(['kept']);
});

it('says so at once when a write is started inside another, instead of waiting for ever', async () => {
  const database = await open();
  await expect(database.write(() => database.write(() => Promise.resolve()))).rejects.toThrow(
    /inside another write/,
  );
});

it('keeps JSON, flags and times as they were given, through create and through update', async () => {
  const { models } = await open();
  const source = await models.sources.create({
    name: 'North',
    kind: 'http',
    settings: { url: 'http://a', deep: [{ b: 0.1 }] },
    lastContactAt: 1_700_000_000_123,
  });
  const read = () => models.sources.findByPk(source.id, { rejectOnEmpty: true });
  expect(await read()).toMatchObject({
    settings: { url: 'http://a', deep: [{ b: 0.1 }] },
    paused: false,
    connected: null,
    lastContactAt: 1_700_000_000_123,
  });
  await models.sources.update(
    { settings: { url: 'http://c' }, paused: true, connected: false },
    { where: { id: source.id } },
  );
  expect(await read()).toMatchObject({ settings: { url: 'http://c' }, paused: true, connected: false });
  const row = await read();
  row.settings = { url: 'http://d' };
  row.connected = true;
  await row.save();
  expect(await read()).toMatchObject({ settings: { url: 'http://d' }, connected: true });
  expect(await models.sources.count({ where: { connected: true } })).toBe(1);
});

it.each([
  ['an unknown role', "INSERT INTO user VALUES (1, 'a', 'A', 'king', 'h', 0, 0)", /CHECK/],
  [
    'a second user of the same name in other letters',
    "INSERT INTO user VALUES (8, 'ADA', 'A', 'operator', 'h', 0, 0)",
    /UNIQUE/,
  ],
  ['a reading of a tag that does not exist', 'INSERT INTO tag_value VALUES (99, 0, 1.0, 0)', /FOREIGN KEY/],
  [
    'a sensor on a tower that does not exist',
    "INSERT INTO sensor (id, tower_id, name, symbol, point) VALUES ('s', 'none', 'n', 's', 'overhead')",
    /FOREIGN KEY/,
  ],
  ['words where a number belongs', "INSERT INTO tag_value VALUES (1, 0, 'high', 0)", /cannot store TEXT/],
  ['settings that are no JSON object', "INSERT INTO setting VALUES ('site', '\"text\"')", /CHECK/],
])('refuses %s in the database itself', async (_what, statement, reason) => {
  const database = await open();
  await database.models.users.create({
    username: 'ada',
    name: 'Ada',
    role: 'engineer',
    passwordHash: 'h',
    createdAt: 0,
  });
  await withTag(database);
  const refusal: unknown = await database.sequelize.query(statement).catch((error: unknown) => error);
  // Sequelize calls every broken constraint a validation error; the driver's own words are kept beneath.
  expect((refusal as { original?: Error }).original?.message).toMatch(reason);
});
