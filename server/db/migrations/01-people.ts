import type { Migration } from '../migrate';

/** Who works here, what was done, and the site's settings. */
export const people: Migration = {
  name: '01-people',
  statements: [
    `CREATE TABLE user (
      id INTEGER PRIMARY KEY,
      username TEXT NOT NULL UNIQUE COLLATE NOCASE CHECK (length(username) > 0),
      name TEXT NOT NULL,
      role TEXT NOT NULL CHECK (role IN ('operator', 'engineer', 'supervisor', 'administrator')),
      password_hash TEXT NOT NULL,
      disabled INTEGER NOT NULL DEFAULT 0 CHECK (disabled IN (0, 1)),
      created_at INTEGER NOT NULL
    ) STRICT`,
    `CREATE TABLE journal_entry (
      id INTEGER PRIMARY KEY AUTOINCREMENT,
      t INTEGER NOT NULL,
      user_id INTEGER REFERENCES user (id),
      user_name TEXT,
      user_role TEXT,
      action TEXT NOT NULL CHECK (length(action) > 0),
      subject_kind TEXT NOT NULL,
      subject_id TEXT NOT NULL,
      subject_name TEXT NOT NULL,
      changes TEXT NOT NULL CHECK (json_valid(changes)),
      reason TEXT NOT NULL,
      previous_hash TEXT NOT NULL UNIQUE,
      hash TEXT NOT NULL UNIQUE,
      CHECK ((user_id IS NULL) = (user_name IS NULL) AND (user_id IS NULL) = (user_role IS NULL))
    ) STRICT`,
    'CREATE INDEX journal_entry_t ON journal_entry (t)',
    'CREATE INDEX journal_entry_subject ON journal_entry (subject_kind, subject_id)',
    `CREATE TRIGGER journal_entry_keep BEFORE UPDATE ON journal_entry
      BEGIN SELECT RAISE(ABORT, 'the journal is never changed'); END`,
    `CREATE TRIGGER journal_entry_stay BEFORE DELETE ON journal_entry
      BEGIN SELECT RAISE(ABORT, 'the journal is never shortened'); END`,
    `CREATE TABLE setting (
      key TEXT PRIMARY KEY NOT NULL,
      value TEXT NOT NULL CHECK (json_valid(value) AND json_type(value) = 'object')
    ) STRICT, WITHOUT ROWID`,
  ],
};
