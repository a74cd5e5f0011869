import { gaugeScale } from './gauge-scale';

describe('the scale of a gauge', () => {
  it('begins at zero and leaves room beyond the limit', () => {
    expect(gaugeScale({ limits: [0.015], values: [0.011, 0.009, 0.013] })).toEqual({ min: 0, max: 0.025 });
  });

  it('stands still while the value moves below the limit', () => {
    const scales = [0.002, 0.008, 0.0149].map((value) => gaugeScale({ limits: [0.015], values: [value] }));
    expect(new Set(scales.map(({ max }) => max)).size).toBe(1);
  });

  it('grows when a value leaves it', () => {
    expect(gaugeScale({ limits: [0.015], values: [0.05] }).max).toBeGreaterThanOrEqual(0.055);
  });

  it('shows purities close up, since all of them lie near one', () => {
    const { min, max } = gaugeScale({ limits: [0.95], values: [0.962, 0.956, 0.968] });
    expect(min).toBeGreaterThan(0.9);
    expect(max).toBeLessThanOrEqual(1);
  });

  it('is still a scale when nothing is known, or all is zero', () => {
    expect(gaugeScale({ limits: [null], values: [null] })).toEqual({ min: 0, max: 0.01 });
    expect(gaugeScale({ limits: [null], values: [0] })).toEqual({ min: 0, max: 0.01 });
  });
});
