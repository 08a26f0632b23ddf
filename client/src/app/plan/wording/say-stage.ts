import type { Placement } from '@common/planning';
import { formatDayAndTime } from '@common/time/format-instant';
import type { StageFace } from '../timeline/engine/stage-face';
import { workEnd, workStart } from '../timeline/engine/tape';
import type { PlanNames } from './plan-names';

/** "Ines Amadi and Tom Varga". */
export function sayList(items: readonly string[]): string {
  if (items.length < 2) return items.join('');
  return `${items.slice(0, -1).join(', ')} and ${items[items.length - 1]}`;
}

/** How far a stage has come, in a word; empty where it waits to be done and nothing is odd about it. */
export function sayProgress(face: StageFace): string {
  if (face.progress === 'finished') return 'finished';
  if (face.progress === 'started') return face.paused ? 'paused' : 'started';
  if (face.pinned) return 'held here';
  return face.frozen ? 'issued' : '';
}

/** What a stage is besides hands-on work; empty for that. */
export function sayKind(kind: StageFace['kind']): string {
  return { make: '', 'sign-off': 'sign-off', check: 'check', transport: 'transport' }[kind];
}

/** What is written on a stage's tape: in a row of its own piece the piece need not be repeated. */
export function sayTapeName(face: StageFace, namedBy: 'stage' | 'piece-and-stage'): string {
  return namedBy === 'stage' ? face.name : `${face.pieceName}: ${face.name}`;
}

/**
 * A stage in one breath, for whoever can't see the wall: what, of what, when, by whom, where, until when it sets, and what is
 * odd about it. It begins with the words that are seen, so that who speaks to the page may say them (WCAG 2.2, 2.5.3).
 */
export function sayStage(
  face: StageFace,
  placement: Placement | undefined,
  names: PlanNames,
  { zone, namedBy }: { readonly zone: string; readonly namedBy: 'stage' | 'piece-and-stage' },
): string {
  const kind = face.kind === 'make' ? '' : ` (${sayKind(face.kind)})`;
  const piece = namedBy === 'stage' ? `, ${face.pieceName}` : '';
  const what = `${face.mark} ${sayTapeName(face, namedBy)}${kind}${piece}, ${face.productionName}`;
  const progress = sayProgress(face);
  const state = [face.tentative ? 'tentative' : '', progress].filter((word) => word !== '').join(', ');
  const parts = [what, ...(placement ? sayWhen(placement, names, zone) : ['not on the wall']), state];
  return `${parts.filter((part) => part !== '').join('; ')}.`;
}

function sayWhen(placement: Placement, names: PlanNames, zone: string): string[] {
  const start = workStart(placement);
  const end = workEnd(placement);
  const when = end > start ? `${sayAt(start, zone)} to ${sayAt(end, zone)}` : sayAt(start, zone);
  const crew = sayList([...new Set(placement.crew.map((member) => names.maker(member.makerId)))]);
  const bays = sayList(placement.bayIds.map(names.bay));
  const sets = placement.dwellEnd > end ? `sets until ${sayAt(placement.dwellEnd, zone)}` : '';
  return [when, crew, bays, sets];
}

function sayAt(at: number, zone: string): string {
  return formatDayAndTime(at, zone);
}
