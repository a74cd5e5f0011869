import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatFormField, MatError, MatHint, MatLabel } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { Router } from '@angular/router';
import type { ApiFailure } from '../core/api-error';
import { SessionStore } from '../core/session';

/** Name and password; afterwards the person is where they wanted to go. */
@Component({
  selector: 'app-sign-in',
  imports: [MatButton, MatError, MatFormField, MatHint, MatInput, MatLabel, ReactiveFormsModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './sign-in.html',
  styleUrl: './sign-in.scss',
})
export class SignIn {
  protected readonly session = inject(SessionStore);
  private readonly router = inject(Router);
  private readonly forms = inject(NonNullableFormBuilder);

  /** Where to go afterwards, from the address. */
  readonly returnUrl = input<string>();
  /** Whether a session ended by itself brought the person here, from the address. */
  readonly expired = input<string>();

  protected readonly form = this.forms.group({
    username: ['', Validators.required],
    password: ['', Validators.required],
  });
  protected readonly isWaiting = signal(false);
  protected readonly capsLock = signal(false);
  protected readonly refusal = signal<ApiFailure | null>(null);
  /** A refusal, else that the server could not be reached when the page opened. */
  protected readonly failure = computed(() => this.refusal() ?? this.session.failure());

  protected async signIn(password: HTMLInputElement): Promise<void> {
    this.form.markAllAsTouched();
    if (this.form.invalid || this.isWaiting()) return;
    this.isWaiting.set(true);
    this.refusal.set(null);
    const outcome = await this.session.signIn(this.form.getRawValue());
    this.isWaiting.set(false);
    if (outcome.kind === 'signed-in') {
      await this.router.navigateByUrl(ownAddress(this.returnUrl()));
      return;
    }
    this.refusal.set(outcome.failure);
    // Selected, not emptied: an empty field would complain beside the server's words.
    password.select();
  }

  /** The server was away when the page opened; the session may still stand once it is back. */
  protected async tryAgain(): Promise<void> {
    await this.session.load();
    if (this.session.user()) await this.router.navigateByUrl(ownAddress(this.returnUrl()));
  }

  protected watchCapsLock(event: KeyboardEvent): void {
    // A password manager fills fields with key events that lack this function.
    this.capsLock.set(event.getModifierState?.('CapsLock') ?? false);
  }
}

/** The address to go to, if it is one of this application; nobody is sent elsewhere by a link they were given. */
function ownAddress(url: string | undefined): string {
  return url && /^\/(?![/\\])/.test(url) && !url.startsWith('/sign-in') ? url : '/board';
}
