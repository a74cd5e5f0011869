import type { Migration } from '../migrate';

/** What was inferred each minute, and what people wrote on it. */
export const estimates: Migration = {
  name: '04-estimates',
  statements: [
    // Quality counts Good, Uncertain, Bad from 0; reasons is one bit a reason (`shared/inference/quality.ts`).
    `CREATE TABLE estimate (
      sensor_id TEXT NOT NULL REFERENCES sensor (id),
      t INTEGER NOT NULL,
      version_id INTEGER NOT NULL REFERENCES sensor_version (id),
      temperature REAL,
      pressure REAL,
      value REAL,
      low REAL,
      high REAL,
      rundown REAL,
      offset REAL NOT NULL,
      offset_variance REAL NOT NULL CHECK (offset_variance >= 0),
      sigma_shape REAL,
      base_sample_id INTEGER REFERENCES sample (id),
      quality INTEGER NOT NULL CHECK (quality IN (0, 1, 2)),
      reasons INTEGER NOT NULL CHECK (reasons >= 0),
      PRIMARY KEY (sensor_id, t)
    ) STRICT, WITHOUT ROWID`,
    `CREATE TABLE note (
      id INTEGER PRIMARY KEY,
      sensor_id TEXT NOT NULL REFERENCES sensor (id),
      t INTEGER NOT NULL,
      text TEXT NOT NULL CHECK (length(text) > 0),
      author_id INTEGER NOT NULL REFERENCES user (id),
      written_at INTEGER NOT NULL
    ) STRICT`,
    'CREATE INDEX note_sensor_t ON note (sensor_id, t)',
  ],
};
