import { createHash } from 'node:crypto';

/** Name space of the demo's keys among name-based ids. */
const NAMESPACE = '5d1c6a0e-6f0b-4b0f-9a53-2c7d0a8f41e6';

/**
 * The record id of a demo key such as `bay:booth`: a name-based UUID, version 5 of RFC 9562, so that the same key has the same
 * id in every installation.
 */
export function recordId(key: string): string {
  const bytes = createHash('sha1')
    .update(Buffer.from(NAMESPACE.replaceAll('-', ''), 'hex'))
    .update(key)
    .digest()
    .subarray(0, 16);
  bytes[6] = (bytes[6] & 0x0f) | 0x50;
  bytes[8] = (bytes[8] & 0x3f) | 0x80;
  const hex = bytes.toString('hex');
  return [hex.slice(0, 8), hex.slice(8, 12), hex.slice(12, 16), hex.slice(16, 20), hex.slice(20)].join('-');
}

/** The same for a key that may be absent. */
export function recordIdOrNull(key: string | null): string | null {
  return key === null ? null : recordId(key);
}
