import { bubblePoint, dewPoint } from '../vle/equilibrium';
import { IdealMixture } from '../vle/ideal';
import { checkedState, compositionAt, type Inference, type InferenceModel, type Slate } from './inference';

/**
 * Inference with Raoult's law, linear in h: Σ y_i f_i = 1 with f = 1/K at a dew point and K at a bubble point, so
 * h = (1 − A_other)/(A_inferred − A_other), where A is a group's mean of f weighted by its own proportions.
 */
export function idealInference(model: InferenceModel, slate: Slate): Inference {
  const mixture = new IdealMixture(slate.ids, model.correlations);
  const { n, logP, slope } = mixture;
  const { share, inferred, sums } = slate;
  const sign = model.relation === 'dew' ? -1 : 1;
  const f = new Float64Array(n);
  const point = model.relation === 'dew' ? dewPoint : bubblePoint;

  return {
    model,
    infer(T, P) {
      checkedState(T, P);
      mixture.evaluate(T);
      const lnP = Math.log(P);
      let a = 0,
        aSlope = 0,
        b = 0,
        bSlope = 0;
      for (let i = 0; i < n; i++) {
        const value = (f[i] = Math.exp(sign * (logP[i]! - lnP)));
        const part = share[i]! * value;
        const change = part * sign * slope[i]!;
        if (inferred[i]) {
          a += part;
          aSlope += change;
        } else {
          b += part;
          bSlope += change;
        }
      }
      const width = a - b;
      const raw = (1 - b) / width;
      const byA = -raw / width;
      const byB = (raw - 1) / width;
      const h = Math.min(1, Math.max(0, raw));
      const base = new Array<number>(n);
      for (let i = 0; i < n; i++)
        base[i] = inferred[i] ? (byA * (f[i]! - a)) / sums.inferred : (byB * (f[i]! - b)) / sums.other;
      return {
        groupFraction: h,
        composition: compositionAt(slate, h),
        sensitivity: {
          temperature: byA * aSlope + byB * bSlope,
          // f moves with P as 1/P at a bubble point and as P at a dew point.
          pressure: (-sign * (byA * a + byB * b)) / P,
          base,
        },
        clamped: h !== raw,
        warnings: mixture.warnings(T),
      };
    },
    compositionAt: (h) => compositionAt(slate, h),
    equilibriumTemperature(composition, P) {
      const components = slate.ids.map((id, i) => ({ id, fraction: composition[i]! }));
      const { temperature, slope: dTdP } = point(
        { method: 'ideal', components, correlations: model.correlations },
        { pressure: P },
      );
      return { temperature, slope: dTdP };
    },
  };
}
