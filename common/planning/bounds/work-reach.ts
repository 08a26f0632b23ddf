import type { Minute } from '../../time/span';
import type { CrewNeed, Problem, Stage } from '../problem/problem';
import type { PossibleHours } from './availability';

/** How long the work of a stage takes at least, and between which instants, whoever does it. All parts are monotone. */
export interface WorkReach {
  /** Least hands-on (or machine) minutes, with the quickest crew there could be. */
  readonly minutes: number;
  /** Whether the work takes exactly these minutes by the clock in every plan, so that its start gives its end. */
  readonly isExact: boolean;
  /** The earliest start from an instant on. */
  readonly begin: (from: Minute) => Minute;
  /** The earliest end of work for a start at `from` or later. */
  readonly reach: (from: Minute) => Minute;
  /** The latest start for work that ends by `to`. */
  readonly retreat: (to: Minute) => Minute;
}

/** The reach of a stage's work that has yet to be done. */
export function workReach(problem: Problem, stage: Stage, possible: PossibleHours): WorkReach {
  const minutes = leastWorkMinutes(problem, stage);
  const measure = stage.continuity === 'clock' ? null : possible.of(stage.crew, stage.places);
  const isFixed = stage.effort.kind === 'duration';
  if (measure === null || minutes === 0) {
    const isExact = isFixed && (stage.continuity === 'clock' || stage.continuity === 'session' || minutes === 0);
    return { minutes, isExact, begin: (from) => from, reach: (from) => from + minutes, retreat: (to) => to - minutes };
  }
  if (stage.continuity === 'session')
    return {
      minutes,
      isExact: isFixed,
      begin: (from) => measure.unbrokenFrom(from, minutes),
      reach: (from) => measure.unbrokenFrom(from, minutes) + minutes,
      retreat: (to) => measure.unbrokenBefore(to, minutes),
    };
  return {
    minutes,
    isExact: false,
    begin: (from) => measure.unbrokenFrom(from, 1),
    reach: (from) => measure.reach(from, minutes),
    retreat: (to) => measure.retreat(to, minutes),
  };
}

/** The least minutes that a stage's remaining work can take: its effort with the strongest crew it may have. */
export function leastWorkMinutes(problem: Problem, stage: Stage): number {
  if (stage.progress.kind === 'finished') return 0;
  const minutes = stage.progress.kind === 'started' ? stage.progress.remainingMinutes : stage.effort.minutes;
  if (stage.effort.kind === 'duration' || minutes === 0 || stage.crew.length === 0) return minutes;
  const output = largestOutput(problem, stage.crew, stage.crewLossPermille);
  return output <= 0 ? Infinity : Math.ceil((minutes * 1000) / output);
}

function largestOutput(problem: Problem, crew: readonly CrewNeed[], lossPermille: number): number {
  // The loss is for each maker after the first: charge it to all and give one back.
  let output = lossPermille;
  for (const { craftId, least, most } of crew) {
    const paces = problem.makers
      .flatMap((maker) => maker.crafts.filter((craft) => craft.craftId === craftId).map((craft) => craft.pacePermille))
      .sort((a, b) => b - a);
    if (paces.length < least) return 0;
    paces.slice(0, most).forEach((pace, k) => {
      if (k < least || pace > lossPermille) output += pace - lossPermille;
    });
  }
  return output;
}
