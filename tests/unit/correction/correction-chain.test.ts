import * as fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { correctionChain, type LinedUpSample } from '@shared/correction/correction-chain';
import { aSensor } from '../support/a-sensor';

const hour = 3_600_000;
const parameters = aSensor();

/** A believable result near the slate of the sensor. */
const sample = fc
  .record({
    heavy: fc.double({ min: 0.005, max: 0.03, noNaN: true }),
    ethane: fc.double({ min: 0.005, max: 0.03, noNaN: true }),
    ratio: fc.double({ min: 0.3, max: 0.7, noNaN: true }),
    temperature: fc.double({ min: 321, max: 324, noNaN: true }),
  })
  .map(({ heavy, ethane, ratio, temperature }) => ({
    composition: [ethane, 1 - ethane - heavy, heavy * ratio, heavy * (1 - ratio)],
    temperature,
  }));

const samples = fc.array(sample, { minLength: 1, maxLength: 8 }).map((list) =>
  list.map(({ composition, temperature }, i): LinedUpSample => ({
    sampleId: i + 1,
    drawnAt: (i + 1) * 8 * hour,
    composition,
    readings: { temperature, pressure: 1_790_000, variance: 0.003 },
  })),
);

describe('the chain of corrections', () => {
  it('ends at the same offset, to 1e-12, in whatever order the results came in', () => {
    fc.assert(
      fc.property(samples, fc.infiniteStream(fc.nat()), (inOrder, picks) => {
        const shuffled = [...inOrder];
        const picked = picks[Symbol.iterator]();
        for (let i = shuffled.length - 1; i > 0; i--) {
          const j = (picked.next().value as number) % (i + 1);
          [shuffled[i], shuffled[j]] = [shuffled[j]!, shuffled[i]!];
        }
        const straight = correctionChain(parameters, 0, inOrder).knowledge;
        const mixed = correctionChain(parameters, 0, shuffled).knowledge;
        expect(Math.abs(mixed.offset - straight.offset)).toBeLessThanOrEqual(1e-12);
        expect(mixed).toEqual(straight);
      }),
      { numRuns: 200 },
    );
  });

  it('changes no earlier link when a later sample is added', () => {
    fc.assert(
      fc.property(samples, (all) => {
        const whole = correctionChain(parameters, 0, all).links;
        const part = correctionChain(parameters, 0, all.slice(0, -1)).links;
        expect(whole.slice(0, -1)).toEqual(part);
      }),
      { numRuns: 100 },
    );
  });

  it('does not believe a rejected sample, and believes an accepted one beyond the gate', () => {
    const usual = fc.sample(samples, { numRuns: 1, seed: 3 })[0]![0]!;
    const odd: LinedUpSample = {
      ...usual,
      sampleId: 99,
      drawnAt: usual.drawnAt + hour,
      readings: { ...usual.readings, temperature: usual.readings.temperature - 6 },
    };
    const decision = (verdict: LinedUpSample['verdict']) =>
      correctionChain(parameters, 0, [usual, { ...odd, verdict }]).links[1]!.decision;
    expect(decision(undefined)).toBe('held');
    expect(decision('accepted')).toBe('used');
    expect(decision('rejected')).toBe('rejected');
  });

  it('takes the slate of the last used sample as its base', () => {
    const list = fc.sample(samples, { numRuns: 1, seed: 5 })[0]!.slice(0, 1);
    const { knowledge } = correctionChain(parameters, 0, list);
    expect(knowledge.baseSampleId).toBe(1);
    knowledge.base.forEach((part, i) => expect(part.fraction).toBeCloseTo(list[0]!.composition[i]!, 12));
  });
});
