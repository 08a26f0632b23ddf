import ICAL from 'ical.js';
import type { FeedScope } from '@common/contract/feeds';
import type { Placement } from '@common/planning/problem/plan';
import { instantOfLocal } from '@common/time/zone';
import { calendarText } from '../calendar-text';
import { EMPTY_HISTORY, type FeedHistory, withView } from '../feed-history';
import type { IssuedNames, IssuedStage, IssuedView } from '../issued-view';
import { type CalendarComponent, readComponents, valueOf } from './check-calendar';

export const ZONE = 'Europe/London';
export const DRAGON: FeedScope = { kind: 'production', productionId: 'dragon' };
export const ANA: FeedScope = { kind: 'maker', makerId: 'ana' };
export const STUDIO: FeedScope = { kind: 'studio' };

/** A reading of the wall clock in London as an instant. */
export function at(day: string, time: string, zone = ZONE): number {
  return instantOfLocal(Date.parse(`${day}T${time}Z`) / 60_000, zone);
}

export function stage(id: string, given: Partial<IssuedStage> = {}): IssuedStage {
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

export function placement(
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

export const NAMES: IssuedNames = {
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

export const ISSUED = at('2026-04-10', '17:00') * 60;

export function view(number: number, placements: readonly Placement[], given: Partial<IssuedView> = {}): IssuedView {
  return { number, atSeconds: ISSUED + (number - 1) * 86_400, plan: { placements }, names: NAMES, ...given };
}

export const CARVE = placement('carve', [
  [at('2026-04-13', '08:00'), at('2026-04-13', '12:00')],
  [at('2026-04-13', '12:30'), at('2026-04-13', '16:30')],
  [at('2026-04-14', '08:00'), at('2026-04-14', '10:00')],
]);
export const LAY_UP = placement('lay-up', [[at('2026-04-14', '13:00'), at('2026-04-14', '16:00')]], {
  crew: [
    { makerId: 'bo', craftId: 'laminating' },
    { makerId: 'ana', craftId: 'laminating' },
  ],
  bayIds: ['booth'],
  dwellEnd: at('2026-04-15', '09:10'),
});
export const APPROVE = placement('approve', [[at('2026-04-16', '09:00'), at('2026-04-16', '10:00')]], { crew: [] });
export const PAINT = placement('paint', [[at('2026-04-17', '09:00'), at('2026-04-17', '11:00')]], {
  crew: [{ makerId: 'bo', craftId: 'painting' }],
});
export const FIRST = view(1, [CARVE, LAY_UP, APPROVE, PAINT]);

export function shown(scope: FeedScope, ...views: readonly IssuedView[]): FeedHistory {
  return views.reduce((history, one) => withView(history, scope, one, ZONE, one.atSeconds), EMPTY_HISTORY);
}

export function textOf(scope: FeedScope, history: FeedHistory, zone = ZONE): string {
  return calendarText({ scope, name: 'Issued plan, Fettle', zone }, history);
}

export function eventsOf(text: string): readonly CalendarComponent[] {
  return readComponents(text).inside.filter((one) => one.name === 'VEVENT');
}

export function bySummary(text: string, start: string): CalendarComponent {
  const found = eventsOf(text).filter((event) => valueOf(event, 'SUMMARY').startsWith(start));
  if (found.length !== 1) throw new Error(`${found.length} entries begin with “${start}”`);
  return found[0];
}

/** Parsed by an independent library, with the calendar's own zone. */
export function parsed(
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
