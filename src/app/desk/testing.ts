import { sensorParameters } from '@shared/api/sensor-parameters';
import type { Estimate, Sensor, SensorDetail } from '@shared/api/sensors';
import { testNow } from '../core/testing';

export function anEstimate(change: Partial<Estimate> = {}): Estimate {
  return {
    t: testNow - 60_000,
    value: 0.021,
    low: 0.018,
    high: 0.024,
    rundown: 0.02,
    temperature: 322.9,
    pressure: 1_720_000,
    offset: 0.25,
    offsetDeviation: 0.1,
    quality: 'Good',
    reasons: [],
    versionId: 3,
    baseSampleId: 41,
    ...change,
  };
}

export function aSensor(change: Partial<Sensor> = {}): Sensor {
  return {
    id: 'depropaniser-c4',
    towerId: 'depropaniser',
    towerName: 'Depropaniser',
    name: 'C4+ in propane, overhead',
    symbol: 'C4+',
    point: 'overhead',
    limits: { high: 0.025, low: null, target: 0.02 },
    latest: anEstimate(),
    slopePerHour: null,
    offLimitProbability: null,
    lastSample: null,
    lastUsedSampleAt: testNow - 3_600_000,
    ...change,
  };
}

export function aSensorDetail(change: Partial<SensorDetail> = {}): SensorDetail {
  return {
    ...aSensor(),
    nextMove: { kind: 'on-target', target: 0.02 },
    version: {
      id: 3,
      number: 2,
      madeLiveAt: testNow - 86_400_000,
      parameters: sensorParameters.parse({
        relation: 'dew',
        method: 'peng-robinson',
        correlations: {},
        base: [
          { id: 'ethane', fraction: 0.01, group: 'light' },
          { id: 'propane', fraction: 0.97, group: 'light' },
          { id: 'n-butane', fraction: 0.02, group: 'heavy' },
        ],
        tags: { temperature: 'T', pressure: 'P' },
        pressureCorrection: 0,
        alignment: { windowMinutes: 10, deadTimeMinutes: 0, residenceMinutes: 0 },
        correction: {
          domain: 'temperature',
          initialOffset: 0,
          initialVariance: 1,
          driftVariancePerHour: 0.001,
          gate: 3,
        },
        noise: {
          temperature: 0.1,
          pressure: 1000,
          laboratoryAbsolute: 0.0005,
          laboratoryRelative: 0.02,
          shapeRelative: 0.05,
        },
        validity: {
          temperature: [300, 340],
          pressure: [1_400_000, 2_000_000],
          temperatureStep: 2,
          pressureStep: 50_000,
          staleMinutes: 5,
          flatMinutes: 30,
          sampleAgeHours: 24,
        },
        limits: { high: 0.025, target: 0.02, temperatureStep: 0.5 },
      }),
    },
    ...change,
  };
}
