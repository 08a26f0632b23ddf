import { randomBytes, timingSafeEqual } from 'node:crypto';
import type { Request } from 'express';
import '../session/actor';
import { Problem } from './problem';

export const FORM_TOKEN_HEADER = 'X-Fettle-Token';

const SAFE_METHODS = new Set(['GET', 'HEAD', 'OPTIONS']);

/** The token of this session, made at its first use. Whoever can not read our answers can not know it. */
export function formTokenOf(request: Request): string {
  request.session.formToken ??= randomBytes(24).toString('base64url');
  return request.session.formToken;
}

/**
 * Refuses a request that changes something unless it comes from our own page: by the session's token, which another site can not
 * read, and by the Origin header, which another site can not write.
 */
export function refuseForeignRequest(request: Request, publicUrl: string | null): void {
  if (SAFE_METHODS.has(request.method)) return;
  const origin = request.get('Origin');
  if (origin !== undefined && !isOurOrigin(origin, request, publicUrl)) {
    throw new Problem('stale-form', 'This request comes from another site.');
  }
  const wanted = request.session.formToken;
  const sent = request.get(FORM_TOKEN_HEADER);
  if (wanted === undefined || sent === undefined || !isSameText(wanted, sent)) {
    throw new Problem('stale-form', 'Reload the page, then do it again: your session has changed since it was opened.');
  }
}

function isOurOrigin(origin: string, request: Request, publicUrl: string | null): boolean {
  if (origin === publicUrl) return true;
  // Without a public address the page was served under the host that it now asks.
  return publicUrl === null && URL.canParse(origin) && new URL(origin).host === request.get('Host');
}

function isSameText(a: string, b: string): boolean {
  const [left, right] = [Buffer.from(a), Buffer.from(b)];
  return left.length === right.length && timingSafeEqual(left, right);
}
