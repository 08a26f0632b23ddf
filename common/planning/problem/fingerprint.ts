import type { Problem } from './problem';

/**
 * A short name for a problem's content: 32 hexadecimal digits, equal for equal content whatever the order of keys or of the
 * lists that have ids. Four independent FNV-1a style 32-bit lanes (Fowler, Noll & Vo; RFC 9923 for the constants) over canonical
 * JSON, folded once at the end. Not a cryptographic hash: it tells stale from fresh, not honest from forged.
 */
export function fingerprint(problem: Problem): string {
  const byId = <T extends { readonly id: string }>(items: readonly T[]): T[] =>
    [...items].sort((a, b) => (a.id < b.id ? -1 : a.id > b.id ? 1 : 0));
  const ordered = {
    ...problem,
    makers: byId(problem.makers),
    bays: byId(problem.bays),
    stages: byId(problem.stages),
    keyDates: byId(problem.keyDates),
    advances: byId(problem.advances),
    links: problem.links.map(canonicalJson).sort(),
    issued: problem.issued && { placements: problem.issued.placements.map(canonicalJson).sort() },
  };
  return hash128(canonicalJson(ordered));
}

/** JSON with the keys of every object sorted and absent members left out, so that equal content is equal text. */
export function canonicalJson(value: unknown): string {
  if (value === null || typeof value !== 'object') return JSON.stringify(value) ?? 'null';
  if (Array.isArray(value)) return `[${value.map(canonicalJson).join(',')}]`;
  const members = Object.entries(value)
    .filter(([, member]) => member !== undefined)
    .sort(([a], [b]) => (a < b ? -1 : 1));
  return `{${members.map(([key, member]) => `${JSON.stringify(key)}:${canonicalJson(member)}`).join(',')}}`;
}

const FNV_PRIME = 0x01000193;
const FNV_OFFSET = 0x811c9dc5;

function hash128(text: string): string {
  const lanes = [FNV_OFFSET, FNV_OFFSET ^ 0x9e3779b9, FNV_OFFSET ^ 0x7f4a7c15, FNV_OFFSET ^ 0x85ebca6b];
  for (let i = 0; i < text.length; i += 1) {
    const unit = text.charCodeAt(i);
    for (let lane = 0; lane < 4; lane += 1) {
      lanes[lane] = Math.imul(lanes[lane] ^ (unit + lane * 0x101), FNV_PRIME);
      lanes[lane] ^= lanes[lane] >>> (13 + lane);
    }
  }
  return lanes.map((lane) => (avalanche(lane) >>> 0).toString(16).padStart(8, '0')).join('');
}

/** Spreads every bit of a 32-bit word over all of them (the finaliser of MurmurHash3, Appleby, public domain). */
function avalanche(word: number): number {
  let mixed = word ^ (word >>> 16);
  mixed = Math.imul(mixed, 0x85ebca6b);
  mixed ^= mixed >>> 13;
  mixed = Math.imul(mixed, 0xc2b2ae35);
  return mixed ^ (mixed >>> 16);
}
