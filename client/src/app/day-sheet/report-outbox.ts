import { DestroyRef, DOCUMENT, inject, Injectable, signal } from '@angular/core';
import { endpoints, type StageReport, type StageView } from '@common/contract';
import type { z } from 'zod';
import { Api, toApiFailure } from '../api';
import { SessionStore } from '../session';
import { Toasts } from '../ui/toasts';

/** What a maker reports on a stage. */
export type ReportAction = 'start' | 'pause' | 'finish';

/** A report that waits to be sent, or is being sent. */
export interface WaitingReport {
  readonly accountId: string;
  readonly stageId: string;
  readonly action: ReportAction;
  readonly report: z.infer<typeof StageReport>;
}

/** The state that a report leaves a stage in. */
export const STATE_AFTER: Readonly<Record<ReportAction, StageView['state']>> = {
  start: 'started',
  pause: 'paused',
  finish: 'finished',
};

const ENDPOINT_OF = {
  start: endpoints.startStage,
  pause: endpoints.pauseStage,
  finish: endpoints.finishStage,
} as const;
const KEY = 'fettle-reports';
const TRY_AGAIN_MS = 15_000;

/**
 * Reports on their way to the server, kept on the device until they have arrived: the workshop's far corner has no signal. They
 * go in the order in which they were made, each with its own key, so that one sent twice counts once.
 */
@Injectable({ providedIn: 'root' })
export class ReportOutbox {
  private readonly api = inject(Api);
  private readonly session = inject(SessionStore);
  private readonly toasts = inject(Toasts);
  private readonly window = inject(DOCUMENT).defaultView;
  private readonly queue = signal<readonly WaitingReport[]>(this.kept());
  private readonly arrivedTimes = signal(0);
  private sending: Promise<void> | null = null;
  private timer: ReturnType<typeof setTimeout> | undefined;

  /** Reports that have not arrived yet, oldest first. */
  readonly waiting = this.queue.asReadonly();
  /** Counts reports that arrived or were refused: whoever shows stages reads again. */
  readonly settled = this.arrivedTimes.asReadonly();

  constructor() {
    const again = (): void => void this.send();
    this.window?.addEventListener('online', again);
    inject(DestroyRef).onDestroy(() => {
      this.window?.removeEventListener('online', again);
      clearTimeout(this.timer);
    });
  }

  /** Takes a report and sends it, now or when the connection is back. */
  async add(stageId: string, action: ReportAction, report: WaitingReport['report']): Promise<void> {
    const accountId = this.session.account()?.id ?? '';
    this.keep([...this.queue(), { accountId, stageId, action, report }]);
    await this.send();
  }

  /** Sends what waits, unless it is being sent. */
  send(): Promise<void> {
    this.sending ??= this.sendAll().finally(() => (this.sending = null));
    return this.sending;
  }

  private async sendAll(): Promise<void> {
    clearTimeout(this.timer);
    for (;;) {
      // Another account's reports wait until that person signs in again on this device.
      const next = this.queue().find((one) => one.accountId === this.session.account()?.id);
      if (next === undefined) {
        return;
      }
      try {
        await this.api.callEndpoint(ENDPOINT_OF[next.action], { params: { id: next.stageId }, body: next.report });
      } catch (error) {
        const failure = toApiFailure(error);
        if (failure.status === 0 || failure.status === 401 || failure.status === 429 || failure.status >= 500) {
          this.timer = setTimeout(() => void this.send(), TRY_AGAIN_MS);
          return;
        }
        this.toasts.fail(failure);
      }
      this.keep(this.queue().filter((one) => one !== next));
      this.arrivedTimes.update((times) => times + 1);
    }
  }

  private keep(queue: readonly WaitingReport[]): void {
    this.queue.set(queue);
    try {
      this.window?.localStorage.setItem(KEY, JSON.stringify(queue));
    } catch {
      // A browser that keeps nothing still sends while the page is open.
    }
  }

  private kept(): readonly WaitingReport[] {
    try {
      const queue: unknown = JSON.parse(this.window?.localStorage.getItem(KEY) ?? '[]');
      return Array.isArray(queue) ? (queue as WaitingReport[]) : [];
    } catch {
      return [];
    }
  }
}
