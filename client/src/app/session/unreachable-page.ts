import { ChangeDetectionStrategy, Component, inject, input, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { Router } from '@angular/router';
import { Wordmark } from '../ui/wordmark';
import { safeReturn } from './home';
import { SessionStore } from './session-store';

/** Shown where the studio's server gave no answer at start; tries again and goes where the person was going. */
@Component({
  selector: 'fettle-unreachable-page',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton, Wordmark],
  template: `
    <main id="main" class="page">
      <fettle-wordmark />
      <h1>The studio can’t be reached</h1>
      <p>Check the connection. If it holds, Fettle itself is stopped or starting: wait a minute, then try again.</p>
      <p>
        <button matButton="filled" type="button" [disabled]="busy()" (click)="tryAgain()">
          {{ busy() ? 'Trying…' : 'Try again' }}
        </button>
      </p>
    </main>
  `,
})
export class UnreachablePage {
  private readonly session = inject(SessionStore);
  private readonly router = inject(Router);

  readonly return = input<string>();
  protected readonly busy = signal(false);

  protected async tryAgain(): Promise<void> {
    this.busy.set(true);
    try {
      await this.session.load();
      await this.router.navigateByUrl(safeReturn(this.return()) ?? '/');
    } catch {
      // Still no answer: the page already says so.
    } finally {
      this.busy.set(false);
    }
  }
}
