import { Injectable, inject } from '@angular/core';
import { Title } from '@angular/platform-browser';
import { TitleStrategy, type RouterStateSnapshot } from '@angular/router';

/** Names the screen first, since a browser tab shows only the beginning. */
@Injectable()
export class PlantTitle extends TitleStrategy {
  private readonly title = inject(Title);

  override updateTitle(state: RouterStateSnapshot): void {
    const screen = this.buildTitle(state);
    this.title.setTitle(screen ? `${screen} · Dewmark` : 'Dewmark');
  }
}
