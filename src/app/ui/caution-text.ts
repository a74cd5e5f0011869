import { ChangeDetectionStrategy, Component } from '@angular/core';

/** What inferred values are not for; stands once on each screen that shows them. */
@Component({
  selector: 'app-caution-text',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    Inferred values are for watching and steering by qualified operators. They are not for safety functions,
    custody transfer, or certification of product: the laboratory’s result under its own standard is.
  `,
  styles: `
    :host {
      display: block;
      max-width: 90ch;
      font-size: 12px;
      color: var(--soft);
    }
  `,
})
export class CautionText {}
