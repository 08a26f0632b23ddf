import { computed, effect, inject, Injectable, signal, untracked } from '@angular/core';
import { type DaySheetEntry, endpoints } from '@common/contract';
import { addDays, dayOfInstant } from '@common/time/calendar-day';
import { onLiveEvent, readEndpoint } from '../api';
import { SessionStore } from '../session';
import { STUDIO_CLOCK } from '../ui/studio-clock';
import { freshKey } from './fresh-key';
import { minuteTick } from './minute-tick';
import { type ReportAction, ReportOutbox, STATE_AFTER, type WaitingReport } from './report-outbox';

/** One maker's day as it was issued, with what is reported and not yet sent laid over it. Provided by the page. */
@Injectable()
export class DaySheetStore {
  private readonly clock = inject(STUDIO_CLOCK);
  private readonly outbox = inject(ReportOutbox);
  private readonly session = inject(SessionStore);
  private readonly wantedDay = signal<string | null>(null);
  private readonly wantedMaker = signal<string | null>(null);

  /** Now, in whole minutes since 1970. */
  readonly now = minuteTick();
  readonly today = computed(() => dayOfInstant(this.now(), this.clock.zone()));
  readonly tomorrow = computed(() => addDays(this.today(), 1));
  readonly day = computed(() => this.wantedDay() ?? this.today());
  readonly makerId = computed(() => this.wantedMaker() ?? this.session.account()?.makerId ?? null);

  readonly read = readEndpoint(endpoints.readDaySheet, () => {
    const makerId = this.makerId();
    return makerId === null ? undefined : { query: { day: this.day(), makerId } };
  });
  readonly waiting = this.outbox.waiting;

  readonly sheet = computed(() => {
    const sheet = this.read.value();
    return sheet && { ...sheet, entries: sheet.entries.map((entry) => withWaiting(entry, this.waiting())) };
  });
  /** What has to be begun before going home, so that it cures overnight. */
  readonly beforeGoingHome = computed(() =>
    (this.sheet()?.entries ?? []).filter((entry) => entry.beforeGoingHome && entry.state !== 'finished'),
  );
  /** Dwells that are not over yet, the soonest first. */
  readonly dwells = computed(() => (this.sheet()?.dwells ?? []).toSorted((a, b) => a.until.localeCompare(b.until)));

  constructor() {
    effect(() => {
      if (this.outbox.settled() > 0) {
        untracked(() => this.read.reload());
      }
    });
    onLiveEvent((event) => {
      const matters = event === null || event.kind === 'plan-issued' || event.kind === 'record-changed';
      if (matters && (event?.kind !== 'record-changed' || event.subject === 'stage')) {
        this.read.reload();
      }
    });
    void this.outbox.send();
  }

  /** Which day and whose; null for today and one's own. */
  show(day: string | null, makerId: string | null): void {
    this.wantedDay.set(day);
    this.wantedMaker.set(makerId);
  }

  /** Reports on a stage, as of now. */
  report(
    entry: DaySheetEntry,
    action: ReportAction,
    more: { spentMinutes?: number; note?: string } = {},
  ): Promise<void> {
    const at = new Date(this.clock.now()).toISOString();
    return this.outbox.add(entry.stageId, action, { key: freshKey(), at, ...more });
  }
}

/** An entry as it stands once what waits has arrived. */
export function withWaiting(entry: DaySheetEntry, waiting: readonly WaitingReport[]): DaySheetEntry {
  const last = waiting.findLast((one) => one.stageId === entry.stageId);
  return last === undefined ? entry : { ...entry, state: STATE_AFTER[last.action] };
}
