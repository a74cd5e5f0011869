import type { Sequelize } from 'sequelize';
import { CorrectionRow } from './correction-row';
import { EstimateRow } from './estimate-row';
import { JournalEntryRow } from './journal-entry-row';
import { NoteRow } from './note-row';
import { SampleFractionRow } from './sample-fraction-row';
import { SampleRow } from './sample-row';
import { SensorRow } from './sensor-row';
import { SensorVersionRow } from './sensor-version-row';
import { SettingRow } from './setting-row';
import { SourceRow } from './source-row';
import { TagRow } from './tag-row';
import { TagValueRow } from './tag-value-row';
import { TowerRow } from './tower-row';
import { UserRow } from './user-row';

/** One model a table; no associations, so that every query says what it reads. */
export function registerModels(sequelize: Sequelize) {
  return {
    sources: SourceRow.register(sequelize),
    tags: TagRow.register(sequelize),
    tagValues: TagValueRow.register(sequelize),
    towers: TowerRow.register(sequelize),
    sensors: SensorRow.register(sequelize),
    sensorVersions: SensorVersionRow.register(sequelize),
    estimates: EstimateRow.register(sequelize),
    samples: SampleRow.register(sequelize),
    sampleFractions: SampleFractionRow.register(sequelize),
    corrections: CorrectionRow.register(sequelize),
    notes: NoteRow.register(sequelize),
    users: UserRow.register(sequelize),
    journalEntries: JournalEntryRow.register(sequelize),
    settings: SettingRow.register(sequelize),
  };
}
export type Models = ReturnType<typeof registerModels>;
