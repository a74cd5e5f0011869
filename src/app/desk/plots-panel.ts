import {
  ChangeDetectionStrategy,
  Component,
  DOCUMENT,
  DestroyRef,
  computed,
  effect,
  inject,
  signal,
} from '@angular/core';
import { NgxEchartsDirective } from 'ngx-echarts';
import { componentById } from '@shared/vle/components';
import { Preferences } from '../core/preferences';
import { chartColours } from '../ui/chart-colours';
import { formatNumber } from '../ui/numbers';
import { provideCharts } from '../ui/provide-charts';
import { Quantities } from '../ui/quantities';
import { DeskState } from './desk-state';
import { productNames } from './desk-words';
import { envelopePlot, toEnvelopeOption, type EnvelopePlot } from './envelope-plot';
import { inferredPlot, plotCeiling, toInferredOption, type InferredPlot } from './inferred-plot';
import { ShownUnitsOfPerson } from './shown-units';
import { SlicedWork, afterFrame } from './sliced-work';
import { toTxyOption, txyPlot, type TxyPlot } from './txy-plot';

/** The desk's plots, worked out between frames and drawn with the present point in them. */
@Component({
  selector: 'app-plots-panel',
  imports: [NgxEchartsDirective],
  providers: [provideCharts()],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './plots-panel.html',
  styleUrl: './plots-panel.scss',
})
export class PlotsPanel {
  protected readonly state = inject(DeskState);
  private readonly quantities = inject(Quantities);
  private readonly preferences = inject(Preferences);

  private readonly envelope = signal<EnvelopePlot | null>(null);
  private readonly txy = signal<TxyPlot | null>(null);
  private readonly inferred = signal<InferredPlot | null>(null);

  private readonly colours = computed(() => chartColours(this.preferences.isNight()));
  private readonly shown = inject(ShownUnitsOfPerson).units;

  protected readonly choices = computed(() =>
    this.state.rows().map(({ id }) => ({ id, name: componentById(id).name })),
  );
  protected readonly envelopeOption = computed(() => {
    const envelope = this.envelope()?.envelope;
    if (!envelope) return null;
    const present = { temperature: this.state.temperature(), pressure: this.state.pressure() };
    return toEnvelopeOption(envelope, present, this.shown(), this.colours());
  });
  protected readonly envelopeWords = computed(() => {
    const mixture = this.state.mixture();
    return mixture.kind === 'refused' ? mixture.words : (this.envelope()?.words ?? '');
  });
  protected readonly txyOption = computed(() => {
    const plot = this.txy();
    if (!plot || plot.points.length === 0) return null;
    const [a, b] = plot.pair;
    const names = [componentById(a).name, componentById(b).name] as const;
    return toTxyOption(plot, names, this.state.temperature(), this.shown(), this.colours());
  });
  protected readonly txyWords = computed(() => this.txy()?.words ?? '');
  protected readonly txyTitle = computed(() => {
    const plot = this.txy();
    return plot ? `at ${this.quantities.pressure(plot.pressure)} ${this.quantities.pressureUnit()}` : '';
  });

  private readonly ceiling = computed(() => {
    const present = this.state.product().value;
    return plotCeiling(this.state.target(), present && !present.clamped ? present.groupFraction : 0);
  });
  protected readonly inferredOption = computed(() => {
    const plot = this.inferred();
    if (!plot || plot.points.length === 0) return null;
    const { value, isOld } = this.state.product();
    const present =
      value && !isOld && !value.clamped
        ? { temperature: this.state.temperature(), groupFraction: value.groupFraction }
        : null;
    const marks = { product: productNames[this.state.relation()], target: this.state.target(), present };
    return toInferredOption(plot, marks, this.shown(), this.colours());
  });
  protected readonly inferredWords = computed(() => {
    const inference = this.state.inference();
    return inference.kind === 'refused' ? inference.words : (this.inferred()?.words ?? '');
  });
  protected readonly inferredTitle = computed(() => {
    const plot = this.inferred();
    return plot ? `at ${this.quantities.pressure(plot.pressure)} ${this.quantities.pressureUnit()}` : '';
  });
  protected readonly said = computed(() => {
    const { value } = this.state.product();
    return value
      ? `${formatNumber(this.quantities.toFraction(value.groupFraction), 3)} ${this.quantities.fractionUnit()} now`
      : '';
  });

  constructor() {
    const view = inject(DOCUMENT).defaultView;
    if (!view) return;
    const later = afterFrame(view);
    const now = () => view.performance.now();
    const envelopeWork = new SlicedWork<EnvelopePlot>(later, now, (plot) => this.envelope.set(plot));
    const txyWork = new SlicedWork<TxyPlot>(later, now, (plot) => this.txy.set(plot));
    const inferredWork = new SlicedWork<InferredPlot>(later, now, (plot) => this.inferred.set(plot));
    inject(DestroyRef).onDestroy(() => {
      envelopeWork.stop();
      txyWork.stop();
      inferredWork.stop();
    });
    // The work goes on outside Angular, between frames.
    effect(() => {
      const mixture = this.state.mixture();
      if (mixture.kind === 'answered') envelopeWork.request(() => envelopePlot(mixture.value));
    });
    effect(() => {
      const pair = this.state.pair();
      const how = { method: this.state.method(), correlations: this.pairCorrelations() };
      const pressure = this.state.pressure();
      if (pair) txyWork.request(() => txyPlot(pair, pressure, how));
    });
    effect(() => {
      const inference = this.state.inference();
      const [pressure, ceiling, instruments] = [
        this.state.pressure(),
        this.ceiling(),
        this.state.instruments(),
      ];
      if (inference.kind === 'answered')
        inferredWork.request(() => inferredPlot(inference.value, pressure, ceiling, instruments));
    });
  }

  protected choosePair(side: 0 | 1, id: string): void {
    const pair = this.state.pair();
    if (!pair) return;
    const other = pair[side === 0 ? 1 : 0];
    // The same one on both sides is no pair: the two change places.
    const kept = other === id ? pair[side] : other;
    this.state.change({ pair: side === 0 ? [id, kept] : [kept, id] });
  }

  private pairCorrelations(): Readonly<Record<string, string>> | undefined {
    return this.state.method() === 'ideal' ? this.state.correlations() : undefined;
  }
}
