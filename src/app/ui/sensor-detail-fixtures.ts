import type { Sample } from '@shared/api/samples';
import type { SensorDetail } from '@shared/api/sensors';
import { testNow } from '../core/testing';
import { aSensor } from './sensor-fixtures';

/** An invented sensor with all that its version is made of. */
export function aSensorDetail(change: Partial<SensorDetail> = {}): SensorDetail {
  return {
    ...aSensor(),
    version: {
      id: 1,
      number: 3,
      madeLiveAt: testNow - 20 * 24 * 3_600_000,
      parameters: {
        relation: 'dew',
        method: 'ideal',
        correlations: {},
        base: [
          { id: 'ethane', fraction: 0.02, group: 'light' },
          { id: 'propane', fraction: 0.965, group: 'light' },
          { id: 'isobutane', fraction: 0.009, group: 'heavy' },
          { id: 'n-butane', fraction: 0.006, group: 'heavy' },
        ],
        tags: { temperature: 'test-temperature', pressure: 'test-pressure' },
        pressureCorrection: 0,
        alignment: { windowMinutes: 10, deadTimeMinutes: 5, residenceMinutes: 20 },
        correction: {
          domain: 'temperature',
          initialOffset: 0,
          initialVariance: 1,
          driftVariancePerHour: 0.002,
          gate: 3,
        },
        noise: {
          temperature: 0.05,
          pressure: 1000,
          laboratoryAbsolute: 0.0001,
          laboratoryRelative: 0.02,
          shapeRelative: 0.05,
        },
        validity: {
          temperature: [280, 360],
          pressure: [1e6, 2.5e6],
          temperatureStep: 2,
          pressureStep: 50_000,
          staleMinutes: 5,
          flatMinutes: 30,
          sampleAgeHours: 24,
          acceptedExtrapolations: ['ethane'],
        },
        limits: { high: 0.015, target: 0.012, temperatureStep: 0.5 },
      },
    },
    nextMove: { kind: 'on-target', target: 0.012 },
    ...change,
  };
}

/** A used result of that sensor's point, drawn two hours ago. */
export function aSample(change: Partial<Sample> = {}): Sample {
  return {
    id: 5,
    towerId: 'test-tower',
    towerName: 'Test tower',
    point: 'overhead',
    drawnAt: testNow - 2 * 3_600_000,
    receivedAt: testNow - 3_600_000,
    enteredAt: testNow - 3_600_000,
    enteredBy: 'Test Person',
    fractions: [
      { id: 'n-butane', fraction: 0.006 },
      { id: 'ethane', fraction: 0.02 },
      { id: 'propane', fraction: 0.969 },
      { id: 'isobutane', fraction: 0.005 },
    ],
    reportedSum: 0.998,
    remark: '',
    state: 'used',
    stateReason: '',
    corrections: [
      {
        sensorId: 'test-tower-c4',
        decision: 'used',
        value: 0.011,
        temperature: 326.4,
        pressure: 1_801_000,
        observedOffset: 0.2,
        innovation: 0.12,
        innovationVariance: 0.09,
        gain: 0.5,
        offsetBefore: 0.08,
        offsetAfter: 0.14,
        varianceBefore: 0.04,
        varianceAfter: 0.02,
      },
    ],
    ...change,
  };
}
