import type { Migration } from '../migrate';

/** What the laboratory said, and what it did to each sensor's offset. */
export const laboratory: Migration = {
  name: '03-laboratory',
  statements: [
    `CREATE TABLE sample (
      id INTEGER PRIMARY KEY,
      tower_id TEXT NOT NULL REFERENCES tower (id),
      point TEXT NOT NULL CHECK (point IN ('overhead', 'bottoms')),
      drawn_at INTEGER NOT NULL,
      received_at INTEGER NOT NULL,
      entered_at INTEGER NOT NULL,
      entered_by INTEGER REFERENCES user (id),
      reported_sum REAL NOT NULL CHECK (reported_sum > 0),
      remark TEXT NOT NULL DEFAULT '',
      state TEXT NOT NULL CHECK (state IN ('pending', 'used', 'held', 'rejected')),
      state_reason TEXT NOT NULL DEFAULT '',
      UNIQUE (tower_id, point, drawn_at)
    ) STRICT`,
    'CREATE INDEX sample_drawn_at ON sample (drawn_at)',
    `CREATE TABLE sample_fraction (
      sample_id INTEGER NOT NULL REFERENCES sample (id) ON DELETE CASCADE,
      component_id TEXT NOT NULL,
      fraction REAL NOT NULL CHECK (fraction BETWEEN 0 AND 1),
      PRIMARY KEY (sample_id, component_id)
    ) STRICT, WITHOUT ROWID`,
    `CREATE TABLE correction (
      sensor_id TEXT NOT NULL REFERENCES sensor (id),
      sample_id INTEGER NOT NULL REFERENCES sample (id) ON DELETE CASCADE,
      decision TEXT NOT NULL CHECK (decision IN ('used', 'held', 'rejected')),
      value REAL NOT NULL,
      temperature REAL NOT NULL,
      pressure REAL NOT NULL,
      observed_offset REAL NOT NULL,
      innovation REAL NOT NULL,
      innovation_variance REAL NOT NULL CHECK (innovation_variance > 0),
      gain REAL NOT NULL,
      offset_before REAL NOT NULL,
      offset_after REAL NOT NULL,
      variance_before REAL NOT NULL,
      variance_after REAL NOT NULL,
      shape_error REAL,
      PRIMARY KEY (sensor_id, sample_id)
    ) STRICT, WITHOUT ROWID`,
    'CREATE INDEX correction_sample ON correction (sample_id)',
  ],
};
