import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatError, MatFormField, MatLabel } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { Router } from '@angular/router';
import { toApiFailure } from '../api';
import { Notice } from '../ui/notice';
import { Wordmark } from '../ui/wordmark';
import { homeOf, safeReturn } from './home';
import { SessionStore } from './session-store';

/** Where a person says who they are: by password, or through Google where the studio has set that up. */
@Component({
  selector: 'fettle-sign-in-page',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton, MatError, MatFormField, MatInput, MatLabel, Notice, ReactiveFormsModule, Wordmark],
  templateUrl: './sign-in-page.html',
  styleUrl: './sign-in-page.scss',
})
export class SignInPage {
  private readonly session = inject(SessionStore);
  private readonly router = inject(Router);

  /** Address to go to afterwards, from the query. */
  readonly return = input<string>();
  /** Why signing in through Google did not work, from the query. */
  readonly problem = input<string>();

  protected readonly form = inject(NonNullableFormBuilder).group({
    email: ['', [Validators.required, Validators.email]],
    password: ['', Validators.required],
  });
  protected readonly studioName = this.session.studioName;
  protected readonly offersGoogle = this.session.offersGoogle;
  protected readonly busy = signal(false);
  private readonly failed = signal<string | null>(null);
  protected readonly message = computed(
    () =>
      this.failed() ??
      (this.problem() ? 'Google did not sign you in. Use an address that the studio knows, or your password.' : null),
  );
  protected readonly googleAddress = computed(() => {
    const back = safeReturn(this.return());
    return `/api/session/google${back === null ? '' : `?return=${encodeURIComponent(back)}`}`;
  });

  /** Signs in and goes on; says what was wrong otherwise. */
  protected async signIn(): Promise<void> {
    if (this.form.invalid || this.busy()) {
      this.form.markAllAsTouched();
      return;
    }
    this.busy.set(true);
    this.failed.set(null);
    try {
      const { email, password } = this.form.getRawValue();
      const { account } = await this.session.signIn(email.trim(), password);
      await this.router.navigateByUrl(safeReturn(this.return()) ?? (account ? homeOf(account.role) : '/'));
    } catch (error) {
      this.failed.set(toApiFailure(error).detail);
      this.form.controls.password.reset();
    } finally {
      this.busy.set(false);
    }
  }
}
