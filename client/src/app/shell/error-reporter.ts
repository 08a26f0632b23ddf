import { type ErrorHandler, inject, Injectable, Injector } from '@angular/core';
import { MatSnackBar } from '@angular/material/snack-bar';
import { ApiFailure } from '../api';
import { Toasts } from '../ui/toasts';

/** The last resort for errors that no page caught: says so in plain words, and leaves the details in the browser's console. */
@Injectable()
export class ErrorReporter implements ErrorHandler {
  private readonly injector = inject(Injector);

  handleError(error: unknown): void {
    const failure = apiFailureIn(error);
    if (failure !== null) {
      // Signing in again says it already.
      if (failure.kind !== 'not-signed-in') {
        this.injector.get(Toasts).fail(failure);
      }
      return;
    }
    // eslint-disable-next-line no-console -- whoever mends it reads it there
    console.error(error);
    const text = isMissingChunk(error)
      ? 'Fettle has been renewed since you opened it. Reload the page to go on.'
      : 'Something went wrong on this page. Reload it; what was saved is safe.';
    const opened = this.injector.get(MatSnackBar).open(text, 'Reload', { politeness: 'assertive' });
    opened.onAction().subscribe(() => location.reload());
  }
}

/** A rejected promise reaches the handler wrapped, with the failure as its cause or rejection. */
function apiFailureIn(error: unknown): ApiFailure | null {
  const wrapped = error as { cause?: unknown; rejection?: unknown } | null;
  return [error, wrapped?.cause, wrapped?.rejection].find((one) => one instanceof ApiFailure) ?? null;
}

/** A page's part that a newer build no longer has. */
function isMissingChunk(error: unknown): boolean {
  return error instanceof Error && /dynamically imported module|Importing a module script failed/i.test(error.message);
}
