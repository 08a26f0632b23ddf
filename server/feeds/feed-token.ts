import { createHash, randomBytes } from 'node:crypto';

const TOKEN_BYTES = 32;

/** A new secret for a calendar address: 256 random bits, in letters that a URL takes as they are. */
export function newFeedToken(): string {
  return randomBytes(TOKEN_BYTES).toString('base64url');
}

/** What is kept of a token: its SHA-256 in hexadecimal. A token has 256 random bits, so nothing slower is needed. */
export function digestOfToken(token: string): string {
  return createHash('sha256').update(token).digest('hex');
}

/** Whether a text has the shape of a token, so that nothing else is looked up. */
export function isFeedToken(text: string): boolean {
  return /^[A-Za-z0-9_-]{43}$/.test(text);
}
