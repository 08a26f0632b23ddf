import { inject, Injectable } from '@angular/core';
import { MatSnackBar } from '@angular/material/snack-bar';
import { toApiFailure } from '../api';

const SHORT_MS = 4_000;
const LONG_MS = 12_000;

/** Short words at the foot of the page: what was done, or what went wrong where there is no better place to say it. */
@Injectable({ providedIn: 'root' })
export class Toasts {
  private readonly bar = inject(MatSnackBar);

  /** Says that something was done. */
  say(text: string): void {
    this.bar.open(text, undefined, { duration: SHORT_MS });
  }

  /** Says what went wrong, and by which number the studio's server knows it. */
  fail(error: unknown): void {
    const failure = toApiFailure(error);
    const number = failure.requestId === null ? '' : ` (request ${failure.requestId})`;
    this.bar.open(`${failure.detail}${number}`, 'Close', { duration: LONG_MS, politeness: 'assertive' });
  }
}
