import { sensorParameters, type SensorParameters } from '@shared/api/sensor-parameters';

/** Parameters of a depropaniser's overhead sensor; a test changes what it is about. */
export function aSensor(changes: Partial<SensorParameters> = {}): SensorParameters {
  return sensorParameters.parse({
    relation: 'dew',
    method: 'ideal',
    base: [
      { id: 'ethane', fraction: 0.015, group: 'light' },
      { id: 'propane', fraction: 0.967, group: 'light' },
      { id: 'isobutane', fraction: 0.01, group: 'heavy' },
      { id: 'n-butane', fraction: 0.008, group: 'heavy' },
    ],
    tags: {
      temperature: 'overhead-temperature',
      pressure: 'overhead-pressure',
      differentialPressure: 'pressure-drop',
    },
    pressureCorrection: 0,
    alignment: { windowMinutes: 10, deadTimeMinutes: 0, residenceMinutes: 0 },
    correction: {
      domain: 'temperature',
      initialOffset: 0,
      initialVariance: 4,
      driftVariancePerHour: 0.001,
      gate: 3,
    },
    noise: {
      temperature: 0.05,
      pressure: 700,
      laboratoryAbsolute: 0.0001,
      laboratoryRelative: 0.02,
      shapeRelative: 0.1,
    },
    validity: {
      temperature: [305, 340],
      pressure: [1_300_000, 2_100_000],
      temperatureStep: 2,
      pressureStep: 60_000,
      staleMinutes: 5,
      flatMinutes: 30,
      differentialPressureLimit: 32_000,
      sampleAgeHours: 24,
      acceptedExtrapolations: ['ethane'],
    },
    limits: { high: 0.025, target: 0.015, temperatureStep: 0.5 },
    ...changes,
  });
}
