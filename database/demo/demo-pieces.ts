import { expandRecipe } from '@common/domain/expand-recipe';
import { cautionsForHazard } from '@common/domain/safety';
import { PLAIN_LINK, type PlaceWanted, type StageDraft } from '@common/domain/stage-draft';
import type { DemoCalendar } from './demo-calendar';
import { type PlannedStage, withHistory } from './demo-history';
import type { PiecePlan, ProductionPlan } from './demo-productions';
import type { DemoBay, DemoLink, DemoMaker, DemoPiece, DemoPurchase, DemoStage } from './demo-studio-types';

/** Everything that comes with pieces. */
export interface PieceParts {
  readonly pieces: readonly DemoPiece[];
  readonly stages: readonly DemoStage[];
  readonly links: readonly DemoLink[];
  readonly moulds: readonly DemoBay[];
  readonly purchases: readonly DemoPurchase[];
}

/** What pieces are built against. */
export interface PieceSurroundings {
  readonly calendar: DemoCalendar;
  readonly makers: readonly DemoMaker[];
}

const MS_PER_MINUTE = 60_000;

/** The pieces of a production, laid out by their recipes, and their journey to the venue once all are done. */
export function productionPieces(plan: ProductionPlan, around: PieceSurroundings): PieceParts {
  const made = plan.pieces.map((piece, position) => pieceParts(plan, piece, position, around));
  return joinParts([...made, journey(plan, made, around)]);
}

/** Puts the parts of several pieces or productions together. */
export function joinParts(parts: readonly PieceParts[]): PieceParts {
  return {
    pieces: parts.flatMap((part) => part.pieces),
    stages: parts.flatMap((part) => part.stages),
    links: parts.flatMap((part) => part.links),
    moulds: parts.flatMap((part) => part.moulds),
    purchases: parts.flatMap((part) => part.purchases),
  };
}

/** Key of a piece among the demo's ids. */
export function pieceId(production: string, piece: string): string {
  return `piece:${production}/${piece}`;
}

function pieceParts(plan: ProductionPlan, piece: PiecePlan, position: number, around: PieceSurroundings): PieceParts {
  const id = pieceId(plan.key, piece.key);
  const expanded = expandRecipe(piece.recipe, piece.amounts);
  const stageIds = expanded.stages.map(({ step, nth }) => stageId(plan, piece, piece.recipe.stepKeys[step], nth));
  const moulds = Array.from({ length: expanded.moulds }, (_, i) => mouldOf(plan, piece, i, expanded.moulds));
  const stages = expanded.stages.map(({ draft, nth, of, mould, untilStage }, i): PlannedStage => {
    const untilStageId = untilStage === null ? null : stageIds[untilStage];
    const places = mould === null ? draft.places : [mouldPlace(moulds[mould].id, untilStageId), ...draft.places];
    const visitAt = draft.kind === 'sign-off' ? visitOf(piece, around.calendar) : null;
    return { ...draft, id: stageIds[i], pieceId: id, position: i, nth, of, places, visitAt };
  });
  const progress = { finished: piece.finished ?? 0, startedLeft: piece.startedLeft ?? null };
  return {
    pieces: [
      {
        id,
        productionId: `production:${plan.key}`,
        name: piece.name,
        position,
        recipeId: piece.recipe.id,
        note: piece.note ?? '',
      },
    ],
    stages: withHistory(stages, progress, around.calendar, around.makers),
    links: expanded.links.map(({ from, to }) => ({
      fromStageId: stageIds[from],
      toStageId: stageIds[to],
      ...PLAIN_LINK,
    })),
    moulds,
    purchases: (piece.purchases ?? []).map((purchase, i) => purchaseOf(plan, piece, i, around.calendar)(purchase)),
  };
}

function stageId(plan: ProductionPlan, piece: PiecePlan, step: string, nth: number | null): string {
  return `stage:${plan.key}/${piece.key}/${step}${nth === null ? '' : `-${nth}`}`;
}

function mouldOf(plan: ProductionPlan, piece: PiecePlan, index: number, count: number): DemoBay {
  return {
    id: `bay:${plan.key}/${piece.key}/mould-${index + 1}`,
    name: count === 1 ? `${piece.name} mould` : `${piece.name} mould ${index + 1}`,
    kind: 'mould',
    capacity: 1,
    pieceId: pieceId(plan.key, piece.key),
    temperatureCelsius: null,
    humidityPercent: null,
    size: null,
    openings: [],
    note: '',
  };
}

function mouldPlace(mouldId: string, untilStageId: string | null): PlaceWanted {
  return { bayIds: [mouldId], units: 1, hold: untilStageId === null ? 'dwell' : 'until-stage', untilStageId };
}

function visitOf({ visit }: PiecePlan, calendar: DemoCalendar): string | null {
  return visit ? new Date(calendar.at(visit.workday, visit.time) * MS_PER_MINUTE).toISOString() : null;
}

function purchaseOf(plan: ProductionPlan, piece: PiecePlan, index: number, { workday }: DemoCalendar) {
  const day = (count: number | undefined) => (count === undefined ? null : workday(count));
  return ({
    step,
    ordered,
    due,
    received,
    ...purchase
  }: NonNullable<PiecePlan['purchases']>[number]): DemoPurchase => ({
    ...purchase,
    id: `purchase:${plan.key}/${piece.key}/${index + 1}`,
    productionId: `production:${plan.key}`,
    stageId: stageId(plan, piece, step, null),
    orderedOn: day(ordered),
    dueOn: day(due),
    receivedOn: day(received),
  });
}

/** Crating waits for the last stage of every piece; the van waits for the crates. */
function journey(plan: ProductionPlan, made: readonly PieceParts[], around: PieceSurroundings): PieceParts {
  const id = pieceId(plan.key, 'journey');
  const [crate, drive] = JOURNEY.map((draft, position): PlannedStage => {
    return { ...draft, id: `stage:${plan.key}/journey/${position + 1}`, pieceId: id, position, nth: null, of: null };
  });
  const toCrate = made.flatMap(lastStageIds).map((from) => ({ fromStageId: from, toStageId: crate.id, ...PLAIN_LINK }));
  return {
    pieces: [
      {
        id,
        productionId: `production:${plan.key}`,
        name: 'Crates and van',
        position: made.length,
        recipeId: null,
        note: '',
      },
    ],
    stages: withHistory([crate, drive], { finished: 0, startedLeft: null }, around.calendar, around.makers),
    links: [...toCrate, { fromStageId: crate.id, toStageId: drive.id, ...PLAIN_LINK }],
    moulds: [],
    purchases: [],
  };
}

function lastStageIds({ stages, links }: PieceParts): readonly string[] {
  const waitedFor = new Set(links.map((link) => link.fromStageId));
  return stages.filter((stage) => !waitedFor.has(stage.id)).map((stage) => stage.id);
}

const TRAVEL = {
  crewLossPermille: 50,
  dwell: null,
  places: [],
  visitAt: null,
  replyMinutes: 0,
  note: '',
  cautions: cautionsForHazard('lifting'),
} as const;

const JOURNEY: readonly StageDraft[] = [
  {
    ...TRAVEL,
    name: 'Crate and label',
    kind: 'make',
    handsOn: { lowMinutes: 180, likelyMinutes: 240, highMinutes: 420 },
    crew: [{ craftId: 'craft:woodwork', least: 1, most: 2 }],
    continuity: 'shifts',
  },
  {
    ...TRAVEL,
    name: 'Load, drive and unload',
    kind: 'transport',
    handsOn: { lowMinutes: 180, likelyMinutes: 240, highMinutes: 360 },
    crew: [{ craftId: 'craft:transport', least: 1, most: 1 }],
    continuity: 'session',
  },
];
