import type { Placement, Plan } from '../problem/plan';
import type { Problem, Stage } from '../problem/problem';
import type { Unmet } from '../problem/result';
import { findLinkCycles } from '../problem/link-cycles';
import { type Facts, gatherFacts, unmet } from './facts';
import { checkLimits } from './limit-rules';
import { checkKeyDates, checkLinks, checkWindows } from './order-rules';
import {
  checkEarliest,
  checkFixed,
  checkFreeze,
  checkHorizon,
  checkLatest,
  checkPin,
  checkProgress,
} from './promise-rules';
import { checkBayCapacity, checkBayChoice, checkBayOpen, checkMakers } from './shared-rules';
import {
  checkAttended,
  checkContinuity,
  checkCrewCraft,
  checkCrewShift,
  checkCrewSize,
  checkDwell,
  checkEffort,
  checkPlacedOnce,
} from './work-rules';

type StageRule = (facts: Facts, stage: Stage, placement: Placement) => Unmet[];

const STAGE_RULES: readonly StageRule[] = [
  checkHorizon,
  checkEarliest,
  checkLatest,
  checkFixed,
  checkPin,
  checkProgress,
  checkCrewSize,
  checkCrewCraft,
  checkCrewShift,
  checkEffort,
  checkContinuity,
  checkDwell,
  checkAttended,
  checkBayChoice,
  checkBayOpen,
];

/**
 * Every rule that a plan breaks, whoever made it: a slow, plain reading of the problem that shares no code with the search.
 * An empty answer means that the plan may be stored and shown. The problem must make sense (see `validate`).
 */
export function check(problem: Problem, plan: Plan): Unmet[] {
  const facts = gatherFacts(problem, plan);
  const found = checkPlacedOnce(
    facts,
    plan.placements.map((placement) => placement.stageId),
  );
  for (const stage of problem.stages) {
    const placement = facts.placed.get(stage.id);
    if (placement) for (const rule of STAGE_RULES) found.push(...rule(facts, stage, placement));
  }
  found.push(...checkLinks(facts), ...checkWindows(facts), ...checkMakers(facts), ...checkBayCapacity(facts));
  found.push(...checkLimits(facts), ...checkFreeze(facts, problem.horizon.start), ...checkKeyDates(facts));
  for (const cycle of findLinkCycles(problem))
    found.push(unmet('link-cycle', { stageIds: cycle.stageIds, by: cycle.byMinutes }));
  return found;
}
