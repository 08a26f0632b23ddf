import type { Directory } from '@common/contract';
import { KEY_DATE_NAMES } from '@common/domain/key-date';
import type { Names } from '@common/planning';

/** Names for everything in a plan, and the two that sentences about dates need besides. */
export interface PlanNames extends Names {
  /** "Moon": the piece that a stage belongs to. */
  readonly pieceOf: (stageId: string) => string;
  /** "The Drowned Garden". */
  readonly production: (productionId: string) => string;
  /** "Technical rehearsal, The Drowned Garden". */
  readonly keyDateInFull: (keyDateId: string) => string;
}

/** Reads names from a plan's directory. */
export function planNames(directory: Directory): PlanNames {
  const stages = new Map(directory.stages.map((stage) => [stage.id, stage]));
  const pieces = nameMap(directory.pieces);
  const productions = nameMap(directory.productions);
  const makers = nameMap(directory.makers);
  const bays = nameMap(directory.bays);
  const crafts = nameMap(directory.crafts);
  const dates = new Map(directory.keyDates.map((date) => [date.id, date]));
  const production = (id: string): string => productions.get(id) ?? 'a production';
  const pieceOf = (id: string): string => pieces.get(stages.get(id)?.pieceId ?? '') ?? 'a piece';
  return {
    stage: (id) => {
      const stage = stages.get(id);
      if (!stage) return 'a stage';
      const nth = stage.nth !== null && stage.of !== null ? ` ${stage.nth} of ${stage.of}` : '';
      return `${pieceOf(id)}: ${lowerFirst(stage.name)}${nth}`;
    },
    maker: (id) => makers.get(id) ?? 'a maker',
    bay: (id) => bays.get(id) ?? 'a bay',
    craft: (id) => crafts.get(id)?.toLowerCase() ?? 'a craft',
    keyDate: (id) => keyDateName(dates.get(id)?.kind),
    craftsperson: (id) => `maker for ${crafts.get(id)?.toLowerCase() ?? 'it'}`,
    pieceOf,
    production,
    keyDateInFull: (id) => {
      const date = dates.get(id);
      return `${keyDateName(date?.kind)}, ${production(date?.productionId ?? '')}`;
    },
  };
}

function keyDateName(kind: Directory['keyDates'][number]['kind'] | undefined): string {
  return kind ? KEY_DATE_NAMES[kind] : 'Key date';
}

function nameMap(items: readonly { readonly id: string; readonly name: string }[]): ReadonlyMap<string, string> {
  return new Map(items.map((item) => [item.id, item.name]));
}

/** Lower case inside a sentence, unless the word is written in capitals, as "FR treatment" is. */
function lowerFirst(text: string): string {
  return /^\p{Lu}\p{Lu}/u.test(text) ? text : text.charAt(0).toLowerCase() + text.slice(1);
}
