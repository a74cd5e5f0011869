import { httpResource } from '@angular/common/http';
import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { sample, samplesPath } from '@shared/api/samples';
import type { SensorDetail } from '@shared/api/sensors';
import { AgeText } from '../ui/age-text';
import { offsetWords } from '../ui/offset-words';
import { Quantities } from '../ui/quantities';
import { SampleSign } from '../ui/sample-sign';

/** The newest sample and what it changed. */
@Component({
  selector: 'app-sample-card',
  imports: [AgeText, RouterLink, SampleSign],
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: { class: 'card' },
  template: `
    <h2>Last sample</h2>
    @if (sensor().lastSample; as last) {
      <p>
        <app-sample-sign [state]="last.state" />&ngsp;<span class="num">{{
          quantities.fraction(last.value, decimals())
        }}</span>
        {{ quantities.fractionUnit() }}, {{ last.state }}, drawn <app-age-text [since]="last.drawnAt" /> ago
      </p>
      @if (effect(); as effect) {
        <p>{{ effect }}</p>
      }
      @if (reason(); as words) {
        <p class="soft">{{ words }}</p>
      }
    } @else {
      <p class="soft">No sample has been entered for this product.</p>
    }
    <p><a routerLink="/samples" [queryParams]="{ tower: sensor().towerId }">Samples of this tower</a></p>
  `,
  styles: `
    :host {
      display: grid;
      gap: 6px;
    }
  `,
})
export class SampleCard {
  protected readonly quantities = inject(Quantities);
  readonly sensor = input.required<SensorDetail>();
  readonly decimals = input.required<number>();
  /** Moves when everything is to be read again, the sample with it. */
  readonly readings = input(0);

  private readonly read = httpResource(
    () => {
      this.readings();
      const last = this.sensor().lastSample;
      return last ? `${samplesPath}/${last.id}` : undefined;
    },
    { parse: sample.parse },
  );
  private readonly whole = computed(() => (this.read.hasValue() ? this.read.value() : undefined));
  protected readonly reason = computed(() => this.whole()?.stateReason ?? '');
  protected readonly effect = computed(() => {
    const { id, version } = this.sensor();
    const own = this.whole()?.corrections.find((correction) => correction.sensorId === id);
    if (own?.decision !== 'used') return '';
    const words = offsetWords(version?.parameters.correction.domain, this.quantities);
    const sure = (variance: number) => words.text(2 * Math.sqrt(variance)).replace('+', '');
    return [
      `It moved the offset from ${words.text(own.offsetBefore)} to ${words.text(own.offsetAfter)}.`,
      `The offset is now known within ${sure(own.varianceAfter)} (95 %), before within ${sure(own.varianceBefore)}.`,
    ].join(' ');
  });
}
