import { ICalCalendar, ICalEvent, ICalEventStatus, ICalEventTransparency, type ICalEventData } from 'ical-generator';
import { DateTime } from 'luxon';
import type { FeedScope } from '@common/contract/feeds';
import type { Minute } from '@common/time/span';
import { uidOf } from './feed-event';
import type { FeedHistory, HistoryEntry } from './feed-history';
import { foldLines } from './fold-lines';
import { zoneComponent } from './zone-component';

const DAY_SECONDS = 86_400;
/** How long past entries stay in the calendar, counted back from the newest issue so that the text follows from the issues alone. */
const PAST_SHOWN_SECONDS = 60 * DAY_SECONDS;
/** How long an entry that is gone is sent as cancelled, so that a reader who looks in seldom takes it out. */
const CANCELLED_SHOWN_SECONDS = 45 * DAY_SECONDS;
/** How often a reader is asked to look again. */
const REFRESH_SECONDS = 3600;

/** What a calendar says of itself. */
export interface CalendarHead {
  readonly scope: FeedScope;
  readonly name: string;
  /** IANA zone in which times are written. */
  readonly zone: string;
}

/**
 * The calendar as RFC 5545 text, complete with its last CRLF. It depends on nothing but its arguments: the same history gives the
 * same bytes whenever and wherever it is written.
 */
export function calendarText(head: CalendarHead, history: FeedHistory): string {
  const entries = history.entries.filter((entry) => isShown(entry, history.atSeconds));
  const component = zoneComponent(head.zone, instantsOf(entries));
  const zone = component === null ? null : head.zone;
  const calendar = new ICalCalendar({
    prodId: { company: 'Fettle', product: 'Issued plan', language: 'EN' },
    // The library writes a calendar's name as it comes, though it is a TEXT.
    name: escapeText(head.name),
    scale: 'GREGORIAN',
    ttl: REFRESH_SECONDS,
    // Not `timezone`: with it the library writes DTSTAMP and LAST-MODIFIED on the wall clock, where RFC 5545 wants UTC, adds a
    // property of its own, and puts properties behind the first component.
  });
  const [opening] = calendar.toString().split('END:VCALENDAR');
  // Entry by entry, because the library's folding of a whole calendar takes seconds for a studio's.
  const events = entries.map((entry) => new ICalEvent(eventData(entry, head.scope, zone), calendar).toString());
  return foldLines([opening, component ?? '', ...events, 'END:VCALENDAR\r\n'].join(''));
}

function eventData(entry: HistoryEntry, scope: FeedScope, zone: string | null): ICalEventData {
  const changed = new Date(entry.changedSeconds * 1000);
  return {
    id: uidOf(scope, entry.key),
    start: inZone(entry.start, zone),
    end: entry.end === null ? null : inZone(entry.end, zone),
    timezone: zone,
    summary: plainText(entry.summary),
    location: plainText(entry.location) || null,
    description: plainText(entry.description) || null,
    categories: [{ name: entry.category }],
    sequence: entry.sequence,
    stamp: changed,
    lastModified: changed,
    status: statusOf(entry),
    transparency:
      entry.busy === 'opaque' && entry.presence === 'standing'
        ? ICalEventTransparency.OPAQUE
        : ICalEventTransparency.TRANSPARENT,
  };
}

function statusOf(entry: HistoryEntry): ICalEventStatus {
  if (entry.presence === 'gone') {
    return ICalEventStatus.CANCELLED;
  }
  return entry.certainty === 'tentative' ? ICalEventStatus.TENTATIVE : ICalEventStatus.CONFIRMED;
}

function isShown(entry: HistoryEntry, atSeconds: number): boolean {
  return entry.presence === 'gone'
    ? entry.changedSeconds > atSeconds - CANCELLED_SHOWN_SECONDS
    : (entry.end ?? entry.start) * 60 > atSeconds - PAST_SHOWN_SECONDS;
}

function* instantsOf(entries: readonly HistoryEntry[]): Generator<Minute> {
  for (const entry of entries) {
    yield entry.start;
    if (entry.end !== null) {
      yield entry.end;
    }
  }
}

function inZone(instant: Minute, zone: string | null): DateTime {
  return DateTime.fromSeconds(instant * 60, { zone: zone ?? 'utc' });
}

/** What TEXT may hold (section 3.3.11): no controls but tab and line feed, no halves of a character. */
function plainText(text: string): string {
  return (
    text
      .replace(/\r\n?/g, '\n')
      .replace(/\p{Surrogate}/gu, '\uFFFD')
      // eslint-disable-next-line no-control-regex -- controls are what is taken out
      .replace(/[\u0000-\u0008\u000B-\u001F\u007F]/g, '')
  );
}

function escapeText(text: string): string {
  return plainText(text)
    .replace(/[\\;,]/g, (mark) => `\\${mark}`)
    .replaceAll('\n', '\\n');
}
