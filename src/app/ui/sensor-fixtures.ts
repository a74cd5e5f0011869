import type { Estimate, Sensor, Trend } from '@shared/api/sensors';
import { testNow } from '../core/testing';

/** A Good minute of the present, well within its limit. */
export function anEstimate(change: Partial<Estimate> = {}): Estimate {
  return {
    t: testNow,
    value: 0.0112,
    low: 0.0098,
    high: 0.0126,
    rundown: 0.0111,
    temperature: 326.4,
    pressure: 1_801_000,
    offset: 0.08,
    offsetDeviation: 0.2,
    quality: 'Good',
    reasons: [],
    versionId: 1,
    baseSampleId: 5,
    ...change,
  };
}

/** An invented sensor that needs nobody. */
export function aSensor(change: Partial<Sensor> = {}): Sensor {
  const drawnAt = testNow - 2 * 3_600_000;
  return {
    id: 'test-tower-c4',
    towerId: 'test-tower',
    towerName: 'Test tower',
    name: 'C4+ in propane, overhead',
    symbol: 'C4+',
    point: 'overhead',
    limits: { high: 0.015, low: null, target: 0.012 },
    latest: anEstimate(),
    slopePerHour: 0.0009,
    offLimitProbability: 0.004,
    lastSample: { id: 5, drawnAt, value: 0.011, state: 'used', standardisedInnovation: 0.4 },
    lastUsedSampleAt: drawnAt,
    ...change,
  };
}

/** A trend of three minutes for a sensor. */
export function aTrend(sensor: Sensor): Trend {
  const t = [testNow - 120_000, testNow - 60_000, testNow];
  const series = { t, value: [0.0108, 0.011, 0.0112] };
  return {
    sensorId: sensor.id,
    from: testNow - 8 * 3_600_000,
    to: testNow,
    bucketMinutes: 1,
    inferred: { ...series, low: [0.009, 0.009, 0.009], high: [0.013, 0.013, 0.013], quality: [0, 0, 0] },
    rundown: series,
    temperature: { t, value: [326, 326, 326] },
    pressure: { t, value: [1.8e6, 1.8e6, 1.8e6] },
    offset: { t, value: [0.08, 0.08, 0.08] },
    samples: [],
    notes: [],
  };
}
