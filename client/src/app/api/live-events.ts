import { DestroyRef, effect, inject, Injectable, InjectionToken, signal, untracked } from '@angular/core';
import { LiveEvent } from '@common/contract';

/** How the live connection stands. `off`: nobody is signed in. */
export type LiveState = 'off' | 'connecting' | 'live' | 'lost';

/** Opens the server's event stream; a token so that specs can put a fake in its place. */
export const OPEN_EVENT_SOURCE = new InjectionToken<(url: string) => EventSource>('open event source', {
  providedIn: 'root',
  factory: () => (url) => new EventSource(url, { withCredentials: true }),
});

/** How long to wait before a stream that the browser gave up is opened anew. */
const REOPEN_AFTER_MS = 5_000;
/** `EventSource.CLOSED`, by value: a fake has no constants. */
const CLOSED = 2;

const KINDS = ['plan-revised', 'plan-issued', 'level', 'forecast', 'record-changed'] as const;

/** What happens in the studio while pages are open, as signals. A lost stream is opened again. */
@Injectable({ providedIn: 'root' })
export class LiveEvents {
  private readonly open = inject(OPEN_EVENT_SOURCE);
  private source: EventSource | null = null;
  private reopenTimer: ReturnType<typeof setTimeout> | undefined;
  private readonly stateNow = signal<LiveState>('off');
  private readonly lastEvent = signal<LiveEvent | null>(null);
  private readonly reopenedTimes = signal(0);

  readonly state = this.stateNow.asReadonly();
  /** The newest event; null before the first. Each event is an object of its own, so the same news twice is told twice. */
  readonly last = this.lastEvent.asReadonly();
  /** Counts reconnections: whoever shows live data reads again, since events in between were missed. */
  readonly reopened = this.reopenedTimes.asReadonly();

  constructor() {
    inject(DestroyRef).onDestroy(() => this.disconnect());
  }

  /** Begins to listen; does nothing where it already does. */
  connect(): void {
    if (this.source !== null) {
      return;
    }
    if (this.stateNow() !== 'lost') {
      this.stateNow.set('connecting');
    }
    const source = this.open('/api/live');
    this.source = source;
    source.onopen = () => {
      if (this.stateNow() === 'lost') {
        this.reopenedTimes.update((times) => times + 1);
      }
      this.stateNow.set('live');
    };
    source.onerror = () => this.lose(source);
    const read = (message: MessageEvent<unknown>): void => this.read(message.data);
    source.onmessage = read;
    KINDS.forEach((kind) => source.addEventListener(kind, read));
  }

  /** Stops listening, as at sign-out. */
  disconnect(): void {
    clearTimeout(this.reopenTimer);
    this.source?.close();
    this.source = null;
    this.stateNow.set('off');
  }

  private lose(source: EventSource): void {
    this.stateNow.set('lost');
    // After an answer that is no stream (a restart behind a proxy, say) the browser does not try again by itself.
    if (source.readyState === CLOSED) {
      this.source = null;
      clearTimeout(this.reopenTimer);
      this.reopenTimer = setTimeout(() => this.connect(), REOPEN_AFTER_MS);
    }
  }

  private read(data: unknown): void {
    // A newer server may tell things that this page does not know: those are not for it.
    const event = LiveEvent.safeParse(fromJson(data));
    if (event.success) {
      this.lastEvent.set(event.data);
    }
  }
}

function fromJson(data: unknown): unknown {
  try {
    return JSON.parse(String(data));
  } catch {
    return null;
  }
}

/** Calls `react` for every live event and after every reconnection (with null). Call it where `inject()` may be called. */
export function onLiveEvent(react: (event: LiveEvent | null) => void): void {
  const live = inject(LiveEvents);
  let reopened = untracked(live.reopened);
  let first = true;
  effect(() => {
    const event = live.last();
    const times = live.reopened();
    if (first) {
      first = false;
      return;
    }
    const again = times !== reopened;
    reopened = times;
    untracked(() => react(again ? null : event));
  });
}

/** Reads again when one of these kinds of records changed somewhere else, or when events may have been missed. */
export function reloadOnChange(read: { reload(): void }, ...subjects: readonly string[]): void {
  onLiveEvent((event) => {
    if (event === null || (event.kind === 'record-changed' && subjects.includes(event.subject))) {
      read.reload();
    }
  });
}
