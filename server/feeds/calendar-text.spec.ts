import fc from 'fast-check';
import ICAL from 'ical.js';
import type { FeedScope } from '@common/contract/feeds';
import type { Placement } from '@common/planning/problem/plan';
import { instantOfLocal } from '@common/time/zone';
import { calendarText } from './calendar-text';
import { calendarFaults, readComponents, valueOf, type CalendarComponent } from './testing/check-calendar';
import { EMPTY_HISTORY, type FeedHistory, withView } from './feed-history';
import type { IssuedNames, IssuedStage, IssuedView } from './issued-view';

const ZONE = 'Europe/London';
const DRAGON: FeedScope = { kind: 'production', productionId: 'dragon' };
const ANA: FeedScope = { kind: 'maker', makerId: 'ana' };
const STUDIO: FeedScope = { kind: 'studio' };

/** A reading of the wall clock in London as an instant. */
function at(day: string, time: string, zone = ZONE): number {
  return instantOfLocal(Date.parse(`${day}T${time}Z`) / 60_000, zone);
}

function stage(id: string, given: Partial<IssuedStage> = {}): IssuedStage {
  return {
    id,
    pieceId: 'head',
    productionId: 'dragon',
    name: id,
    kind: 'make',
    nth: null,
    of: null,
    materialName: null,
    milestone: null,
    cautions: [],
    ...given,
  };
}

function placement(
  stageId: string,
  work: readonly (readonly [number, number])[],
  given: Partial<Placement> = {},
): Placement {
  const spans = work.map(([start, end]) => ({ start, end }));
  return {
    stageId,
    work: spans,
    crew: [{ makerId: 'ana', craftId: 'laminating' }],
    bayIds: [],
    dwellEnd: spans[spans.length - 1].end,
    ...given,
  };
}

const NAMES: IssuedNames = {
  productions: [
    { id: 'dragon', name: 'The Dragon', mark: 'DR', state: 'committed' },
    { id: 'moon', name: 'Moon; a play, in \\ two parts', mark: 'MO', state: 'tentative' },
  ],
  pieces: [
    { id: 'head', name: 'Dragon’s head' },
    { id: 'disc', name: 'Moon disc' },
  ],
  stages: [
    stage('carve', { name: 'Carve' }),
    stage('lay-up', {
      name: 'Lay up',
      nth: 3,
      of: 8,
      materialName: 'Polyester laminating',
      milestone: 'demould',
      cautions: ['Wear a mask; vapour, dust', 'No naked flame'],
    }),
    stage('approve', { name: 'Approve the shape', kind: 'sign-off' }),
    stage('paint', { name: 'Paint', pieceId: 'disc', productionId: 'moon' }),
  ],
  makers: [
    { id: 'ana', name: 'Ana' },
    { id: 'bo', name: 'Bo' },
  ],
  bays: [{ id: 'booth', name: 'Booth, east' }],
  keyDates: [
    {
      id: 'tech',
      productionId: 'dragon',
      kind: 'technical-rehearsal',
      at: at('2026-04-20', '10:00'),
      strength: 'hard',
    },
    { id: 'open', productionId: 'moon', kind: 'opening', at: at('2026-05-01', '19:30'), strength: 'wished' },
  ],
};

const ISSUED = at('2026-04-10', '17:00') * 60;

function view(number: number, placements: readonly Placement[], given: Partial<IssuedView> = {}): IssuedView {
  return { number, atSeconds: ISSUED + (number - 1) * 86_400, plan: { placements }, names: NAMES, ...given };
}

const CARVE = placement('carve', [
  [at('2026-04-13', '08:00'), at('2026-04-13', '12:00')],
  [at('2026-04-13', '12:30'), at('2026-04-13', '16:30')],
  [at('2026-04-14', '08:00'), at('2026-04-14', '10:00')],
]);
const LAY_UP = placement('lay-up', [[at('2026-04-14', '13:00'), at('2026-04-14', '16:00')]], {
  crew: [
    { makerId: 'bo', craftId: 'laminating' },
    { makerId: 'ana', craftId: 'laminating' },
  ],
  bayIds: ['booth'],
  dwellEnd: at('2026-04-15', '09:10'),
});
const APPROVE = placement('approve', [[at('2026-04-16', '09:00'), at('2026-04-16', '10:00')]], { crew: [] });
const PAINT = placement('paint', [[at('2026-04-17', '09:00'), at('2026-04-17', '11:00')]], {
  crew: [{ makerId: 'bo', craftId: 'painting' }],
});
const FIRST = view(1, [CARVE, LAY_UP, APPROVE, PAINT]);

function shown(scope: FeedScope, ...views: readonly IssuedView[]): FeedHistory {
  return views.reduce((history, one) => withView(history, scope, one, ZONE, one.atSeconds), EMPTY_HISTORY);
}

function textOf(scope: FeedScope, history: FeedHistory, zone = ZONE): string {
  return calendarText({ scope, name: 'Issued plan, Fettle', zone }, history);
}

function eventsOf(text: string): readonly CalendarComponent[] {
  return readComponents(text).inside.filter((one) => one.name === 'VEVENT');
}

function bySummary(text: string, start: string): CalendarComponent {
  const found = eventsOf(text).filter((event) => valueOf(event, 'SUMMARY').startsWith(start));
  if (found.length !== 1) throw new Error(`${found.length} entries begin with “${start}”`);
  return found[0];
}

/** Parsed by an independent library, with the calendar's own zone. */
function parsed(
  text: string,
): readonly { readonly uid: string; readonly start: number; readonly end: number; readonly summary: string }[] {
  const calendar = new ICAL.Component(ICAL.parse(text) as unknown[]);
  return calendar.getAllSubcomponents('vevent').map((component) => {
    const event = new ICAL.Event(component);
    return {
      uid: event.uid,
      start: event.startDate.toUnixTime() / 60,
      end: event.endDate.toUnixTime() / 60,
      summary: event.summary,
    };
  });
}

describe('calendarText', () => {
  it.each([
    ['a maker', ANA],
    ['a production', DRAGON],
    ['the studio', STUDIO],
  ] as const)('keeps the rules of RFC 5545 for %s', (_, scope) => {
    // Source: RFC 5545 sections 3.1, 3.3, 3.6, 3.8 and RFC 7986 section 5, as told in testing/check-calendar.ts.
    expect(calendarFaults(Buffer.from(textOf(scope, shown(scope, FIRST))))).toEqual([]);
  });

  it('keeps them before the first issue, with nothing planned', () => {
    const empty = view(0, [], { atSeconds: 0, names: { ...NAMES, keyDates: [] } });
    const text = textOf(STUDIO, shown(STUDIO, empty));
    expect(calendarFaults(Buffer.from(text))).toEqual([]);
    expect(eventsOf(text)).toEqual([]);
  });

  it('gives an independent parser the instants and the words that went in', () => {
    const entries = parsed(textOf(STUDIO, shown(STUDIO, FIRST)));
    expect(entries).toContainEqual(
      expect.objectContaining({
        summary: 'Dragon’s head: Lay up (3 of 8)',
        start: at('2026-04-14', '13:00'),
        end: at('2026-04-14', '16:00'),
      }),
    );
    expect(entries).toContainEqual(
      expect.objectContaining({
        summary: 'Moon; a play, in \\ two parts: opening',
        start: at('2026-05-01', '19:30'),
      }),
    );
    expect(entries).toHaveLength(9);
  });

  it('is the same bytes whenever it is written, whatever the order of the plan', () => {
    const shuffled = view(1, [PAINT, APPROVE, LAY_UP, CARVE]);
    expect(textOf(STUDIO, shown(STUDIO, shuffled))).toBe(textOf(STUDIO, shown(STUDIO, FIRST)));
  });

  it('folds long lines without splitting a character, for any words', () => {
    const word = fc.string({ unit: 'binary', maxLength: 200 });
    fc.assert(
      fc.property(word, word, (name, caution) => {
        const names = { ...NAMES, stages: [stage('carve', { name, cautions: [caution] })] };
        const history = shown(ANA, view(1, [CARVE], { names }));
        const text = calendarText({ scope: ANA, name, zone: ZONE }, history);
        expect(calendarFaults(Buffer.from(text))).toEqual([]);
        const tidy = `Dragon’s head: ${name}`
          .replace(/\r\n?/g, '\n')
          .replace(/\p{Surrogate}/gu, '\uFFFD')
          // eslint-disable-next-line no-control-regex -- what TEXT may not hold (RFC 5545 section 3.3.11)
          .replace(/[\u0000-\u0008\u000B-\u001F\u007F]/g, '');
        expect(parsed(text)[0].summary).toBe(tidy);
      }),
      { numRuns: 100 },
    );
  });

  it('asks to be looked at again every hour and names itself in both spellings', () => {
    const calendar = readComponents(textOf(ANA, shown(ANA, FIRST)));
    expect(valueOf(calendar, 'REFRESH-INTERVAL')).toBe('PT1H');
    expect(valueOf(calendar, 'X-PUBLISHED-TTL')).toBe('PT1H');
    expect(valueOf(calendar, 'NAME')).toBe('Issued plan\\, Fettle');
    expect(valueOf(calendar, 'X-WR-CALNAME')).toBe('Issued plan\\, Fettle');
  });

  it('takes up time for work and none for dwells and key dates', () => {
    const text = textOf(STUDIO, shown(STUDIO, FIRST));
    expect(valueOf(bySummary(text, 'Dragon’s head: Lay up'), 'TRANSP')).toBe('OPAQUE');
    expect(valueOf(bySummary(text, 'Dragon’s head: dwell after'), 'TRANSP')).toBe('TRANSPARENT');
    expect(valueOf(bySummary(text, 'The Dragon: technical rehearsal'), 'TRANSP')).toBe('TRANSPARENT');
    expect(valueOf(bySummary(text, 'The Dragon: technical rehearsal'), 'DTEND')).toBe('');
  });

  it('is tentative where the production is', () => {
    const text = textOf(STUDIO, shown(STUDIO, FIRST));
    expect(valueOf(bySummary(text, 'Moon disc: Paint'), 'STATUS')).toBe('TENTATIVE');
    expect(valueOf(bySummary(text, 'Dragon’s head: Lay up'), 'STATUS')).toBe('CONFIRMED');
  });
});

describe('what a calendar may show', () => {
  it('shows a maker their own work, the crew beside them and the cautions, and nobody else’s work', () => {
    const text = textOf(ANA, shown(ANA, FIRST));
    const layUp = bySummary(text, 'Dragon’s head: Lay up');
    expect(valueOf(layUp, 'DESCRIPTION')).toBe('The Dragon\\nWith Bo\\nWear a mask\\; vapour\\, dust\\nNo naked flame');
    expect(valueOf(layUp, 'LOCATION')).toBe('Booth\\, east');
    expect(eventsOf(text)).toHaveLength(5);
    expect(text).not.toContain('Paint');
  });

  it('shows a production no maker, no bay and no other production', () => {
    const text = textOf(DRAGON, shown(DRAGON, FIRST));
    expect(
      eventsOf(text)
        .map((event) => valueOf(event, 'SUMMARY'))
        .sort(),
    ).toEqual([
      'Dragon’s head: Approve the shape',
      'Dragon’s head: Carve',
      'Dragon’s head: Lay up (3 of 8)',
      'The Dragon: technical rehearsal',
    ]);
    for (const secret of ['Ana', 'Bo', 'Booth', 'Moon', 'mask', 'Polyester']) {
      expect(text).not.toMatch(new RegExp(`\\b${secret}\\b`));
    }
  });

  it('shows a production each stage once, from its first minute to its last', () => {
    const carve = bySummary(textOf(DRAGON, shown(DRAGON, FIRST)), 'Dragon’s head: Carve');
    expect(valueOf(carve, 'DTSTART')).toBe('20260413T080000');
    expect(valueOf(carve, 'DTEND')).toBe('20260414T100000');
  });
});

describe('changes of clocks', () => {
  // Source: the rule of Directive 2000/84/EC (last Sundays of March and October at 01:00 UTC) and 15 U.S.C. 260a (second Sunday of March, first of November).
  it.each([
    ['Europe/London', '2026-03-28', '20:00', '2026-03-29', '09:00', '2026-03-28T20:00Z', '2026-03-29T08:00Z'],
    ['Europe/London', '2026-10-24', '20:00', '2026-10-25', '09:00', '2026-10-24T19:00Z', '2026-10-25T09:00Z'],
    ['Europe/Rome', '2026-03-28', '20:00', '2026-03-29', '09:00', '2026-03-28T19:00Z', '2026-03-29T07:00Z'],
    ['America/New_York', '2026-03-07', '20:00', '2026-03-08', '09:00', '2026-03-08T01:00Z', '2026-03-08T13:00Z'],
    ['America/New_York', '2026-10-31', '20:00', '2026-11-01', '09:00', '2026-11-01T00:00Z', '2026-11-01T14:00Z'],
    ['Australia/Sydney', '2026-10-03', '20:00', '2026-10-04', '09:00', '2026-10-03T10:00Z', '2026-10-03T22:00Z'],
    ['Asia/Tokyo', '2026-03-28', '20:00', '2026-03-29', '09:00', '2026-03-28T11:00Z', '2026-03-29T00:00Z'],
  ])('reads right in %s over the night of %s', (zone, day, time, nextDay, nextTime, start, end) => {
    const night = placement('carve', [[at(day, time, zone), at(nextDay, nextTime, zone)]]);
    const text = textOf(
      ANA,
      withView(EMPTY_HISTORY, ANA, view(1, [night], { atSeconds: 1_767_225_600 }), zone, 0),
      zone,
    );
    expect(calendarFaults(Buffer.from(text))).toEqual([]);
    const [entry] = parsed(text);
    expect([entry.start, entry.end]).toEqual([Date.parse(start) / 60_000, Date.parse(end) / 60_000]);
    expect(text).toContain(`TZID=${zone}:${day.replaceAll('-', '')}T${time.replace(':', '')}00`);
  });

  it('writes UTC where the table of zones has no component or another rule than this machine', () => {
    for (const zone of ['UTC', 'Asia/Qostanay', 'Africa/Casablanca']) {
      const day = '2026-03-01'; // in Ramadan, when Morocco's clocks go back and the table's do not
      const night = placement('carve', [[at(day, '08:00', zone), at(day, '16:00', zone)]]);
      const text = textOf(
        ANA,
        withView(EMPTY_HISTORY, ANA, view(1, [night], { atSeconds: 1_767_225_600 }), zone, 0),
        zone,
      );
      expect(calendarFaults(Buffer.from(text))).toEqual([]);
      expect(text).not.toContain('TZID');
      expect(parsed(text)[0].start).toBe(at(day, '08:00', zone));
    }
  });

  it('gives every zone that this machine knows the right instants, by its own component or in UTC', () => {
    const times = ['2026-01-15', '2026-04-02', '2026-07-15', '2026-10-29'].map(
      (day) => Date.parse(`${day}T08:00Z`) / 60_000,
    );
    const work = placement(
      'carve',
      times.map((start) => [start, start + 60] as const),
    );
    for (const zone of Intl.supportedValuesOf('timeZone')) {
      const text = textOf(
        ANA,
        withView(EMPTY_HISTORY, ANA, view(1, [work], { atSeconds: 1_767_225_600 }), zone, 0),
        zone,
      );
      expect([
        zone,
        ...parsed(text)
          .map((entry) => entry.start)
          .sort((a, b) => a - b),
      ]).toEqual([zone, ...times]);
    }
  });
});

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
