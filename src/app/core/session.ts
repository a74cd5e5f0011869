import { HttpClient } from '@angular/common/http';
import { Injectable, computed, inject, signal } from '@angular/core';
import { Router } from '@angular/router';
import { firstValueFrom } from 'rxjs';
import { may, type Permission } from '@shared/api/permissions';
import { session, sessionPath, type Credentials, type Session, type Site } from '@shared/api/session';
import { describeFailure, type ApiFailure } from './api-error';
import { Clock } from './clock';
import { Notices } from './notices';

/** How a sign-in ended; a refusal carries the server's words and, when locked, its status 429. */
export type SignInOutcome =
  { readonly kind: 'signed-in' } | { readonly kind: 'refused'; readonly failure: ApiFailure };

/** Stands in until the server has said which site this is; no screen is shown before. */
const unknownSite: Site = { name: '', timeZone: 'UTC', barometricPressure: 101_325, demonstration: false };

/** Who is signed in, and at which site. */
@Injectable({ providedIn: 'root' })
export class SessionStore {
  private readonly http = inject(HttpClient);
  private readonly clock = inject(Clock);
  private readonly notices = inject(Notices);
  private readonly router = inject(Router);

  private readonly current = signal<Session | null>(null);
  private readonly loadFailure = signal<ApiFailure | null>(null);

  readonly user = computed(() => this.current()?.user ?? null);
  readonly site = computed(() => this.current()?.site ?? unknownSite);
  /** Why the session could not be read at start; null once it was. */
  readonly failure = this.loadFailure.asReadonly();

  /** Whether the person signed in may do this; false when nobody is. */
  may(permission: Permission): boolean {
    const user = this.user();
    return user !== null && may(user.role, permission);
  }

  /** Reads the session; never rejects: a failure is kept in `failure`. */
  async load(): Promise<void> {
    try {
      this.take(await firstValueFrom(this.http.get(sessionPath)));
    } catch (error) {
      this.loadFailure.set(describeFailure(error));
    }
  }

  /** Signs in; a wrong password and a locked name are outcomes, not errors. */
  async signIn(credentials: Credentials): Promise<SignInOutcome> {
    try {
      this.take(await firstValueFrom(this.http.post(sessionPath, credentials)));
      return { kind: 'signed-in' };
    } catch (error) {
      return { kind: 'refused', failure: describeFailure(error) };
    }
  }

  /** Ends the session on the server, then shows the sign-in. */
  async signOut(): Promise<void> {
    try {
      await firstValueFrom(this.http.delete(sessionPath));
    } catch (error) {
      const failure = describeFailure(error);
      // 401: the server had ended it already, which is what was asked for.
      if (failure.status !== 401) {
        this.notices.warn(`You are still signed in. ${failure.words}`);
        return;
      }
    }
    this.forget();
    await this.router.navigateByUrl('/sign-in');
  }

  /** The server says nobody is signed in any more: asks for the password and comes back to where the person was. */
  expire(): void {
    if (!this.user()) return;
    this.forget();
    void this.router.navigate(['/sign-in'], { queryParams: { returnUrl: this.router.url, expired: true } });
  }

  /** Looks whether the session still stands, for connections that cannot see a status (the live stream). */
  async check(): Promise<void> {
    try {
      const answer = session.parse(await firstValueFrom(this.http.get(sessionPath)));
      this.clock.follow(answer.now);
      if (!answer.user) this.expire();
    } catch {
      return; // the server is away, which says nothing about the session
    }
  }

  private take(answer: unknown): void {
    const read = session.parse(answer);
    this.clock.follow(read.now);
    this.current.set(read);
    this.loadFailure.set(null);
  }

  private forget(): void {
    this.current.update((known) => known && { ...known, user: null });
  }
}
