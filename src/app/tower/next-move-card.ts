import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import type { SensorDetail } from '@shared/api/sensors';
import { Quantities } from '../ui/quantities';

/** Where to bring the temperature so that the product meets its target: advice, never an order. */
@Component({
  selector: 'app-next-move-card',
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: { class: 'card' },
  template: `
    <h2>Next move</h2>
    @switch (move().kind) {
      @case ('move') {
        @if (words(); as to) {
          <p>
            {{ to.place }} temperature to
            <span class="num">{{ to.temperature }} {{ quantities.temperatureUnit() }}</span
            >, <span class="num">{{ to.change }} {{ quantities.temperatureChangeUnit() }}</span
            >{{ to.steps > 1 ? ', in ' + to.steps + ' steps' : '' }}, brings {{ sensor().symbol }} to
            <span class="num">{{ to.target }} {{ quantities.fractionUnit() }}</span> at
            <span class="num">{{ to.pressure }} {{ quantities.pressureUnit() }}</span
            >.
          </p>
          @if (to.pressureInstead; as pressure) {
            <p class="soft">
              At this temperature a pressure change of
              <span class="num">{{ pressure }} {{ quantities.pressureChangeUnit() }}</span> would do the same.
            </p>
          }
        }
      }
      @case ('on-target') {
        <p>The product is on its target; no move is needed.</p>
      }
      @default {
        <p>{{ because() }}</p>
      }
    }
    <p class="soft small">Advice for a qualified operator. Unit procedures and limits come first.</p>
  `,
  styles: `
    :host {
      display: grid;
      gap: 6px;
    }
    .small {
      font-size: 12px;
    }
  `,
})
export class NextMoveCard {
  protected readonly quantities = inject(Quantities);
  readonly sensor = input.required<SensorDetail>();
  readonly decimals = input.required<number>();

  protected readonly move = computed(() => this.sensor().nextMove);
  protected readonly because = computed(() => {
    const move = this.move();
    return move.kind === 'none' ? move.because : '';
  });
  protected readonly words = computed(() => {
    const move = this.move();
    if (move.kind !== 'move') return null;
    return {
      place: this.sensor().point === 'overhead' ? 'Overhead' : 'Bottoms',
      temperature: this.quantities.temperature(move.temperature),
      change: this.quantities.temperatureChange(move.change),
      steps: move.steps,
      target: this.quantities.fraction(move.target, this.decimals()),
      pressure: this.quantities.pressure(move.pressure),
      pressureInstead:
        move.pressureInstead === null ? null : this.quantities.pressureChange(move.pressureInstead),
    };
  });
}
