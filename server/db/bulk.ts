import { QueryTypes, type Sequelize, type Transaction } from 'sequelize';
import type sqlite3 from 'sqlite3';

export type Cell = number | string | null;

/** SQLite takes at most this many bound values a statement. */
const mostBoundValues = 32_766;

/**
 * Inserts many rows by bound values, the only way in that keeps every bit of a double (SQL literals and SQLite's JSON may
 * change the last one). NaN and infinities are stored as NULL: an unknown is never a number.
 *
 * @param rows cells in the order of `columns`
 * @param conflictClause what to do about rows already there, e.g. `ON CONFLICT DO NOTHING`; empty lets them fail
 */
export async function insertRows(
  transaction: Transaction,
  table: string,
  columns: readonly string[],
  rows: readonly (readonly Cell[])[],
  conflictClause = '',
): Promise<void> {
  const rowsAtOnce = Math.min(1000, Math.floor(mostBoundValues / columns.length));
  const placeholders = `(${columns.map(() => '?').join(',')})`;
  for (let start = 0; start < rows.length; start += rowsAtOnce) {
    const part = rows.slice(start, start + rowsAtOnce);
    const sql = `INSERT INTO ${table} (${columns.join(',')}) VALUES ${part.map(() => placeholders).join(',')} ${conflictClause}`;
    await run(
      transaction,
      sql,
      part.flatMap((row) =>
        row.map((cell) => (typeof cell === 'number' && !Number.isFinite(cell) ? null : cell)),
      ),
    );
  }
}

/** Sequelize's own bound queries are quadratic in the number of values; its transaction carries the driver's connection. */
function run(transaction: Transaction, sql: string, values: readonly Cell[]): Promise<void> {
  const { connection } = transaction as Transaction & { readonly connection: sqlite3.Database };
  return new Promise((resolve, reject) => {
    connection.run(sql, values, (error: Error | null) => (error ? reject(error) : resolve()));
  });
}

/** Columns of equal length in order of time; `t` in UTC milliseconds. */
export type Series<Column extends string> = Record<Column, (number | null)[]> & { t: number[] };

export interface SeriesQuery<Column extends string> {
  readonly table: string;
  /** Which series: the first column of the table's key and its value. */
  readonly key: { readonly column: string; readonly value: number | string };
  /** Numeric columns to read besides `t`. */
  readonly columns: readonly Column[];
  /** UTC milliseconds, inclusive. */
  readonly from: number;
  /** UTC milliseconds, exclusive. */
  readonly to: number;
  readonly transaction?: Transaction;
}

const week = 7 * 24 * 3600 * 1000;

/**
 * Reads a stretch of a table keyed by (series, t), every double with all its bits.
 *
 * One row a week comes back, its columns as text: a row a minute would hold the event loop for seconds in a year, and
 * SQLite's JSON functions round to 15 digits. 18 digits of `%!.18g` bring each double back exactly.
 */
export async function readSeries<Column extends string>(
  sequelize: Sequelize,
  query: SeriesQuery<Column>,
): Promise<Series<Column>> {
  const names = ['t', ...query.columns];
  // `format` turns NULL into 0.0, hence the CASE.
  const asText = (name: string) =>
    `group_concat(CASE typeof(${name}) WHEN 'real' THEN format('%!.18g', ${name}) WHEN 'null' THEN 'null' ELSE ${name} END) AS ${name}`;
  const sql =
    `SELECT ${names.map(asText).join(', ')} FROM (SELECT ${names.join(', ')} FROM ${query.table} ` +
    `WHERE ${query.key.column} = $1 AND t >= $2 AND t < $3 ORDER BY t)`;
  const columns = new Map<string, (number | null)[]>(names.map((name) => [name, []]));
  const [from, to] = await clip(sequelize, query);
  for (let start = from; start < to; start += week) {
    const [row] = await sequelize.query<Record<string, string | null>>(sql, {
      bind: [query.key.value, start, Math.min(start + week, to)],
      type: QueryTypes.SELECT,
      transaction: query.transaction,
    });
    for (const [name, column] of columns) {
      const part = JSON.parse(`[${row?.[name] ?? ''}]`) as (number | null)[];
      for (const value of part) column.push(value);
    }
  }
  return Object.fromEntries(columns) as Series<Column>;
}

/** The part of the asked stretch that holds rows, so that "since 1970" does not take a query for each empty week. */
async function clip(sequelize: Sequelize, query: SeriesQuery<string>): Promise<[number, number]> {
  const { table, key, from, to, transaction } = query;
  const edge = (order: 'ASC' | 'DESC') =>
    `(SELECT t FROM ${table} WHERE ${key.column} = $1 AND t >= $2 AND t < $3 ORDER BY t ${order} LIMIT 1)`;
  const [row] = await sequelize.query<{ first: number | null; last: number | null }>(
    `SELECT ${edge('ASC')} AS first, ${edge('DESC')} AS last`,
    { bind: [key.value, from, to], type: QueryTypes.SELECT, transaction },
  );
  return row?.first == null || row.last == null ? [0, 0] : [row.first, row.last + 1];
}
