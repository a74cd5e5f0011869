import type { EChartsCoreOption } from 'echarts/core';
import { phaseEnvelope, type PhaseEnvelope } from '@shared/vle/phase-envelope';
import type { Mixture } from '@shared/vle/equilibrium';
import type { ChartColours } from '../ui/chart-colours';
import { attempt } from './desk-answer';
import { plotAxis, plotFrame, plotLine, plotPoint, type ShownUnits } from './plot-frame';
import type { Slices } from './sliced-work';

/** Bubble and dew line of the mixture, up to where they meet. */
export interface EnvelopePlot {
  readonly envelope: PhaseEnvelope | null;
  /** Why there are no lines; empty when there are. */
  readonly words: string;
}

const bubble = 'bubble line';
const dew = 'dew line';

/** Works out the plot; the whole of it takes a few milliseconds, so it gives way only before. */
export function* envelopePlot(mixture: Mixture): Slices<EnvelopePlot> {
  yield;
  const outcome = attempt(() => phaseEnvelope(mixture));
  return outcome.kind === 'refused'
    ? { envelope: null, words: outcome.words }
    : { envelope: outcome.value, words: '' };
}

/**
 * The plot in the person's units.
 *
 * @param present where temperature [K] and pressure [Pa] of the desk lie
 */
export function toEnvelopeOption(
  envelope: PhaseEnvelope,
  present: { readonly temperature: number; readonly pressure: number },
  shown: ShownUnits,
  colours: ChartColours,
): EChartsCoreOption {
  const point = ({ temperature, pressure }: { temperature: number; pressure: number }) =>
    [shown.temperature(temperature), shown.pressure(pressure)] as const;
  const { critical } = envelope;
  return {
    ...plotFrame(
      'Bubble and dew pressure of the mixture against temperature, with the present point.',
      [bubble, dew].map((name) => ({ name, is: 'line' as const })),
      colours,
    ),
    xAxis: plotAxis(`temperature, ${shown.temperatureUnit}`, colours, 'x'),
    yAxis: plotAxis(`pressure, ${shown.pressureUnit}`, colours, 'y'),
    series: [
      plotLine(bubble, envelope.bubble.map(point), colours.inferred),
      plotLine(dew, envelope.dew.map(point), colours.inferred, 'dashed'),
      ...(critical ? [{ ...plotPoint('critical point', point(critical), colours), symbolSize: 7 }] : []),
      plotPoint('now', point(present), colours),
    ],
  };
}
