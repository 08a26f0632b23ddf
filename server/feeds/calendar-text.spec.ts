import fc from 'fast-check';
import { calendarText } from './calendar-text';
import { EMPTY_HISTORY, withView } from './feed-history';
import { calendarFaults, readComponents, valueOf } from './testing/check-calendar';
import {
  ZONE,
  DRAGON,
  ANA,
  STUDIO,
  at,
  stage,
  placement,
  NAMES,
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
