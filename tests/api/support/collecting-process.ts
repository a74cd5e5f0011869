import { pino } from 'pino';
import { openDatabase } from '../../../server/db/database';
import { EventBus } from '../../../server/events';
import { JournalService } from '../../../server/journal/journal.service';
import { createServices } from '../../../server/services';
import { Settings } from '../../../server/site/settings';

/** Collects once, up to the time given, and ends; or is killed while it does. Arguments: database file, time [UTC ms]. */
const [file, now] = process.argv.slice(2);
const database = await openDatabase(file!);
const clock = { now: () => Number(now) };
const { barometricPressure } = new Settings(database);
const { collector } = createServices({
  database,
  clock,
  events: new EventBus(),
  journal: new JournalService(database),
  logger: pino({ level: 'error' }),
  barometricPressure,
});
console.log('collecting');
await collector.runCycle();
console.log('done');
await database.close();
