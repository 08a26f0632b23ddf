import { z } from 'zod';
import { type FeedScope } from '@common/contract/feeds';
import type { Span } from '@common/time/span';
import { type FeedEvent, readsTheSame } from './feed-event';
import type { IssuedView } from './issued-view';
import { scopeEvents, segmentKey } from './scope-events';

/** How long an entry that is over or gone is remembered, so that its sequence goes on where it ended if it comes back. */
const REMEMBERED_SECONDS = 400 * 86_400;

const WORK_KEY = /^work\.(.+)\.\d+$/;

/** One entry as it was last shown. */
const HistoryEntry = z.object({
  key: z.string(),
  start: z.int(),
  end: z.int().nullable(),
  summary: z.string(),
  location: z.string(),
  description: z.string(),
  category: z.enum(['work', 'dwell', 'stage', 'sign-off', 'key date']),
  busy: z.enum(['opaque', 'transparent']),
  certainty: z.enum(['confirmed', 'tentative']),
  /** How often it has been shown otherwise than before. */
  sequence: z.int(),
  /** When it last changed, in seconds since 1970-01-01T00:00Z: the instant of the issue that changed it. */
  changedSeconds: z.int(),
  /** `gone` once it was left out before it was over. */
  presence: z.enum(['standing', 'gone']),
}) satisfies z.ZodType<FeedEvent>;
export type HistoryEntry = z.infer<typeof HistoryEntry>;

/** The calendar of one scope as last shown, sorted by key: what its next state is compared with. */
export const FeedHistory = z.object({
  /** The issued plan that it shows; 0 before the first issue. */
  number: z.int(),
  /** The instant that it speaks for: of the newest change in it. It never falls. */
  atSeconds: z.int(),
  entries: z.array(HistoryEntry),
});
export type FeedHistory = z.infer<typeof FeedHistory>;

/** The calendar before anything was shown. */
export const EMPTY_HISTORY: FeedHistory = { number: 0, atSeconds: 0, entries: [] };

/**
 * The calendar after one more look at the studio. An entry's sequence rises by one if it now reads otherwise, goes or comes
 * back, and not otherwise. What is no longer planned but was over already stays as it was: the past is not called off. What a new issue brings is
 * dated by the issue; what changed without one (a name, a key date), by `nowSeconds`. The same object where nothing changed.
 */
export function withView(
  history: FeedHistory,
  scope: FeedScope,
  view: IssuedView,
  zone: string,
  nowSeconds: number,
): FeedHistory {
  const told = view.number > history.number ? view.atSeconds : nowSeconds;
  // Two issues may share a second, and a clock may be set back: the time of a change must not fall.
  const atSeconds = Math.max(told, history.atSeconds);
  const before = new Map(history.entries.map((entry) => [entry.key, entry]));
  const events = scopeEvents(scope, view, zone, (stageId) => segmentsSoFar(before, stageId));
  const standing = new Set(events.map((event) => event.key));
  const left = history.entries.filter((entry) => !standing.has(entry.key));
  const entries = [
    ...events.map((event) => shown(event, before.get(event.key), atSeconds)),
    ...left.map((entry) => (isReplaced(entry, standing) || !isOver(entry, atSeconds) ? gone(entry, atSeconds) : entry)),
  ];
  const unchanged =
    entries.length === history.entries.length && entries.every((entry) => before.get(entry.key) === entry);
  if (unchanged && view.number === history.number) {
    return history;
  }
  return {
    number: view.number,
    atSeconds,
    entries: entries.filter((entry) => isRemembered(entry, atSeconds)).sort(byKey),
  };
}

function shown(event: FeedEvent, before: HistoryEntry | undefined, atSeconds: number): HistoryEntry {
  if (!before) {
    return { ...event, sequence: 0, changedSeconds: atSeconds, presence: 'standing' };
  }
  if (before.presence === 'standing' && readsTheSame(event, before)) {
    return before;
  }
  return { ...event, sequence: before.sequence + 1, changedSeconds: atSeconds, presence: 'standing' };
}

function gone(entry: HistoryEntry, atSeconds: number): HistoryEntry {
  return entry.presence === 'gone'
    ? entry
    : { ...entry, sequence: entry.sequence + 1, changedSeconds: atSeconds, presence: 'gone' };
}

/** Whether it is a stretch of a stage that is still told, only in fewer stretches. */
function isReplaced(entry: HistoryEntry, standing: ReadonlySet<string>): boolean {
  const [, stageId] = WORK_KEY.exec(entry.key) ?? [];
  return stageId !== undefined && standing.has(segmentKey(stageId, 0));
}

function isOver(entry: HistoryEntry, atSeconds: number): boolean {
  return (entry.end ?? entry.start) * 60 <= atSeconds;
}

function isRemembered(entry: HistoryEntry, atSeconds: number): boolean {
  const since = entry.presence === 'gone' ? entry.changedSeconds : (entry.end ?? entry.start) * 60;
  return since > atSeconds - REMEMBERED_SECONDS;
}

function segmentsSoFar(before: ReadonlyMap<string, HistoryEntry>, stageId: string): readonly Span[] {
  const spans: Span[] = [];
  for (let index = 0; ; index += 1) {
    const entry = before.get(segmentKey(stageId, index));
    if (!entry || entry.presence === 'gone' || entry.end === null) {
      return spans;
    }
    spans.push({ start: entry.start, end: entry.end });
  }
}

/** By code units, so that the order is the same on every machine. */
function byKey(a: HistoryEntry, b: HistoryEntry): number {
  return a.key < b.key ? -1 : a.key > b.key ? 1 : 0;
}
