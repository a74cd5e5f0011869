import { describe, expect, it } from 'vitest';
import { inferenceOf, initialKnowledge, type Knowledge } from '@shared/correction/correction-chain';
import {
  evaluateMinute,
  firstMinuteState,
  type MinuteInput,
  type MinuteState,
} from '@shared/replay/evaluate-minute';
import { aSensor } from '../support/a-sensor';

const minute = 60_000;
const hour = 60 * minute;
const t0 = Date.UTC(2026, 10, 20, 12);
const barometric = 101_325;
const parameters = aSensor({
  validity: { ...aSensor().validity, steadiness: { transientAbove: 12, steadyBelow: 4 } },
});
const sensor = { parameters, inference: inferenceOf(parameters, parameters.base), pressureDatum: barometric };
const sampled: Knowledge = {
  ...initialKnowledge(parameters, t0),
  variance: 0.002,
  baseSampleId: 7,
  lastUsedAt: t0 - 2 * hour,
};

/** Readings of an ordinary minute: about 1.7 mol % of butanes at 17 bar. */
function aMinute(
  t: number,
  change: { temperature?: number; pressure?: number; dp?: number; status?: number; age?: number } = {},
): MinuteInput {
  const wiggle = 0.01 * Math.sin(t / minute);
  const at = t - (change.age ?? 0);
  return {
    t,
    temperature: { t: at, value: change.temperature ?? 323.2 + wiggle, status: change.status ?? 0 },
    pressure: { t: at, value: change.pressure ?? 1_620_000 + 100 * wiggle, status: 0 },
    differentialPressure: { t: at, value: change.dp ?? 20_000, status: 0 },
  };
}

function run(inputs: readonly MinuteInput[], knowledge = sampled) {
  let state: MinuteState = firstMinuteState;
  return inputs.map((input) => {
    const answer = evaluateMinute(sensor, knowledge, state, input);
    // As the live job does: kept as JSON between two cycles.
    state = JSON.parse(JSON.stringify(answer.state)) as MinuteState;
    expect(state).toEqual(answer.state);
    return answer.estimate;
  });
}

const last = (inputs: readonly MinuteInput[], knowledge = sampled) => run(inputs, knowledge).at(-1)!;
const ordinary = (minutes: number) => Array.from({ length: minutes }, (_, i) => aMinute(t0 + i * minute));

describe('an evaluated minute', () => {
  it('is Good without reasons when nothing is wrong, its value inside its band, readings absolute', () => {
    const estimate = last(ordinary(10));
    expect([estimate.quality, estimate.reasons]).toEqual(['Good', []]);
    expect(estimate.low!).toBeGreaterThan(0);
    expect(estimate.low!).toBeLessThan(estimate.value!);
    expect(estimate.high!).toBeGreaterThan(estimate.value!);
    expect(estimate.pressure).toBeCloseTo(1_721_325, -2);
  });

  it('gives the same bits for the same minutes', () => {
    expect(run(ordinary(30))).toEqual(run(ordinary(30)));
  });

  it.each<[string, readonly MinuteInput[], Knowledge, 'Uncertain' | 'Bad']>([
    ['temperature-bad', [aMinute(t0, { status: 0x808c0000 })], sampled, 'Bad'],
    ['temperature-uncertain', [aMinute(t0, { status: 0x40930000 })], sampled, 'Uncertain'],
    ['temperature-out-of-range', [aMinute(t0, { temperature: 341 })], sampled, 'Uncertain'],
    ['pressure-out-of-range', [aMinute(t0, { pressure: 1_190_000, temperature: 312 })], sampled, 'Uncertain'],
    ['temperature-jumped', [aMinute(t0), aMinute(t0 + minute, { temperature: 325.6 })], sampled, 'Uncertain'],
    [
      'pressure-jumped',
      [aMinute(t0), aMinute(t0 + minute, { pressure: 1_690_000, temperature: 324.5 })],
      sampled,
      'Uncertain',
    ],
    ['entrainment-suspected', [aMinute(t0, { dp: 33_000 })], sampled, 'Uncertain'],
    ['sample-too-old', [aMinute(t0)], { ...sampled, lastUsedAt: t0 - 25 * hour }, 'Uncertain'],
    ['no-sample-yet', [aMinute(t0)], { ...sampled, lastUsedAt: null }, 'Uncertain'],
    ['clamped', [aMinute(t0, { temperature: 306 })], sampled, 'Uncertain'],
  ])('says %s, and nothing else', (reason, inputs, knowledge, quality) => {
    const estimate = last(inputs, knowledge);
    expect([estimate.quality, estimate.reasons]).toEqual([quality, expect.arrayContaining([reason])]);
    expect(estimate.reasons.filter((each) => each !== reason && each !== 'clamped')).toEqual([]);
    if (quality === 'Bad') expect([estimate.value, estimate.low, estimate.high]).toEqual([null, null, null]);
  });

  it('calls readings missing once they are older than the limit', () => {
    expect(last([aMinute(t0, { age: 5 * minute })]).quality).toBe('Good');
    expect(last([aMinute(t0, { age: 5 * minute + 1 })]).reasons).toEqual([
      'temperature-missing',
      'pressure-missing',
    ]);
    expect(last([{ t: t0, temperature: null, pressure: null, differentialPressure: null }]).reasons).toEqual([
      'temperature-missing',
      'pressure-missing',
    ]);
  });

  it('calls a reading flat after half an hour without any movement', () => {
    const frozen = Array.from({ length: 31 }, (_, i) => aMinute(t0 + i * minute, { temperature: 323.2 }));
    expect(last(frozen.slice(0, 30)).reasons).toEqual([]);
    expect(last(frozen).reasons).toEqual(['temperature-flat']);
  });

  it('is not steady after a long ramp, and steady again some hours after it', () => {
    const still = Array.from({ length: 180 }, (_, i) =>
      aMinute(t0 + i * minute, { temperature: 323.4 + 0.05 * Math.sin(i * 1.7) }),
    );
    const ramp = Array.from({ length: 60 }, (_, i) =>
      aMinute(t0 + (180 + i) * minute, { temperature: 323.4 + 0.03 * i + 0.05 * Math.sin(i * 1.7) }),
    );
    expect(last(still).reasons).toEqual([]);
    expect(last([...still, ...ramp]).reasons).toContain('not-steady');
    const after = Array.from({ length: 720 }, (_, i) =>
      aMinute(t0 + (240 + i) * minute, { temperature: 325.2 + 0.05 * Math.sin(i * 1.7) }),
    );
    expect(last([...still, ...ramp, ...after]).reasons).not.toContain('not-steady');
  });

  it('widens its band as the last sample grows old', () => {
    const young = last([aMinute(t0)]);
    const old = last([aMinute(t0)], { ...sampled, t: t0 - 20 * hour });
    expect(old.value).toBe(young.value);
    expect(old.high! - old.low!).toBeGreaterThan(young.high! - young.low!);
  });

  it('follows the tower in the rundown by the residence time, then the dead time', () => {
    const slow = aSensor({ alignment: { windowMinutes: 10, deadTimeMinutes: 3, residenceMinutes: 12 } });
    let state: MinuteState = firstMinuteState;
    const answers = Array.from({ length: 80 }, (_, i) => {
      const answer = evaluateMinute(
        { ...sensor, parameters: slow },
        sampled,
        state,
        aMinute(t0 + i * minute, { temperature: i < 20 ? 323 : 324 }),
      );
      ({ state } = answer);
      return answer.estimate;
    });
    const [before, step] = [answers[19]!.value!, answers[20]!.value! - answers[19]!.value!];
    // Twelve minutes after the step and three of dead time, 1 − 1/e of it has arrived (the first minute counts whole).
    expect((answers[34]!.rundown! - before) / step).toBeCloseTo(1 - Math.exp(-1), 1);
    expect(answers[22]!.rundown).toBeCloseTo(before, 5);
  });
});
