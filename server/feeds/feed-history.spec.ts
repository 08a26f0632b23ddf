import fc from 'fast-check';
import { EMPTY_HISTORY, withView } from './feed-history';
import { calendarFaults, valueOf } from './testing/check-calendar';
import {
  ZONE,
  DRAGON,
  ANA,
  STUDIO,
  at,
  placement,
  NAMES,
  ISSUED,
  view,
  CARVE,
  LAY_UP,
  APPROVE,
  PAINT,
  FIRST,
  shown,
  textOf,
  eventsOf,
  bySummary,
  parsed,
} from './testing/issued-fixture';

describe('from issue to issue', () => {
  const uids = (text: string): readonly string[] => eventsOf(text).map((event) => valueOf(event, 'UID'));
  const sequences = (text: string): ReadonlyMap<string, string> =>
    new Map(eventsOf(text).map((event) => [valueOf(event, 'UID'), valueOf(event, 'SEQUENCE')]));

  it('changes nothing where nothing changed but the number', () => {
    const again = textOf(STUDIO, shown(STUDIO, FIRST, view(2, FIRST.plan.placements)));
    expect(again).toBe(textOf(STUDIO, shown(STUDIO, FIRST)));
  });

  it('raises the sequence of what moved, and only of that', () => {
    const moved = placement('lay-up', [[at('2026-04-15', '13:00'), at('2026-04-15', '16:00')]], {
      crew: LAY_UP.crew,
      bayIds: LAY_UP.bayIds,
      dwellEnd: at('2026-04-16', '09:10'),
    });
    const before = textOf(STUDIO, shown(STUDIO, FIRST));
    const after = textOf(STUDIO, shown(STUDIO, FIRST, view(2, [CARVE, moved, APPROVE, PAINT])));
    expect(uids(after)).toEqual(uids(before));
    const risen = [...sequences(after)].filter(([, sequence]) => sequence !== '0').map(([uid]) => uid);
    const layUp = [bySummary(after, 'Dragon’s head: Lay up'), bySummary(after, 'Dragon’s head: dwell after')];
    expect(risen.sort()).toEqual(layUp.map((event) => valueOf(event, 'UID')).sort());
    expect(layUp.map((event) => valueOf(event, 'SEQUENCE'))).toEqual(['1', '1']);
    expect(valueOf(layUp[0], 'DTSTAMP')).toBe('20260411T160000Z');
    expect(valueOf(layUp[0], 'LAST-MODIFIED')).toBe('20260411T160000Z');
    expect(valueOf(bySummary(after, 'Moon disc: Paint'), 'DTSTAMP')).toBe('20260410T160000Z');
  });

  it('calls off what an issue left out, for a while, and brings it back with a higher sequence', () => {
    const without = view(2, [CARVE, LAY_UP, APPROVE]);
    const cancelled = bySummary(textOf(STUDIO, shown(STUDIO, FIRST, without)), 'Moon disc: Paint');
    expect([valueOf(cancelled, 'STATUS'), valueOf(cancelled, 'SEQUENCE')]).toEqual(['CANCELLED', '1']);
    expect(valueOf(cancelled, 'TRANSP')).toBe('TRANSPARENT');

    const back = bySummary(
      textOf(STUDIO, shown(STUDIO, FIRST, without, view(3, FIRST.plan.placements))),
      'Moon disc: Paint',
    );
    expect([valueOf(back, 'STATUS'), valueOf(back, 'SEQUENCE')]).toEqual(['TENTATIVE', '2']);
    expect(valueOf(back, 'UID')).toBe(valueOf(cancelled, 'UID'));

    const later = { ...without, number: 3, atSeconds: ISSUED + 60 * 86_400, names: { ...NAMES, keyDates: [] } };
    expect(textOf(STUDIO, shown(STUDIO, FIRST, without, later))).not.toContain('Paint');
  });

  it('does not call off the past', () => {
    const later = view(2, [APPROVE, PAINT], { atSeconds: at('2026-04-16', '07:00') * 60 });
    const carve = eventsOf(textOf(ANA, shown(ANA, FIRST, later)));
    expect(carve.map((event) => [valueOf(event, 'STATUS'), valueOf(event, 'SEQUENCE')])).toEqual(
      Array(5).fill(['CONFIRMED', '0']),
    );
  });

  it('takes work off the calendar of a maker who is no longer in the crew', () => {
    const bo = { ...LAY_UP, crew: [{ makerId: 'bo', craftId: 'laminating' }] };
    const text = textOf(ANA, shown(ANA, FIRST, view(2, [CARVE, bo, APPROVE, PAINT])));
    expect(valueOf(bySummary(text, 'Dragon’s head: Lay up'), 'STATUS')).toBe('CANCELLED');
    expect(valueOf(bySummary(text, 'Dragon’s head: dwell after'), 'STATUS')).toBe('CANCELLED');
  });

  it('keeps each stretch of a stage under its own UID when the rest of it is laid out anew', () => {
    const start = CARVE.work[0].start;
    const rest = placement('carve', [
      [start, start],
      [at('2026-04-14', '08:00'), at('2026-04-14', '12:00')],
      [at('2026-04-15', '08:00'), at('2026-04-15', '09:00')],
    ]);
    const issued = { atSeconds: at('2026-04-13', '17:00') * 60 };
    const before = parsed(textOf(ANA, shown(ANA, view(1, [CARVE]))));
    const after = parsed(textOf(ANA, shown(ANA, view(1, [CARVE]), view(2, [rest], issued), view(3, [rest], issued))));
    const byStart = (a: { start: number }, b: { start: number }): number => a.start - b.start;
    expect([...after].sort(byStart).map((entry) => entry.start)).toEqual([
      at('2026-04-13', '08:00'),
      at('2026-04-13', '12:30'),
      at('2026-04-14', '08:00'),
      at('2026-04-15', '08:00'),
    ]);
    const uidAt = (entries: typeof after, instant: number): string | undefined =>
      entries.find((entry) => entry.start === instant)?.uid;
    for (const segment of CARVE.work) {
      expect(uidAt(after, segment.start)).toBe(uidAt(before, segment.start));
    }
  });

  it('tells a name or a key date that changed without an issue, dated when it was first seen', () => {
    const history = shown(DRAGON, FIRST);
    const keyDates = [{ ...NAMES.keyDates[0], at: at('2026-04-21', '10:00') }, NAMES.keyDates[1]];
    const now = ISSUED + 3600;
    const text = textOf(DRAGON, withView(history, DRAGON, { ...FIRST, names: { ...NAMES, keyDates } }, ZONE, now));
    const tech = bySummary(text, 'The Dragon: technical rehearsal');
    expect([valueOf(tech, 'SEQUENCE'), valueOf(tech, 'DTSTAMP')]).toEqual(['1', '20260410T170000Z']);
  });

  it('is the same object at a second look, whatever was issued', () => {
    const spans = fc
      .uniqueArray(fc.integer({ min: 0, max: 300 }), { minLength: 2, maxLength: 9 })
      .map((edges) => [...edges].sort((a, b) => a - b))
      .map((edges) =>
        Array.from({ length: Math.floor(edges.length / 2) }, (_, i) => [edges[2 * i], edges[2 * i + 1]] as const),
      );
    const issue = fc.record({ work: spans, begun: fc.boolean(), at: fc.integer({ min: 0, max: 350 }) });
    fc.assert(
      fc.property(fc.array(issue, { minLength: 1, maxLength: 6 }), (issues) => {
        let history = EMPTY_HISTORY;
        const highest = new Map<string, number>();
        issues.forEach(({ work, begun, at: minute }, index) => {
          const base = 29_000_000;
          const moved = work.map(([a, b]) => [base + a, base + b] as const);
          const told = begun ? [[moved[0][0], moved[0][0]] as const, ...moved] : moved;
          const one = view(index + 1, [placement('carve', told)], { atSeconds: (base + minute) * 60 });
          history = withView(history, ANA, one, ZONE, one.atSeconds);
          expect(withView(history, ANA, one, ZONE, one.atSeconds + 9)).toBe(history);
          for (const entry of history.entries) {
            expect(entry.sequence).toBeGreaterThanOrEqual(highest.get(entry.key) ?? 0);
            highest.set(entry.key, entry.sequence);
          }
          expect(calendarFaults(Buffer.from(textOf(ANA, history)))).toEqual([]);
        });
      }),
      { numRuns: 150 },
    );
  });
});
