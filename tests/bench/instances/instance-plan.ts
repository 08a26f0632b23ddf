import type { Plan } from '@common/planning/problem/plan';
import type { InstanceData } from './instance-data';
import { stageIdOf } from './instance-problem';

/** A resource and the skill it is there for, both counted from 1 as in the file. */
export type CrewPair = readonly [resource: number, skill: number];

/** A plan in the terms of an instance file. */
export interface InstancePlan {
  /** By activity in the order of the file, source and sink included. */
  readonly starts: readonly number[];
  /** By activity, for multi-skill instances; null elsewhere. */
  readonly crews: readonly (readonly CrewPair[])[] | null;
  readonly makespan: number;
}

/** Reads a plan of the instance's problem back into the file's terms; null where an activity is not placed. */
export function instancePlan(data: InstanceData, plan: Plan): InstancePlan | null {
  const placements = new Map(plan.placements.map((placement) => [placement.stageId, placement]));
  const starts: number[] = [];
  const crews: CrewPair[][] = [];
  for (let position = 0; position < data.activities.length; position++) {
    const placement = placements.get(stageIdOf(position));
    if (placement === undefined || placement.work.length === 0) return null;
    starts.push(placement.work[0].start);
    crews.push(placement.crew.map((member): CrewPair => [numberIn(member.makerId), numberIn(member.craftId)]));
  }
  const makespan = starts.reduce((latest, start, k) => Math.max(latest, start + data.activities[k].duration), 0);
  return { starts, crews: data.skills === null ? null : crews, makespan };
}

const numberIn = (id: string): number => Number(id.slice(1)) + 1;
