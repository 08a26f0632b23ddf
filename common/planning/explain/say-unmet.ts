import type { Rule, Unmet } from '../problem/result';
import type { FormatInstant, Names } from './names';
import { list, sayMinutes } from './say-list';

/** A broken requirement as two sentences: what is wrong, and what would mend it. */
export function sayUnmet(unmet: Unmet, names: Names, _formatInstant: FormatInstant): string {
  const said: Said = {
    stages: list(unmet.stageIds.map(names.stage)),
    first: names.stage(unmet.stageIds[0] ?? ''),
    second: names.stage(unmet.stageIds[1] ?? unmet.stageIds[0] ?? ''),
    makers: list(unmet.makerIds.map(names.maker)),
    bays: unmet.bayIds.length > 0 ? list(unmet.bayIds.map(names.bay)) : 'the bay',
    crafts: unmet.craftIds.length > 0 ? list(unmet.craftIds.map(names.craft)) : 'the craft',
    keyDate: unmet.keyDateId === null ? 'the key date' : names.keyDate(unmet.keyDateId),
    by: sayMinutes(unmet.by),
    units: unmet.by,
  };
  return SENTENCES[unmet.rule](said);
}

interface Said {
  readonly stages: string;
  readonly first: string;
  readonly second: string;
  readonly makers: string;
  readonly bays: string;
  readonly crafts: string;
  readonly keyDate: string;
  readonly by: string;
  readonly units: number;
}

const SENTENCES: Readonly<Record<Rule, (said: Said) => string>> = {
  'placed-once': (s) =>
    `${s.stages} has no place in the plan. A longer horizon, another maker with the craft, or a longer shift would give it one.`,
  effort: (s) =>
    `${s.stages} is laid out with ${s.by} too much or too little work. Level again, or check its hours and crew.`,
  'crew-size': (s) =>
    `${s.stages} has ${s.units} too many or too few for ${s.crafts}. Change its crew, or how many it asks for.`,
  'crew-craft': (s) =>
    `${s.makers} on ${s.stages} does not hold ${s.crafts}. Choose another maker, or add the craft to this one.`,
  'crew-shift': (s) =>
    `${s.makers} is off shift for ${s.by} of ${s.stages}. Move the stage, choose another maker, or change the shift.`,
  continuity: (s) => `${s.stages} is left for ${s.by} where it should go on. Move it to a time that holds it whole.`,
  'maker-double-booked': (s) =>
    `${s.makers} is on ${s.stages} at once for ${s.by}. Unpin one of them, or give one to somebody else.`,
  'bay-choice': (s) =>
    `${s.stages} is in ${s.bays}, which is not among its bays. Choose one of its own, or add this one.`,
  'bay-open': (s) => `${s.stages} works for ${s.by} while ${s.bays} is closed. Move it, or open the bay longer.`,
  'bay-capacity': (s) =>
    `${s.stages} ask for ${s.units} more than ${s.bays} holds. Move one of them, or use another bay.`,
  dwell: (s) =>
    `The dwell after ${s.stages} is out by ${s.by}. Check the temperature where it stands, then level again.`,
  attended: (s) =>
    `Nobody stays on site for ${s.by} after ${s.stages}. Start it earlier in the shift, or extend somebody's.`,
  window: (s) =>
    `${s.second} starts ${s.by} after the window of ${s.first} has closed. Start ${s.first} later, or free a maker for ${s.second}.`,
  'link-min': (s) => `${s.second} comes ${s.by} too soon after ${s.first}. Move it later, or start ${s.first} earlier.`,
  'link-max': (s) =>
    `${s.second} comes ${s.by} too late after ${s.first}. Start ${s.first} later, or free what ${s.second} waits for.`,
  'link-cycle': (s) =>
    `${s.stages} wait for one another in a ring, ${s.by} too long. Take out one of the links, or loosen its gap.`,
  earliest: (s) => `${s.stages} starts ${s.by} before it can. Move it later, or bring forward what it waits for.`,
  latest: (s) => `${s.stages} ends ${s.by} after its latest end. Start it earlier, add hands, or allow a later end.`,
  fixed: (s) => `${s.stages} is ${s.by} away from the time that was agreed. Move it back, or agree another time.`,
  pin: (s) => `${s.stages} is not where it was pinned. Level again, or take the pin out.`,
  progress: (s) => `${s.stages} stands otherwise than it happened. Level again from what has been done.`,
  freeze: (s) => `${s.stages} was issued for inside the freeze and has been moved. Put it back, or shorten the freeze.`,
  limits: (s) => `${s.makers} works ${s.by} over a limit of hours or rest. Take overtime away, or share the work.`,
  horizon: (s) => `${s.stages} lies ${s.by} outside the planned time. Plan further ahead.`,
  'key-date': (s) =>
    `${s.keyDate} is missed by ${s.by}, because of ${s.stages}. Overtime, another pair of hands or a later date would meet it.`,
};
