import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { RouterLink } from '@angular/router';
import { SessionStore } from '../core/session';

@Component({
  selector: 'app-not-allowed',
  imports: [RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <h1>This page is not for your role</h1>
    <p>
      You are signed in as {{ session.user()?.role }}. Whoever administers Dewmark can change what you may do.
      <a routerLink="/board">Go to the Board</a>
    </p>
  `,
})
export class NotAllowed {
  protected readonly session = inject(SessionStore);
}
