import { inject } from '@angular/core';
import { Router, type CanActivateFn, type UrlTree } from '@angular/router';
import type { Permission } from '@shared/api/permissions';
import { SessionStore } from './session';

/** Lets signed-in people through; others sign in first and then come to where they wanted to go. */
export const signedIn: CanActivateFn = (_route, state): boolean | UrlTree => {
  const wanted = state.url === '/' ? undefined : state.url;
  return (
    inject(SessionStore).user() !== null ||
    inject(Router).createUrlTree(['/sign-in'], { queryParams: { returnUrl: wanted } })
  );
};

/** Lets through whom the role allows; others get the page that says so. */
export function allowed(permission: Permission): CanActivateFn {
  return (): boolean | UrlTree =>
    inject(SessionStore).may(permission) || inject(Router).createUrlTree(['/not-allowed']);
}
