import type { Minute, Span } from '@common/time/span';

/**
 * The stretches of a stage's hands-on work in an order that keeps each stretch's number for life. Before work begins they are
 * the issued plan's. Once it has begun, a plan tells only what remains, behind an empty span for what is done: so the stretches
 * that earlier issues named and that began before this one stay, and what remains is counted on from them; a stretch that
 * runs on is grown, not doubled. `earlier` are the stage's stretches as last shown, by number.
 */
export function workSegments(work: readonly Span[], earlier: readonly Span[], issuedAt: Minute): readonly Span[] {
  const told = work.filter((span) => span.end > span.start);
  const begun = work.length > told.length && told.length > 0;
  if (begun) {
    const seam = Math.min(issuedAt, told[0].start);
    return continueFrom(
      earlier.filter((span) => span.start < seam),
      told,
    );
  }
  const end = told.at(-1)?.end;
  return end !== undefined && end <= issuedAt ? finishedBy(end, told, earlier) : told;
}

/** A finished stage is one span from first touch to last in the plan, nights included; what was shown before says it better. */
function finishedBy(end: Minute, told: readonly Span[], earlier: readonly Span[]): readonly Span[] {
  const kept = earlier
    .filter((span) => span.start < end)
    .map((span) => ({ start: span.start, end: Math.min(span.end, end) }));
  return kept.length > 0 ? kept : told;
}

function continueFrom(done: readonly Span[], ahead: readonly Span[]): readonly Span[] {
  const last = done.at(-1);
  if (!last || last.end < ahead[0].start) {
    return [...done, ...ahead];
  }
  return [...done.slice(0, -1), { start: last.start, end: ahead[0].end }, ...ahead.slice(1)];
}
