import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { NavigationEnd, Router, RouterLink, RouterOutlet } from '@angular/router';
import { mdiAccountOutline, mdiClose, mdiRuler, mdiWeatherNight, mdiWhiteBalanceSunny } from '@mdi/js';
import { filter, map } from 'rxjs';
import { Clock } from '../core/clock';
import { Notices } from '../core/notices';
import { PlantTime } from '../core/plant-time';
import { Preferences } from '../core/preferences';
import { SessionStore } from '../core/session';
import { Glyph } from '../ui/glyph';
import { DisplayMenu } from './display-menu';
import { LiveState } from './live-state';
import { entryOf, menu } from './menu';

/** What stands around every screen: menu, site, live state, clock, and who is signed in. */
@Component({
  selector: 'app-shell',
  imports: [DisplayMenu, Glyph, LiveState, RouterLink, RouterOutlet],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './shell.html',
  styleUrl: './shell.scss',
})
export class Shell {
  protected readonly session = inject(SessionStore);
  protected readonly preferences = inject(Preferences);
  protected readonly notices = inject(Notices);
  private readonly clock = inject(Clock);
  private readonly plantTime = inject(PlantTime);
  private readonly router = inject(Router);

  protected readonly icons = {
    night: mdiWeatherNight,
    day: mdiWhiteBalanceSunny,
    units: mdiRuler,
    person: mdiAccountOutline,
    close: mdiClose,
  };
  private readonly url = toSignal(
    this.router.events.pipe(
      filter((event) => event instanceof NavigationEnd),
      map((event) => event.urlAfterRedirects),
    ),
    { initialValue: this.router.url },
  );
  protected readonly entries = computed(() => menu.filter((entry) => this.session.may(entry.permission)));
  protected readonly current = computed(() => entryOf(this.url()));
  protected readonly time = computed(() => this.plantTime.timeWithZone(this.clock.minute()));
  protected readonly personLabel = computed(() => `You: ${this.session.user()?.name ?? ''}`);

  /** The address of the page must stay: with a base address, a plain link to #main would lead away from it. */
  protected skipToMain(click: Event, main: HTMLElement): void {
    click.preventDefault();
    main.focus();
  }

  protected switchTheme(): void {
    this.preferences.choose({ theme: this.preferences.isNight() ? 'day' : 'night' });
  }

  protected async signOut(): Promise<void> {
    await this.session.signOut();
  }
}
