import type { StageLink, StageView } from '@common/contract';
import { MILESTONE_NAMES, type MaterialMilestone } from '@common/domain/material';
import { formatMinutes } from '@common/time/format-instant';
import { sayHours } from '../../ui/say-time';

/** What a stage's ids are called. */
export interface StageNames {
  craftName(id: string): string;
  bayName(id: string): string;
  materialName(id: string): string;
  stageName(id: string, besidePieceId?: string | null): string;
}

/** "Laminating × 2–3, Casting": the crafts with how many makers of each. */
export function sayCrew(stage: Pick<StageView, 'crew'>, names: StageNames): string {
  return stage.crew
    .map(({ craftId, least, most }) => {
      const count = least === most ? (least === 1 ? '' : ` × ${least}`) : ` × ${least}–${most}`;
      return names.craftName(craftId) + count;
    })
    .join(', ');
}

/** "6 h (5 h – 9 h)": the likely hands-on hours between the low and the high. */
export function sayHandsOn({ handsOn }: Pick<StageView, 'handsOn'>): string {
  const { lowMinutes, likelyMinutes, highMinutes } = handsOn;
  if (highMinutes === 0) {
    return '';
  }
  return lowMinutes === highMinutes
    ? sayHours(likelyMinutes)
    : `${sayHours(likelyMinutes)} (${sayHours(lowMinutes)} – ${sayHours(highMinutes)})`;
}

/** "Polyester resin, ready to demould: 24 h; window 3 d": the dwell and its window. */
export function sayDwell({ dwell }: Pick<StageView, 'dwell'>, names: StageNames): string {
  if (dwell === null) {
    return '';
  }
  const milestone = dwell.milestone === null ? null : MILESTONE_NAMES[dwell.milestone as MaterialMilestone];
  const what = dwell.materialId === null ? 'dwell' : `${names.materialName(dwell.materialId)}, ${milestone ?? 'dwell'}`;
  const window = dwell.window === null ? '' : `; window ${formatMinutes(dwell.window.minutes)}`;
  return `${what}: ${formatMinutes(dwell.minutes)}${window}`;
}

/** "Long table or Bench 2": where a stage may be worked on. */
export function sayPlaces({ places }: Pick<StageView, 'places'>, names: StageNames): string {
  return places
    .map(({ bayIds, units }) => bayIds.map((id) => names.bayName(id)).join(' or ') + (units > 1 ? ` × ${units}` : ''))
    .join(', ');
}

/** "after Hull: carve; 2 h later": what a stage waits for. */
export function sayLink(link: StageLink, pieceId: string, names: StageNames): string {
  const from = names.stageName(link.fromStageId, pieceId);
  const words = {
    'finish-start': link.after === 'work' ? `after the work on ${from}` : `after ${from}`,
    'start-start': `once ${from} has begun`,
    'finish-finish': `ends after ${from} ends`,
    'start-finish': `ends after ${from} begins`,
  }[link.kind];
  const by = link.time === 'working' ? ' of working time' : '';
  const least = link.minGapMinutes === 0 ? '' : `, at least ${formatMinutes(link.minGapMinutes)}${by} later`;
  const most = link.maxGapMinutes === null ? '' : `, within ${formatMinutes(link.maxGapMinutes)}${by}`;
  return words + least + most;
}
