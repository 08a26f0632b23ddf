import type { Span } from '../../time/span';
import type { Fault } from './fault';
import type { Problem, Stage } from './problem';

/** Amounts below zero or not whole, spans that end before they start, lists of spans out of order. */
export function findAmountFaults(problem: Problem): Fault[] {
  const faults: Fault[] = [...spanFaults('horizon', [problem.horizon]), ...spanFaults('days', problem.days)];
  faults.push(...spanFaults('working time', problem.workingTime), ...wholeFaults('freeze', [problem.freezeUntil]));
  const { changePenaltyMinor, unevenness, earliness } = problem.weights;
  faults.push(...amountFaults('weights', [changePenaltyMinor, unevenness, earliness]));
  for (const maker of problem.makers) {
    faults.push(
      ...spanFaults(`shifts of ${maker.id}`, maker.shifts),
      ...spanFaults(`overtime of ${maker.id}`, maker.overtime),
    );
    const paces = maker.crafts.map((craft) => craft.pacePermille);
    faults.push(...amountFaults(`maker ${maker.id}`, [maker.hourCostMinor, maker.overtimeHourCostMinor, ...paces]));
  }
  for (const bay of problem.bays) {
    faults.push(
      ...amountFaults(`bay ${bay.id}`, [bay.capacity]),
      ...spanFaults(`opening of ${bay.id}`, bay.open ?? []),
    );
  }
  for (const profile of problem.advances) {
    faults.push(...amountFaults(`advance ${profile.id}`, profile.permille));
    const ordered = profile.from.every((at, i) => i === 0 || at > profile.from[i - 1]);
    if (!ordered || profile.from.length !== profile.permille.length || profile.from.length === 0) {
      faults.push({ kind: 'profile-out-of-order', advanceId: profile.id });
    }
  }
  for (const stage of problem.stages) faults.push(...stageFaults(stage));
  for (const date of problem.keyDates) {
    faults.push(
      ...wholeFaults(`key date ${date.id}`, [date.at]),
      ...amountFaults(`key date ${date.id}`, [date.weight]),
    );
  }
  for (const link of problem.links) {
    const where = `link ${link.fromStageId} to ${link.toStageId}`;
    faults.push(...wholeFaults(where, [link.minGapMinutes, link.maxGapMinutes ?? 0]));
  }
  return faults;
}

function stageFaults(stage: Stage): Fault[] {
  const where = `stage ${stage.id}`;
  const { dwell, pin, progress } = stage;
  const window = dwell?.window;
  const amounts = [
    stage.effort.minutes,
    stage.crewLossPermille,
    ...stage.places.map((place) => place.units),
    ...(dwell ? [dwell.minutes, dwell.attendedMinutes] : []),
    ...(window ? [window.minutes] : []),
    ...(window?.kind === 'soft' ? [window.extraMinutes, window.costMinor] : []),
    ...(progress.kind === 'started' ? [progress.remainingMinutes] : []),
  ];
  const faults = amountFaults(where, amounts);
  const instants = [stage.earliestStart, stage.latestEnd ?? 0, stage.fixedStart ?? 0, pin?.start ?? 0];
  faults.push(...wholeFaults(where, progress.kind === 'to-do' ? instants : [...instants, progress.start]));
  if (progress.kind === 'finished') faults.push(...spanFaults(`work of ${stage.id}`, [progress]));
  for (const need of stage.crew) {
    const wrong = !(
      Number.isInteger(need.least) &&
      Number.isInteger(need.most) &&
      need.least >= 1 &&
      need.most >= need.least
    );
    if (wrong) faults.push({ kind: 'crew-bounds', stageId: stage.id, craftId: need.craftId });
  }
  return faults;
}

function spanFaults(where: string, spans: readonly Span[]): Fault[] {
  const faults = wholeFaults(
    where,
    spans.flatMap((span) => [span.start, span.end]),
  );
  if (spans.some((span) => span.end < span.start)) faults.push({ kind: 'reversed-span', where });
  else if (spans.some((span, i) => i > 0 && span.start < spans[i - 1].end))
    faults.push({ kind: 'spans-out-of-order', where });
  return faults;
}

function amountFaults(where: string, amounts: readonly number[]): Fault[] {
  const negative: Fault[] = amounts.some((amount) => amount < 0) ? [{ kind: 'negative-amount', where }] : [];
  return [...wholeFaults(where, amounts), ...negative];
}

function wholeFaults(where: string, numbers: readonly number[]): Fault[] {
  return numbers.every((number) => Number.isSafeInteger(number)) ? [] : [{ kind: 'not-an-integer', where }];
}
