import type { FeedScope } from '@common/contract/feeds';
import type { Placement } from '@common/planning/problem/plan';
import type { Minute, Span } from '@common/time/span';
import { formatDayAndTime } from '@common/time/format-instant';
import type { FeedEvent } from './feed-event';
import type { IssuedKeyDate, IssuedProduction, IssuedStage, IssuedView } from './issued-view';
import { workSegments } from './work-segments';

const KEY_DATE_WORDS: Readonly<Record<IssuedKeyDate['kind'], string>> = {
  'rehearsal-loan': 'rehearsal loan',
  delivery: 'delivery',
  'get-in': 'get-in',
  'fit-up': 'fit-up',
  'technical-rehearsal': 'technical rehearsal',
  'dress-rehearsal': 'dress rehearsal',
  opening: 'opening',
};

/** What earlier issues said of a stage's stretches of work, by number; empty where they said nothing. */
export type EarlierSegments = (stageId: string) => readonly Span[];

/**
 * The entries that one issued plan puts into the calendar of a scope. A maker sees their own work with its dwells; a production
 * its stages, decisions and key dates with nobody's name and no other production; the studio all of it.
 */
export function scopeEvents(
  scope: FeedScope,
  issue: IssuedView,
  zone: string,
  earlier: EarlierSegments,
): readonly FeedEvent[] {
  const desk = new Desk(issue, zone, earlier);
  switch (scope.kind) {
    case 'maker':
      return desk.placed
        .filter(({ placement }) => placement.crew.some((member) => member.makerId === scope.makerId))
        .flatMap((one) => [...desk.work(one, scope.makerId), ...desk.dwell(one)]);
    case 'production':
      return [
        ...desk.placed
          .filter(({ stage }) => stage.productionId === scope.productionId)
          .flatMap((one) => (one.stage.kind === 'sign-off' ? desk.signOff(one) : desk.whole(one))),
        ...desk.keyDates((date) => date.productionId === scope.productionId),
      ];
    case 'studio':
      return [
        ...desk.placed.flatMap((one) =>
          one.stage.kind === 'sign-off' ? desk.signOff(one) : [...desk.work(one, null), ...desk.dwell(one)],
        ),
        ...desk.keyDates(() => true),
      ];
  }
}

interface PlacedStage {
  readonly placement: Placement;
  readonly stage: IssuedStage;
  readonly production: IssuedProduction;
  readonly pieceName: string;
}

/** Reads one issue: its names by id, and how each kind of entry is told. */
class Desk {
  readonly placed: readonly PlacedStage[];
  private readonly productions: ReadonlyMap<string, IssuedProduction>;
  private readonly makers: ReadonlyMap<string, string>;
  private readonly bays: ReadonlyMap<string, string>;

  constructor(
    private readonly issue: IssuedView,
    private readonly zone: string,
    private readonly earlier: EarlierSegments,
  ) {
    const { names, plan } = issue;
    this.productions = new Map(names.productions.map((one) => [one.id, one]));
    this.makers = new Map(names.makers.map((one) => [one.id, one.name]));
    this.bays = new Map(names.bays.map((one) => [one.id, one.name]));
    const pieces = new Map(names.pieces.map((one) => [one.id, one.name]));
    const stages = new Map(names.stages.map((one) => [one.id, one]));
    this.placed = plan.placements.flatMap((placement) => {
      const stage = stages.get(placement.stageId);
      const production = stage && this.productions.get(stage.productionId);
      return production ? [{ placement, stage, production, pieceName: pieces.get(stage.pieceId) ?? '' }] : [];
    });
  }

  /** Each stretch of work; `readerId` is the maker who reads, or null where the whole crew is named. */
  work(one: PlacedStage, readerId: string | null): readonly FeedEvent[] {
    const { placement, stage, production } = one;
    const issuedAt = Math.floor(this.issue.atSeconds / 60);
    const location = placement.bayIds
      .map((id) => this.bays.get(id) ?? '')
      .filter(Boolean)
      .join(', ');
    const description = [production.name, this.crewLine(placement, readerId), ...stage.cautions]
      .filter(Boolean)
      .join('\n');
    return workSegments(placement.work, this.earlier(stage.id), issuedAt).map((span, index) => ({
      key: segmentKey(stage.id, index),
      start: span.start,
      end: span.end,
      summary: titleOf(one),
      location,
      description,
      category: 'work',
      busy: placement.crew.length > 0 ? 'opaque' : 'transparent',
      certainty: certaintyOf(production),
    }));
  }

  /** The dwell after a stage, which takes up nobody's time. */
  dwell(one: PlacedStage): readonly FeedEvent[] {
    const { placement, stage, production, pieceName } = one;
    const start = placement.work.at(-1)?.end;
    if (start === undefined || placement.dwellEnd <= start) {
      return [];
    }
    const what = [stage.materialName, stage.milestone?.replaceAll('-', ' ')].filter(Boolean).join(', ');
    return [
      {
        key: `dwell.${stage.id}`,
        start,
        end: placement.dwellEnd,
        summary: `${pieceName}: dwell after ${stage.name}${nthOf(stage)}`,
        location: placement.bayIds
          .map((id) => this.bays.get(id) ?? '')
          .filter(Boolean)
          .join(', '),
        description: [production.name, what, `Leave it alone until ${formatDayAndTime(placement.dwellEnd, this.zone)}.`]
          .filter(Boolean)
          .join('\n'),
        category: 'dwell',
        busy: 'transparent',
        certainty: certaintyOf(production),
      },
    ];
  }

  /** A stage from its first minute to its last, as a client sees it: no names, no bays. */
  whole(one: PlacedStage): readonly FeedEvent[] {
    const span = outline(one.placement);
    return span === null
      ? []
      : [{ ...clientSide(one, span), key: `stage.${one.stage.id}`, category: 'stage', busy: 'transparent' }];
  }

  /** A client's decision; a visit with hands-on time takes up the reader's time, an answer by message does not. */
  signOff(one: PlacedStage): readonly FeedEvent[] {
    const span = outline(one.placement);
    const visited = one.placement.crew.length > 0;
    return span === null
      ? []
      : [
          {
            ...clientSide(one, span),
            key: `sign-off.${one.stage.id}`,
            category: 'sign-off',
            busy: visited ? 'opaque' : 'transparent',
          },
        ];
  }

  keyDates(wanted: (date: IssuedKeyDate) => boolean): readonly FeedEvent[] {
    return this.issue.names.keyDates.filter(wanted).flatMap((date) => {
      const production = this.productions.get(date.productionId);
      return production ? [keyDateEvent(date, production)] : [];
    });
  }

  private crewLine(placement: Placement, readerId: string | null): string {
    const names = placement.crew
      .filter((member) => member.makerId !== readerId)
      .map((member) => this.makers.get(member.makerId) ?? '')
      .filter(Boolean);
    return names.length === 0 ? '' : `With ${[...new Set(names)].join(', ')}`;
  }
}

/** The key of a stretch of work, counted from 0. */
export function segmentKey(stageId: string, index: number): string {
  return `work.${stageId}.${index + 1}`;
}

function keyDateEvent(date: IssuedKeyDate, production: IssuedProduction): FeedEvent {
  return {
    key: `key-date.${date.id}`,
    start: date.at,
    end: null,
    summary: `${production.name}: ${KEY_DATE_WORDS[date.kind]}`,
    location: '',
    description: date.strength === 'hard' ? 'This date can not move.' : 'This date is wished for.',
    category: 'key date',
    busy: 'transparent',
    certainty: certaintyOf(production),
  };
}

function clientSide(
  one: PlacedStage,
  span: { readonly start: Minute; readonly end: Minute | null },
): Omit<FeedEvent, 'key' | 'category' | 'busy'> {
  return {
    ...span,
    summary: titleOf(one),
    location: '',
    description: one.production.name,
    certainty: certaintyOf(one.production),
  };
}

/** From first work to last; null where nothing is laid out, and no end where it takes no time. */
function outline(placement: Placement): { readonly start: Minute; readonly end: Minute | null } | null {
  const first = placement.work.at(0);
  const last = placement.work.at(-1);
  return first && last ? { start: first.start, end: last.end > first.start ? last.end : null } : null;
}

function titleOf({ pieceName, stage }: PlacedStage): string {
  return `${pieceName}: ${stage.name}${nthOf(stage)}`;
}

function nthOf({ nth, of }: IssuedStage): string {
  return nth === null || of === null ? '' : ` (${nth} of ${of})`;
}

function certaintyOf(production: IssuedProduction): FeedEvent['certainty'] {
  return production.state === 'tentative' ? 'tentative' : 'confirmed';
}
