import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import type { JournalEntry } from '@shared/api/journal';
import { Clock } from '../core/clock';
import { PlantTime } from '../core/plant-time';
import { Quantities } from '../ui/quantities';
import { actionPhrase, actorName, changeTexts } from './entry-words';

/** One line of the record: when, who, what, from what to what, why. */
@Component({
  selector: 'app-journal-entry-line',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <time class="num soft">{{ time() }}</time>
    <div>
      <p>
        <span class="actor">{{ actor() }}</span> {{ phrase() }}
        <span class="subject">{{ entry().subject.name }}</span>
        @if (entry().user; as user) {
          <span class="soft role">{{ user.role }}</span>
        }
      </p>
      @if (changes().length > 0) {
        <ul role="list">
          @for (change of changes(); track change.field) {
            <li>
              <span class="soft">{{ change.field }}</span>
              @if (change.from !== 'nothing') {
                <span class="num">{{ change.from }}</span>
                <span aria-hidden="true">→</span><span class="for-ears"> to </span>
              }
              <span class="num">{{ change.to }}</span>
              <span class="unit">{{ change.unit }}</span>
            </li>
          }
        </ul>
      }
      @if (entry().reason; as reason) {
        <p class="reason">{{ reason }}</p>
      }
    </div>
  `,
  styleUrl: './journal-entry-line.scss',
})
export class JournalEntryLine {
  private readonly clock = inject(Clock);
  private readonly plantTime = inject(PlantTime);
  private readonly quantities = inject(Quantities);

  readonly entry = input.required<JournalEntry>();

  protected readonly time = computed(() => this.plantTime.clockTime(this.entry().t));
  protected readonly actor = computed(() => actorName(this.entry()));
  protected readonly phrase = computed(() => actionPhrase(this.entry().action));
  protected readonly changes = computed(() =>
    this.entry().changes.map((change) =>
      changeTexts(change, {
        fraction: (moleFraction) => this.quantities.fraction(moleFraction),
        fractionUnit: this.quantities.fractionUnit(),
        time: (t) => this.plantTime.dateTime(t, this.clock.minute()),
      }),
    ),
  );
}
