import { CountExactly } from './count-exactly';
import { atLeast, atMost, type Engine } from './engine';
import { canOrder, type Order } from './order-pairs';
import type { TimedCrews } from './timed-model';

/** A 0/1 variable that says that a maker is in a stage's crew for a craft. */
export interface CrewChoice {
  readonly variable: number;
  readonly stage: number;
  readonly maker: number;
  readonly craft: number;
}

/** Variables of all crews, numbered from a first one on: makers in stages, and makers in stages for a craft. */
export interface CrewVariables {
  readonly choices: readonly CrewChoice[];
  /** `isIn[stage].get(maker)`: the variable that the maker is in the stage's crew. */
  readonly isIn: readonly ReadonlyMap<number, number>[];
  readonly next: number;
}

/** Numbers the crew variables. A maker who could only serve for one craft needs a single variable for both meanings. */
export function crewVariables(crews: TimedCrews, first: number): CrewVariables {
  const choices: CrewChoice[] = [];
  let next = first;
  const isIn = crews.needs.map((needs, stage) => {
    const members = new Map<number, number>();
    crews.holds.forEach((holds, maker) => {
      const crafts = needs.flatMap((need, craft) => (need > 0 && holds[craft] ? [craft] : []));
      if (crafts.length === 0) return;
      members.set(maker, next);
      if (crafts.length === 1) choices.push({ variable: next++, stage, maker, craft: crafts[0] });
      else {
        next++;
        for (const craft of crafts) choices.push({ variable: next++, stage, maker, craft });
      }
    });
    return members;
  });
  return { choices, isIn, next };
}

/** The choices in the order to try them: first the makers whose crafts the rest of the work needs least. */
export function sparingly(crews: TimedCrews, variables: CrewVariables): CrewChoice[] {
  const strain = crews.craftIds.map((_, craft) => {
    const asked = crews.needs.reduce((sum, needs) => sum + needs[craft], 0);
    const holders = crews.holds.filter((holds) => holds[craft]).length;
    return asked / Math.max(1, holders);
  });
  const worth = crews.holds.map((holds) =>
    holds.reduce((sum, holdsIt, craft) => sum + (holdsIt ? strain[craft] : 0), 0),
  );
  const spared = ({ maker, craft }: CrewChoice): number => worth[maker] - strain[craft];
  return [...variables.choices].sort((a, b) => spared(a) - spared(b));
}

/** Crews of the asked sizes, one craft for each member, and nobody in two stages that overlap. */
export function addCrewConstraints(
  engine: Engine,
  crews: TimedCrews,
  variables: CrewVariables,
  orders: readonly Order[],
): void {
  crews.needs.forEach((needs, stage) => {
    const choices = variables.choices.filter((choice) => choice.stage === stage);
    const total = needs.reduce((sum, need) => sum + need, 0);
    if (total === 0) return;
    needs.forEach((need, craft) => {
      const able = choices.filter((choice) => choice.craft === craft).map((choice) => choice.variable);
      if (need > 0) engine.add(new CountExactly(engine.trail, able, need));
    });
    engine.add(new CountExactly(engine.trail, [...variables.isIn[stage].values()], total));
    for (const [maker, isIn] of variables.isIn[stage]) {
      const own = choices.filter((choice) => choice.maker === maker).map((choice) => choice.variable);
      if (own.length === 1) continue;
      engine.addClause(atMost(isIn, 0), ...own.map((v) => atLeast(v, 1)));
      own.forEach((v, k) => {
        engine.addClause(atMost(v, 0), atLeast(isIn, 1));
        for (const other of own.slice(k + 1)) engine.addClause(atMost(v, 0), atMost(other, 0));
      });
    }
  });
  for (const order of orders)
    for (const [maker, isIn] of variables.isIn[order.first]) {
      const isInOther = variables.isIn[order.second].get(maker);
      if (isInOther !== undefined) engine.addClause(atMost(isIn, 0), atMost(isInOther, 0), ...canOrder(order));
    }
}
