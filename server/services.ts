import type { Router } from 'express';
import type { Logger } from 'pino';
import type { Clock } from './clock';
import type { Database } from './db/database';
import type { SourceRow } from './db/models/source-row';
import { equilibriumRouter } from './equilibrium/equilibrium.routes';
import type { EventBus } from './events';
import type { HistorianSource } from './historian/historian-source';
import { HttpSource, httpSourceSettings } from './historian/http-source';
import { Collector } from './jobs/collect';
import type { JournalService } from './journal/journal.service';
import { SampleIntake } from './samples/sample-intake';
import { SampleViews } from './samples/sample-views';
import { samplesRouter } from './samples/samples.routes';
import { SensorViews } from './towers/sensor-views';
import { towersRouter } from './towers/towers.routes';

export interface ServiceDependencies {
  readonly database: Database;
  readonly clock: Clock;
  readonly events: EventBus;
  readonly journal: JournalService;
  readonly logger: Logger;
  /** The site's barometric pressure [Pa], for gauge readings. */
  readonly barometricPressure: () => Promise<number>;
}

export interface Services {
  readonly collector: Collector;
  readonly intake: SampleIntake;
  readonly sensors: SensorViews;
  readonly samples: SampleViews;
  readonly routers: readonly Router[];
}

/** Wires the main job: collecting, evaluating, the laboratory's way in, and what screens read. */
export function createServices(deps: ServiceDependencies): Services {
  const { database, clock } = deps;
  const sensors = new SensorViews(database, clock);
  const samples = new SampleViews(database);
  const intake = new SampleIntake({ ...deps, sampleViews: samples, sensorViews: sensors });
  const collector = new Collector({ ...deps, intake, views: sensors, openSource });
  return {
    collector,
    intake,
    sensors,
    samples,
    routers: [towersRouter(sensors), samplesRouter(intake, samples), equilibriumRouter()],
  };
}

function openSource(row: SourceRow): HistorianSource {
  return new HttpSource(httpSourceSettings.parse(row.settings));
}
