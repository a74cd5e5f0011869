import { DOCUMENT, Injectable, Injector, afterNextRender, inject } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { NavigationEnd, Router } from '@angular/router';
import { filter, map, pairwise } from 'rxjs';

/** Moves the focus to the new screen's heading after a navigation, so that keyboards and screen readers start there. */
@Injectable({ providedIn: 'root' })
export class HeadingFocus {
  private readonly document = inject(DOCUMENT);
  private readonly injector = inject(Injector);

  constructor() {
    inject(Router)
      .events.pipe(
        filter((event) => event instanceof NavigationEnd),
        map((event) => event.urlAfterRedirects.split(/[?#]/, 1)[0]),
        pairwise(),
        // A filter or a chosen range changes the query only: the person is still where they were.
        filter(([from, to]) => from !== to),
        takeUntilDestroyed(),
      )
      .subscribe(() => afterNextRender(() => this.focusHeading(), { injector: this.injector }));
  }

  private focusHeading(): void {
    const heading = this.document.querySelector<HTMLElement>('main h1');
    if (!heading) return;
    heading.tabIndex = -1;
    heading.focus({ preventScroll: true });
  }
}
