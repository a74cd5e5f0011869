/** Everything the record may say happened. Words once written stay readable: add, never rename. */
export const journalActions = [
  'sample-entered',
  'sample-used',
  'sample-held',
  'sample-accepted',
  'sample-rejected',
  'note-written',
  'tower-created',
  'sensor-created',
  'version-created',
  'version-submitted',
  'version-made-live',
  'version-retired',
  'source-created',
  'source-lost',
  'source-back',
  'user-created',
  'user-changed',
  'sign-in-locked',
  'setting-changed',
  'demonstration-loaded',
] as const;
export type JournalAction = (typeof journalActions)[number];

export type SubjectKind = 'sample' | 'sensor' | 'tower' | 'note' | 'source' | 'user' | 'setting' | 'site';
