import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { foldOffset, stepOffset, type OffsetParameters } from '@shared/correction/offset-filter';
import { stepSteadiness, usualFilters, type SteadinessState } from '@shared/inference/steadiness';

/**
 * Filter cases computed outside the project (R 4.2 stats::KalmanRun, Python, closed forms); each names its source. The Nile
 * series is the public benchmark of the local level model (variances of Durbin & Koopman, re-estimated in R).
 */
const figures = JSON.parse(readFileSync(new URL('./data/offset-filter.json', import.meta.url), 'utf8')) as {
  B01: {
    inputs: {
      q_per_hour: number;
      r: number;
      b0: number;
      P0: number;
      t0: number;
      observations: { t: number; residual: number }[];
    };
    expected: { steps: Record<string, number>[] };
  };
  B02: { inputs: { q: number[]; r: number[] }; expected: { rows: { P_prior: number; K: number }[] } };
  B03: {
    inputs: { y: number[]; q: number; r: number; m0: number; P1: number };
    expected: { first5: number[]; last: number; P_last: number };
  };
  B06: {
    inputs: {
      q_per_hour: number;
      r: number;
      b0: number;
      P0: number;
      t0: number;
      arrivals: { sample_t: number; residual: number }[];
    };
    expected: Record<string, { b: number; P: number }>;
  };
  B07: {
    inputs: { x: number[]; xf0: number; nu2f0: number; delta2f0: number; x_prev0: number };
    expected: { R: number[] };
  };
};

const hour = 3_600_000;
const neverHolds = (driftVariancePerHour: number): OffsetParameters => ({ driftVariancePerHour, gate: 1e9 });

describe('the offset filter', () => {
  it('agrees step by step with an independent filter at irregular times', () => {
    const { inputs, expected } = figures.B01;
    const steps = foldOffset(
      { offset: inputs.b0, variance: inputs.P0, t: inputs.t0 * hour },
      inputs.observations.map(({ t, residual }, i) => ({
        sampleId: i,
        drawnAt: t * hour,
        observed: residual,
        variance: inputs.r,
      })),
      neverHolds(inputs.q_per_hour),
    );
    expected.steps.forEach((step, i) => {
      expect(steps[i]!.varianceBefore).toBeCloseTo(step['P_prior']!, 12);
      expect(steps[i]!.innovationVariance).toBeCloseTo(step['S']!, 12);
      expect(steps[i]!.innovation).toBeCloseTo(step['innovation']!, 12);
      expect(steps[i]!.gain).toBeCloseTo(step['K']!, 12);
      expect(steps[i]!.offset).toBeCloseTo(step['b']!, 12);
      expect(steps[i]!.variance).toBeCloseTo(step['P']!, 12);
    });
  });

  it('settles at the steady-state gain of the Riccati equation, K²/(1−K) = q/r (Muth 1960)', () => {
    const { inputs, expected } = figures.B02;
    inputs.q.forEach((q, i) => {
      const samples = Array.from({ length: 400 }, (_, k) => ({
        sampleId: k,
        drawnAt: (k + 1) * hour,
        observed: Math.sin(k),
        variance: inputs.r[i]!,
      }));
      const last = foldOffset({ offset: 0, variance: 1, t: 0 }, samples, neverHolds(q)).at(-1)!;
      expect(last.gain).toBeCloseTo(expected.rows[i]!.K, 10);
      expect(last.varianceBefore).toBeCloseTo(expected.rows[i]!.P_prior, 10);
      expect(last.gain ** 2 / (1 - last.gain)).toBeCloseTo(q / inputs.r[i]!, 9);
    });
  });

  it('follows the Nile as R does', () => {
    const { inputs, expected } = figures.B03;
    const steps = foldOffset(
      { offset: inputs.m0, variance: inputs.P1, t: hour },
      inputs.y.map((y, k) => ({ sampleId: k, drawnAt: (k + 1) * hour, observed: y, variance: inputs.r })),
      neverHolds(inputs.q),
    );
    expected.first5.forEach((level, i) => expect(Math.abs(steps[i]!.offset / level - 1)).toBeLessThan(1e-8));
    expect(Math.abs(steps.at(-1)!.offset / expected.last - 1)).toBeLessThan(1e-8);
    expect(Math.abs(steps.at(-1)!.variance / expected.P_last - 1)).toBeLessThan(1e-8);
  });

  it('ends after a late result where it would be had the results come in order of drawing', () => {
    const { inputs, expected } = figures.B06;
    const samples = inputs.arrivals.map(({ sample_t, residual }, i) => ({
      sampleId: i,
      drawnAt: sample_t * hour,
      observed: residual,
      variance: inputs.r,
    }));
    const prior = { offset: inputs.b0, variance: inputs.P0, t: inputs.t0 * hour };
    const before = foldOffset(prior, samples.slice(0, 2), neverHolds(inputs.q_per_hour)).at(-1)!;
    const after = foldOffset(prior, samples, neverHolds(inputs.q_per_hour)).at(-1)!;
    expect(before.offset).toBeCloseTo(expected['before_late_arrival']!.b, 10);
    expect(before.variance).toBeCloseTo(expected['before_late_arrival']!.P, 10);
    expect(after.offset).toBeCloseTo(expected['after_replay']!.b, 10);
    expect(after.variance).toBeCloseTo(expected['after_replay']!.P, 10);
  });

  it('holds at the three-sigma gate and changes nothing then', () => {
    const state = { offset: 0.2, variance: 0.03, t: 0 };
    const held = stepOffset(
      state,
      { sampleId: 1, drawnAt: 0, observed: 0.2 + 3.01 * Math.sqrt(0.04), variance: 0.01 },
      { driftVariancePerHour: 0, gate: 3 },
    );
    const used = stepOffset(
      state,
      { sampleId: 1, drawnAt: 0, observed: 0.2 + 2.99 * Math.sqrt(0.04), variance: 0.01 },
      { driftVariancePerHour: 0, gate: 3 },
    );
    expect([held.decision, held.gain, held.offset, held.variance]).toEqual(['held', 0, 0.2, 0.03]);
    expect([used.decision, used.gain]).toEqual(['used', 0.75]);
  });
});

describe('the R-statistic', () => {
  it('agrees through a ramp with the equations of Cao & Rhinehart 1995 as computed outside', () => {
    const { inputs, expected } = figures.B07;
    let state: SteadinessState = {
      filtered: inputs.xf0,
      variance: inputs.nu2f0,
      difference: inputs.delta2f0,
      last: inputs.x_prev0,
      isSteady: true,
    };
    inputs.x.forEach((x, i) => {
      const step = stepSteadiness(state, x, { ...usualFilters, transientAbove: 3, steadyBelow: 1.44 });
      state = step.state;
      expect(step.ratio).toBeCloseTo(expected.R[i]!, 9);
    });
  });
});
