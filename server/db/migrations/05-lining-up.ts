import type { Migration } from '../migrate';

/** What a sample's comparison was worth, so that the chain can be taken again without the tags; and a person's verdict. */
export const liningUp: Migration = {
  name: '05-lining-up',
  statements: [
    'ALTER TABLE correction ADD COLUMN readings_variance REAL NOT NULL DEFAULT 0 CHECK (readings_variance >= 0)',
    `ALTER TABLE sample ADD COLUMN verdict TEXT CHECK (verdict IN ('accepted', 'rejected'))`,
  ],
};
