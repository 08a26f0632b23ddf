import { createHash } from 'node:crypto';
import type { FeedScope } from '@common/contract/feeds';
import type { Minute } from '@common/time/span';

/** One entry of a calendar: all that a reader can see of it, and nothing that says when it was made. */
export interface FeedEvent {
  /** Names the entry for life within its scope, such as `work.<stage id>.2`. */
  readonly key: string;
  readonly start: Minute;
  /** Null for a moment, such as a key date. Always after `start`. */
  readonly end: Minute | null;
  readonly summary: string;
  /** Empty for nowhere in particular. */
  readonly location: string;
  /** Lines joined by a line feed; may be empty. */
  readonly description: string;
  readonly category: 'work' | 'dwell' | 'stage' | 'sign-off' | 'key date';
  /** Whether it takes up the reader's time. */
  readonly busy: 'opaque' | 'transparent';
  readonly certainty: 'confirmed' | 'tentative';
}

/** A scope as text: the name under which its history is kept, and part of its entries' identity. */
export function scopeKey(scope: FeedScope): string {
  switch (scope.kind) {
    case 'maker':
      return `maker.${scope.makerId}`;
    case 'production':
      return `production.${scope.productionId}`;
    case 'studio':
      return 'studio';
  }
}

/**
 * The UID of an entry: the same for life and for every address of one scope, another in every other scope, where the same
 * stage reads differently. RFC 7986 section 5.3 asks for UUIDs that tell nothing; this is one of version 8 (RFC 9562),
 * made of a SHA-256 so that it needs no storing.
 */
export function uidOf(scope: FeedScope, key: string): string {
  const bytes = createHash('sha256')
    .update(`${scopeKey(scope)}|${key}`)
    .digest()
    .subarray(0, 16);
  bytes[6] = (bytes[6] & 0x0f) | 0x80;
  bytes[8] = (bytes[8] & 0x3f) | 0x80;
  const hex = bytes.toString('hex');
  return [hex.slice(0, 8), hex.slice(8, 12), hex.slice(12, 16), hex.slice(16, 20), hex.slice(20)].join('-');
}

/** Whether a reader would see two entries as the same. */
export function readsTheSame(a: FeedEvent, b: FeedEvent): boolean {
  return (
    a.start === b.start &&
    a.end === b.end &&
    a.summary === b.summary &&
    a.location === b.location &&
    a.description === b.description &&
    a.category === b.category &&
    a.busy === b.busy &&
    a.certainty === b.certainty
  );
}
