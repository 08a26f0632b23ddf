import { FormArray, FormControl, FormGroup, Validators } from '@angular/forms';
import {
  type CrewWanted,
  Name,
  Note,
  type PlaceWanted,
  type StageDraft as StageDraftSchema,
  type StageView,
} from '@common/contract';
import type { z } from 'zod';
import { keeps } from '../../ui/field-errors';
import { fromDayAndTime, toDayAndTime } from '../../ui/say-time';

/** What is said of a stage, in the contract's shape. */
export type StageDraft = z.infer<typeof StageDraftSchema>;
type Crew = z.infer<typeof CrewWanted>;
type Place = z.infer<typeof PlaceWanted>;
type DwellSource = 'none' | 'material' | 'minutes';
type WindowKind = 'none' | 'soft' | 'hard';

const whole = (value: number, least: number, most: number): FormControl<number | null> =>
  new FormControl<number | null>(value, [Validators.required, Validators.min(least), Validators.max(most)]);
const minutes = (value: number): FormControl<number | null> =>
  new FormControl<number | null>(value, Validators.required);
const text = <T>(value: T): FormControl<T> => new FormControl<T>(value, { nonNullable: true });

/** A stage that nothing is said of yet. */
export const BLANK_STAGE: StageDraft = {
  name: '',
  kind: 'make',
  handsOn: { lowMinutes: 60, likelyMinutes: 120, highMinutes: 240 },
  crew: [],
  crewLossPermille: 0,
  continuity: 'shifts',
  places: [],
  dwell: null,
  cautions: [],
  note: '',
  visitAt: null,
  replyMinutes: 0,
};

/** One row: a craft, and how many makers of it at least and at most. */
export function crewRow(crew: Crew): FormGroup<{
  craftId: FormControl<string>;
  least: FormControl<number | null>;
  most: FormControl<number | null>;
}> {
  return new FormGroup({
    craftId: new FormControl(crew.craftId, { nonNullable: true, validators: Validators.required }),
    least: whole(crew.least, 1, 12),
    most: whole(crew.most, 1, 12),
  });
}

/** One row: the bays any of which will do, and how long it is kept. */
export function placeRow(place: Place): FormGroup<{
  bayIds: FormControl<string[]>;
  units: FormControl<number | null>;
  hold: FormControl<Place['hold']>;
  untilStageId: FormControl<string | null>;
}> {
  return new FormGroup({
    bayIds: new FormControl([...place.bayIds], { nonNullable: true, validators: Validators.required }),
    units: whole(place.units, 1, 50),
    hold: text(place.hold),
    untilStageId: new FormControl(place.untilStageId),
  });
}

/** The form of a stage, filled in from what is known of it. Instants stand as day and clock reading in the studio's zone. */
export function stageForm(stage: StageDraft, zone: string) {
  const visit = stage.visitAt === null ? { day: '', time: '10:00' } : toDayAndTime(stage.visitAt, zone);
  const { dwell } = stage;
  const source: DwellSource = dwell === null ? 'none' : dwell.materialId === null ? 'minutes' : 'material';
  return new FormGroup({
    name: new FormControl(stage.name, { nonNullable: true, validators: [Validators.required, keeps(Name)] }),
    kind: text(stage.kind),
    low: minutes(stage.handsOn.lowMinutes),
    likely: minutes(stage.handsOn.likelyMinutes),
    high: minutes(stage.handsOn.highMinutes),
    crew: new FormArray(stage.crew.map(crewRow)),
    crewLossPermille: whole(stage.crewLossPermille, 0, 500),
    continuity: text(stage.continuity),
    places: new FormArray(stage.places.map(placeRow)),
    dwellSource: text(source),
    materialId: text(dwell?.materialId ?? ''),
    milestone: text(dwell?.milestone ?? ''),
    dwellMinutes: minutes(dwell?.minutes ?? 0),
    attendedMinutes: minutes(dwell?.attendedMinutes ?? 0),
    windowKind: text<WindowKind>(dwell?.window?.kind ?? 'none'),
    windowMinutes: minutes(dwell?.window?.minutes ?? 0),
    windowExtraMinutes: minutes(dwell?.window?.extraMinutes ?? 0),
    windowCostMinor: minutes(dwell?.window?.costMinor ?? 0),
    cautions: text(stage.cautions.join('\n')),
    note: new FormControl(stage.note, { nonNullable: true, validators: keeps(Note) }),
    visitDay: text(visit.day),
    visitTime: text(visit.time),
    replyMinutes: minutes(stage.replyMinutes),
  });
}

/** The form of a stage. */
export type StageForm = ReturnType<typeof stageForm>;
/** The rows of a stage's crew. */
export type CrewRows = FormArray<ReturnType<typeof crewRow>>;
/** The rows of a stage's places. */
export type PlaceRows = FormArray<ReturnType<typeof placeRow>>;

/** What the form says of the stage. A figure left empty counts as none; the form's own rules ask for it before. */
export function stageDraftOf(form: StageForm, zone: string): StageDraft {
  const raw = form.getRawValue();
  return {
    name: raw.name.trim(),
    kind: raw.kind,
    handsOn: { lowMinutes: raw.low ?? 0, likelyMinutes: raw.likely ?? 0, highMinutes: raw.high ?? 0 },
    crew: raw.crew.map(({ craftId, least, most }) => ({ craftId, least: least ?? 1, most: most ?? 1 })),
    crewLossPermille: raw.crewLossPermille ?? 0,
    continuity: raw.continuity,
    places: raw.places.map(({ bayIds, units, hold, untilStageId }) => ({
      bayIds,
      units: units ?? 1,
      hold,
      untilStageId: hold === 'until-stage' ? untilStageId : null,
    })),
    dwell: dwellOf(raw),
    cautions: raw.cautions
      .split('\n')
      .map((line) => line.trim())
      .filter((line) => line !== ''),
    note: raw.note,
    visitAt: raw.kind === 'sign-off' && raw.visitDay ? fromDayAndTime(raw.visitDay, raw.visitTime, zone) : null,
    replyMinutes: raw.kind === 'sign-off' ? (raw.replyMinutes ?? 0) : 0,
  };
}

function dwellOf(raw: ReturnType<StageForm['getRawValue']>): StageDraft['dwell'] {
  if (raw.dwellSource === 'none') {
    return null;
  }
  const ofMaterial = raw.dwellSource === 'material';
  return {
    materialId: ofMaterial ? raw.materialId || null : null,
    milestone: ofMaterial ? raw.milestone || null : null,
    minutes: raw.dwellMinutes ?? 0,
    attendedMinutes: raw.attendedMinutes ?? 0,
    window:
      raw.windowKind === 'none'
        ? null
        : {
            kind: raw.windowKind,
            minutes: raw.windowMinutes ?? 0,
            extraMinutes: raw.windowExtraMinutes ?? 0,
            costMinor: raw.windowCostMinor ?? 0,
          },
  };
}

const CONTROL_OF: Readonly<Record<string, string>> = {
  '/handsOn/lowMinutes': 'low',
  '/handsOn/likelyMinutes': 'likely',
  '/handsOn/highMinutes': 'high',
  '/handsOn': 'likely',
  '/dwell/materialId': 'materialId',
  '/dwell/milestone': 'milestone',
  '/dwell/minutes': 'dwellMinutes',
  '/dwell/attendedMinutes': 'attendedMinutes',
  '/dwell/window/minutes': 'windowMinutes',
  '/dwell/window/extraMinutes': 'windowExtraMinutes',
  '/dwell/window/costMinor': 'windowCostMinor',
  '/visitAt': 'visitDay',
};

/** Where in the form a fault of the draft belongs. */
export function stageControlPath(path: readonly string[]): readonly string[] {
  const control = CONTROL_OF[`/${path.join('/')}`];
  return control === undefined ? (path[0] === 'cautions' ? ['cautions'] : path) : [control];
}

/** How far a stage has come decides what may still be changed; only what is not begun may be removed. */
export function isUntouched(stage: Pick<StageView, 'state' | 'spentMinutes'>): boolean {
  return stage.state === 'to-do' && stage.spentMinutes === 0;
}
