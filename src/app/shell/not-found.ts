import { ChangeDetectionStrategy, Component } from '@angular/core';
import { RouterLink } from '@angular/router';

@Component({
  selector: 'app-not-found',
  imports: [RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <h1>There is no such page</h1>
    <p>
      The address may be mistyped, or what it showed was renamed. <a routerLink="/board">Go to the Board</a>
    </p>
  `,
})
export class NotFound {}
