import type { Minute } from '@common/time/span';

/** Where a stage is put: null leaves that side to the engine. */
export interface Place {
  readonly start: Minute;
  readonly makerIds: readonly string[] | null;
  readonly bayIds: readonly string[] | null;
}

/** A stage taken in hand: which one, where it came from, and by what it is held. */
export interface Hold {
  readonly stageId: string;
  /** The row that it was taken from. */
  readonly rowKey: string;
  readonly origin: Place;
  readonly by: 'pointer' | 'keys';
}

/** What the hand is doing. Only `dropped` asks for anything to be changed, and only after the stage was truly moved. */
export type HoldState =
  | { readonly kind: 'idle' }
  | { readonly kind: 'held'; readonly hold: Hold }
  | { readonly kind: 'moving'; readonly hold: Hold; readonly place: Place }
  | { readonly kind: 'dropped'; readonly hold: Hold; readonly place: Place }
  | { readonly kind: 'escaped'; readonly hold: Hold };

/** What happens to a hand. `settle` is the answer to a drop, or the finger leaving the glass after an escape. */
export type HoldEvent =
  | { readonly kind: 'take'; readonly hold: Hold }
  | { readonly kind: 'aim'; readonly place: Place }
  | { readonly kind: 'drop' }
  | { readonly kind: 'escape' }
  | { readonly kind: 'settle' };

export const IDLE: HoldState = { kind: 'idle' };

/**
 * The next state of the hand. An event that makes no sense where it arrives changes nothing: a late pointer move after Escape
 * must not pick the stage up again, and a second press must not lose where the first one came from.
 */
export function stepHold(state: HoldState, event: HoldEvent): HoldState {
  switch (event.kind) {
    case 'take':
      return state.kind === 'idle' ? { kind: 'held', hold: event.hold } : state;
    case 'aim':
      return aim(state, event.place);
    case 'drop':
      return drop(state);
    case 'escape':
      return state.kind === 'held' || state.kind === 'moving' ? { kind: 'escaped', hold: state.hold } : state;
    case 'settle':
      return state.kind === 'dropped' || state.kind === 'escaped' ? IDLE : state;
  }
}

function aim(state: HoldState, place: Place): HoldState {
  if (state.kind === 'held') {
    return samePlace(state.hold.origin, place) ? state : { kind: 'moving', hold: state.hold, place };
  }
  return state.kind === 'moving' ? { ...state, place } : state;
}

function drop(state: HoldState): HoldState {
  switch (state.kind) {
    case 'held':
    case 'escaped':
      return IDLE;
    case 'moving':
      return samePlace(state.hold.origin, state.place) ? IDLE : { ...state, kind: 'dropped' };
    case 'idle':
    case 'dropped':
      return state;
  }
}

/** Whether two places are one: makers in any order, bays in the order of the stage's places. */
export function samePlace(a: Place, b: Place): boolean {
  return a.start === b.start && sameIds(sorted(a.makerIds), sorted(b.makerIds)) && sameIds(a.bayIds, b.bayIds);
}

function sorted(ids: readonly string[] | null): readonly string[] | null {
  return ids && [...ids].sort();
}

function sameIds(a: readonly string[] | null, b: readonly string[] | null): boolean {
  if (a === null || b === null) return a === b;
  return a.length === b.length && a.every((id, index) => id === b[index]);
}
