import type { EntityManager } from 'typeorm';
import type { FieldFault } from '@common/contract';
import type { StageDraft } from '@common/domain/stage-draft';
import { expandPatterns } from '@common/time/pattern';
import { Craft, Maker, Studio } from '@database/entities';
import { patternOf } from '../storage/patterns';

/** How far ahead shifts are looked at to find the longest. */
const WEEKS_AHEAD = 8;
const MINUTES_PER_WEEK = 10_080;
const MS_PER_MINUTE = 60_000;

/** Who is there to do work: crafts held, their paces, and each maker's longest unbroken stretch. */
export interface Hands {
  readonly craftNames: ReadonlyMap<string, string>;
  readonly makers: readonly {
    readonly paces: ReadonlyMap<string, number>;
    readonly longestMinutes: number;
  }[];
}

/** Reads the active crew as `handsFaults` wants it. */
export async function readHands(manager: EntityManager, now: Date): Promise<Hands> {
  const crafts = await manager.find(Craft);
  const { zone } = await manager.findOneOrFail(Studio, { where: { single: true } });
  const makers = await manager.find(Maker, {
    where: { active: true },
    relations: { crafts: true, patterns: true },
    relationLoadStrategy: 'query',
  });
  const start = Math.floor(now.getTime() / MS_PER_MINUTE);
  const frame = { start, end: start + WEEKS_AHEAD * MINUTES_PER_WEEK };
  return {
    craftNames: new Map(crafts.map((craft) => [craft.id, craft.name])),
    makers: makers.map((maker) => ({
      paces: new Map(maker.crafts.map((craft) => [craft.craftId, craft.pacePermille])),
      longestMinutes: expandPatterns(maker.patterns.map(patternOf), frame, zone).reduce(
        (longest, span) => Math.max(longest, span.end - span.start),
        0,
      ),
    })),
  };
}

/** What the crew as it is can not do: a craft that too few hold, a session that is longer than any of their shifts. */
export function handsFaults({ craftNames, makers }: Hands, draft: StageDraft, pointer = ''): FieldFault[] {
  const faults: FieldFault[] = [];
  for (const [i, { craftId, least }] of draft.crew.entries()) {
    const holders = makers.filter((maker) => maker.paces.has(craftId)).length;
    const name = craftNames.get(craftId);
    if (name === undefined || holders >= least) continue;
    const detail =
      holders === 0
        ? `Nobody in the crew holds ${name}. Add the craft to a maker first, or choose another.`
        : `This wants ${least} with ${name}, and only ${holders} in the crew hold it.`;
    faults.push({ pointer: `${pointer}/crew/${String(i)}/craftId`, detail });
  }
  if (faults.length > 0 || draft.continuity !== 'session' || draft.crew.length === 0) return faults;
  const needed = leastSessionMinutes(makers, draft);
  const longest = Math.min(
    ...draft.crew.map(({ craftId }) =>
      Math.max(...makers.filter((maker) => maker.paces.has(craftId)).map((maker) => maker.longestMinutes)),
    ),
  );
  if (needed > longest) {
    const detail =
      `A session is not left once begun, but this takes ${hours(needed)} with the most hands, and the longest shift of ` +
      `anyone who could do it is ${hours(longest)}. Split it, allow more makers, or let it stop at the end of a shift.`;
    faults.push({ pointer: `${pointer}/continuity`, detail });
  }
  return faults;
}

/** Minutes of the session with the most and quickest hands that there are. */
function leastSessionMinutes(makers: Hands['makers'], draft: StageDraft): number {
  let output = 0;
  let size = 0;
  for (const { craftId, most } of draft.crew) {
    const paces = makers.flatMap((maker) => maker.paces.get(craftId) ?? []).sort((a, b) => b - a);
    for (const pace of paces.slice(0, most)) {
      output += pace;
      size += 1;
    }
  }
  output -= draft.crewLossPermille * Math.max(0, size - 1);
  return Math.ceil((draft.handsOn.likelyMinutes * 1000) / Math.max(1, output));
}

function hours(minutes: number): string {
  const rest = minutes % 60;
  return `${String(Math.floor(minutes / 60))} h${rest === 0 ? '' : ` ${String(rest)} min`}`;
}
