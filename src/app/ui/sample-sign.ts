import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import type { SampleState } from '@shared/api/sensors';

/** The sign of a sample's state, told apart by shape: filled, ringed, crossed, dotted. A word stands beside it. */
@Component({
  selector: 'app-sample-sign',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <svg viewBox="0 0 14 14" aria-hidden="true">
      @switch (state()) {
        @case ('used') {
          <path class="filled" d="M7 1 13 7 7 13 1 7Z" />
        }
        @case ('held') {
          <path d="M7 2 12 7 7 12 2 7Z" />
        }
        @case ('rejected') {
          <path d="M2 2 12 12M12 2 2 12" />
        }
        @default {
          <circle class="dotted" cx="7" cy="7" r="5" />
        }
      }
    </svg>
  `,
  styles: `
    :host {
      display: inline-block;
      width: 14px;
      height: 14px;
      vertical-align: -2px;
    }
    svg {
      display: block;
      fill: none;
      stroke: var(--laboratory);
      stroke-width: 2;
    }
    .filled {
      fill: var(--laboratory);
      stroke: none;
    }
    .dotted {
      stroke-dasharray: 2 2;
    }
  `,
})
export class SampleSign {
  readonly state = input.required<SampleState>();
}
