import { site, type Site } from '@shared/api/session';
import { QueryTypes } from 'sequelize';
import * as z from 'zod';
import type { Database } from '../db/database';

/** Every group of settings kept in the database, with what holds until somebody says otherwise. */
const groups = {
  site: site.extend({
    name: site.shape.name.default('Unnamed site'),
    timeZone: site.shape.timeZone.refine(isTimeZone, 'not a known time zone').default('UTC'),
    barometricPressure: site.shape.barometricPressure.min(50_000).max(110_000).default(101_325),
    demonstration: site.shape.demonstration.default(false),
  }),
  access: z.object({
    /** A session nobody uses ends after this long; a control room's shift is twelve hours. */
    idleHours: z.number().min(0.1).max(168).default(12),
    /** Every session ends after this long, used or not. */
    absoluteDays: z.number().min(0.1).max(31).default(7),
  }),
};
type Groups = typeof groups;
type Group = keyof Groups;
export type AccessSettings = z.infer<Groups['access']>;

/** The site's settings: rows of `setting`, each group checked by one schema. */
export class Settings {
  constructor(private readonly database: Database) {}

  site(): Promise<Site> {
    return this.#read('site');
  }

  access(): Promise<AccessSettings> {
    return this.#read('access');
  }

  /** The site's barometric pressure [Pa]. */
  barometricPressure = async (): Promise<number> => (await this.site()).barometricPressure;

  async #read<G extends Group>(group: G): Promise<z.infer<Groups[G]>> {
    // A plain statement, because every page asks for it: a model would ask for the table's types first.
    const [row] = await this.database.sequelize.query<{ value: string }>(
      'SELECT value FROM setting WHERE key = $1',
      { bind: [group], type: QueryTypes.SELECT },
    );
    return groups[group].parse(row ? JSON.parse(row.value) : {}) as z.infer<Groups[G]>;
  }
}

function isTimeZone(name: string): boolean {
  try {
    new Intl.DateTimeFormat('en', { timeZone: name });
    return true;
  } catch {
    return false; // a RangeError is how Intl says it does not know the zone
  }
}
