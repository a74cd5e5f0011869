import { ChangeDetectionStrategy, Component, input } from '@angular/core';

/**
 * One sign from `@mdi/js`, in the colour and at the size of the text around it. It is decoration: the word beside it, or the
 * control's label, says what it means.
 */
@Component({
  selector: 'app-glyph',
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: { 'aria-hidden': 'true' },
  template: '<svg viewBox="0 0 24 24"><path fill="currentColor" [attr.d]="path()" /></svg>',
  styles: `
    :host {
      display: inline-block;
      flex: none;
      width: 1.25em;
      height: 1.25em;
      vertical-align: -0.25em;
    }
    svg {
      display: block;
      width: 100%;
      height: 100%;
    }
  `,
})
export class Glyph {
  /** The path, as the constants of `@mdi/js` give it. */
  readonly path = input.required<string>();
}
