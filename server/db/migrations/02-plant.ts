import type { Migration } from '../migrate';

/** Where readings come from, the readings, the towers, and the sensors set up on them. */
export const plant: Migration = {
  name: '02-plant',
  statements: [
    `CREATE TABLE source (
      id INTEGER PRIMARY KEY,
      name TEXT NOT NULL UNIQUE,
      kind TEXT NOT NULL CHECK (kind IN ('http')),
      settings TEXT NOT NULL CHECK (json_valid(settings)),
      paused INTEGER NOT NULL DEFAULT 0 CHECK (paused IN (0, 1)),
      connected INTEGER CHECK (connected IN (0, 1)),
      last_error TEXT,
      last_contact_at INTEGER
    ) STRICT`,
    `CREATE TABLE tag (
      id INTEGER PRIMARY KEY,
      source_id INTEGER NOT NULL REFERENCES source (id),
      name TEXT NOT NULL,
      description TEXT NOT NULL DEFAULT '',
      unit TEXT NOT NULL,
      quantity TEXT NOT NULL CHECK (quantity IN
        ('temperature', 'pressure-gauge', 'pressure-absolute', 'pressure-difference', 'flow', 'other')),
      watermark INTEGER,
      UNIQUE (source_id, name)
    ) STRICT`,
    `CREATE TABLE tag_value (
      tag_id INTEGER NOT NULL REFERENCES tag (id),
      t INTEGER NOT NULL,
      value REAL,
      status INTEGER NOT NULL,
      PRIMARY KEY (tag_id, t)
    ) STRICT, WITHOUT ROWID`,
    `CREATE TABLE tower (
      id TEXT PRIMARY KEY NOT NULL CHECK (length(id) BETWEEN 1 AND 80),
      name TEXT NOT NULL,
      description TEXT NOT NULL DEFAULT '',
      ordinal INTEGER NOT NULL DEFAULT 0
    ) STRICT`,
    `CREATE TABLE sensor (
      id TEXT PRIMARY KEY NOT NULL CHECK (length(id) BETWEEN 1 AND 80),
      tower_id TEXT NOT NULL REFERENCES tower (id),
      name TEXT NOT NULL,
      symbol TEXT NOT NULL,
      point TEXT NOT NULL CHECK (point IN ('overhead', 'bottoms')),
      ordinal INTEGER NOT NULL DEFAULT 0,
      live_version_id INTEGER REFERENCES sensor_version (id),
      state TEXT CHECK (state IS NULL OR json_valid(state)),
      evaluated_to INTEGER
    ) STRICT`,
    'CREATE INDEX sensor_tower ON sensor (tower_id, ordinal)',
    `CREATE TABLE sensor_version (
      id INTEGER PRIMARY KEY,
      sensor_id TEXT NOT NULL REFERENCES sensor (id),
      number INTEGER NOT NULL CHECK (number >= 1),
      state TEXT NOT NULL CHECK (state IN ('draft', 'submitted', 'trial', 'live', 'retired')),
      parameters TEXT NOT NULL CHECK (json_valid(parameters)),
      reason TEXT NOT NULL DEFAULT '',
      created_by INTEGER REFERENCES user (id),
      created_at INTEGER NOT NULL,
      made_live_at INTEGER,
      UNIQUE (sensor_id, number)
    ) STRICT`,
  ],
};
