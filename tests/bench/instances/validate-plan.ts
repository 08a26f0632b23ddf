import type { InstanceData } from './instance-data';
import type { CrewPair, InstancePlan } from './instance-plan';

/**
 * What is wrong with a plan by the instance file alone, one sentence each; empty for a valid plan. Knows nothing of the
 * planning problem, its checker or the search, so that a fault in translating between them shows here.
 */
export function validatePlan(data: InstanceData, plan: InstancePlan): string[] {
  return [...startFaults(data, plan), ...capacityFaults(data, plan), ...crewFaults(data, plan)];
}

function startFaults(data: InstanceData, { starts, makespan }: InstancePlan): string[] {
  const faults: string[] = [];
  if (starts.length !== data.activities.length) return ['The plan does not have one start for each activity.'];
  data.activities.forEach(({ label, duration, release }, k) => {
    if (!Number.isInteger(starts[k])) faults.push(`Activity ${label} has no whole start.`);
    if (starts[k] < release) faults.push(`Activity ${label} starts before its release.`);
    if (starts[k] + duration > makespan) faults.push(`Activity ${label} ends after the stated makespan.`);
  });
  for (const { from, to, lag } of data.arcs)
    if (starts[to] < starts[from] + lag)
      faults.push(
        `Activity ${data.activities[to].label} starts less than ${lag} after ${data.activities[from].label}.`,
      );
  return faults;
}

function capacityFaults(data: InstanceData, { starts }: InstancePlan): string[] {
  const faults: string[] = [];
  data.capacities.forEach((capacity, resource) => {
    // Use can only rise where an activity starts, so it is enough to look there.
    for (const at of starts) {
      let used = 0;
      data.activities.forEach(({ duration, demands }, k) => {
        if (starts[k] <= at && at < starts[k] + duration) used += demands[resource];
      });
      if (used > capacity) faults.push(`Resource ${resource + 1} has ${used} of ${capacity} units in use at ${at}.`);
    }
  });
  return faults;
}

function crewFaults(data: InstanceData, plan: InstancePlan): string[] {
  const { skills } = data;
  if (skills === null) return [];
  if (plan.crews === null) return ['The plan has no crews.'];
  const faults: string[] = [];
  const busy: { resource: number; start: number; end: number; label: string }[] = [];
  data.activities.forEach(({ label, duration }, k) => {
    const pairs = plan.crews?.[k] ?? [];
    if (duration > 0) faults.push(...pairFaults(label, pairs, skills.required[k], skills.mastery));
    for (const [resource] of pairs)
      busy.push({ resource, label, start: plan.starts[k], end: plan.starts[k] + duration });
  });
  for (let i = 0; i < busy.length; i++)
    for (let j = i + 1; j < busy.length; j++)
      if (busy[i].resource === busy[j].resource && busy[i].start < busy[j].end && busy[j].start < busy[i].end)
        faults.push(`Resource ${busy[i].resource} is in activities ${busy[i].label} and ${busy[j].label} at once.`);
  return faults;
}

function pairFaults(
  label: string,
  pairs: readonly CrewPair[],
  required: readonly number[],
  mastery: readonly (readonly boolean[])[],
): string[] {
  const faults: string[] = [];
  for (const [resource, skill] of pairs)
    if (!mastery[resource - 1]?.[skill - 1])
      faults.push(`Resource ${resource} lacks skill ${skill} (activity ${label}).`);
  required.forEach((count, k) => {
    const given = pairs.filter(([, skill]) => skill === k + 1).length;
    if (given !== count) faults.push(`Activity ${label} has ${given} of ${count} people with skill ${k + 1}.`);
  });
  return faults;
}
