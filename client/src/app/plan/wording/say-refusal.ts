import type { Names } from '@common/planning';
import type { Refusal } from '../timeline/engine/take-targets';

/** Why a row can't take what is held, as one would call it across the room. */
export function sayRefusal(refusal: Refusal, names: Names, rowTitle: string): string {
  switch (refusal.kind) {
    case 'wrong-craft':
      return `${rowTitle} doesn’t do ${names.craft(refusal.craftId)}`;
    case 'in-crew-already':
      return `${rowTitle} is in the crew already`;
    case 'wrong-bay':
      return `It can’t be done at ${rowTitle}`;
  }
}

/** Why a stage can't be taken in hand. */
export function sayUnholdable(why: 'started' | 'finished' | 'visit'): string {
  return {
    started: 'Started work stays with its crew; it can be paused on the day sheet.',
    finished: 'This is done. It stays where it was.',
    visit: 'A visit is agreed with the client. Change it on the production.',
  }[why];
}
