import { DateTime } from 'luxon';

/** What tells two answers of one address apart: a strong ETag with its quotes, and a whole second. */
export interface Validators {
  readonly etag: string;
  /** Seconds since 1970-01-01T00:00Z; null where this second may still change again, and only the ETag can be trusted. */
  readonly lastModifiedSeconds: number | null;
}

/** The two request headers that make a GET conditional; undefined where they are absent. */
export interface Conditions {
  readonly ifNoneMatch: string | undefined;
  readonly ifModifiedSince: string | undefined;
}

/**
 * Whether a reader already has what it asks for, by RFC 9110 section 13.2.2: If-None-Match decides alone where it is sent; a date
 * that is no date is as good as none.
 */
export function isUnchanged({ ifNoneMatch, ifModifiedSince }: Conditions, now: Validators): boolean {
  if (ifNoneMatch !== undefined) {
    return namesTag(ifNoneMatch, now.etag);
  }
  if (ifModifiedSince === undefined || now.lastModifiedSeconds === null) {
    return false;
  }
  const since = secondsOfHttpDate(ifModifiedSince);
  return since !== null && now.lastModifiedSeconds <= since;
}

/** Seconds of an HTTP-date in any of its three spellings (RFC 9110 section 5.6.7), or null where it is none. */
export function secondsOfHttpDate(text: string): number | null {
  const date = DateTime.fromHTTP(text.trim());
  return date.isValid ? Math.floor(date.toSeconds()) : null;
}

/** The preferred spelling of an HTTP-date. */
export function httpDate(seconds: number): string {
  return new Date(seconds * 1000).toUTCString();
}

/** Compares weakly (section 8.8.3.2), as If-None-Match does: a `W/` before either does not matter. */
function namesTag(header: string, etag: string): boolean {
  if (header.trim() === '*') {
    return true;
  }
  const opaque = etag.replace(/^W\//, '');
  return (header.match(/(?:W\/)?"[\x21\x23-\x7e\x80-\uffff]*"/g) ?? []).some(
    (tag) => tag.replace(/^W\//, '') === opaque,
  );
}
