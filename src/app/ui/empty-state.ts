import { ChangeDetectionStrategy, Component, input } from '@angular/core';

/** Says that there is nothing, why, and what would change that; an action may stand inside. */
@Component({
  selector: 'app-empty-state',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <p class="title">{{ title() }}</p>
    <p class="soft">{{ hint() }}</p>
    <ng-content />
  `,
  styles: `
    :host {
      display: grid;
      justify-items: start;
      gap: 6px;
      padding: 22px 20px;
      border: 1px dashed var(--edge);
      border-radius: var(--radius);
    }
    .title {
      font-weight: 500;
    }
  `,
})
export class EmptyState {
  readonly title = input.required<string>();
  readonly hint = input('');
}
