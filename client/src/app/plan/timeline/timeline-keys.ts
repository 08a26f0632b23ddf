import type { WalkStep } from './engine/focus-walk';
import type { HoldStore } from './hold-store';

const STEPS: Readonly<Record<string, WalkStep>> = {
  ArrowLeft: 'earlier',
  ArrowRight: 'later',
  ArrowUp: 'above',
  ArrowDown: 'below',
  Home: 'row-start',
  End: 'row-end',
};

/** The step that a key asks for while walking from stage to stage; undefined for any other key. */
export function walkStepOf(event: KeyboardEvent): WalkStep | undefined {
  return event.ctrlKey ? { Home: 'first' as const, End: 'last' as const }[event.key] : STEPS[event.key];
}

/** Does what a key asks for while a stage is held; false for a key that means nothing then. */
export function answerHoldingKey(event: KeyboardEvent, hand: HoldStore): boolean {
  switch (event.key) {
    case 'ArrowLeft':
    case 'ArrowRight': {
      const direction = event.key === 'ArrowLeft' ? -1 : 1;
      if (event.shiftKey) hand.nudgeDays(direction);
      else hand.nudge(direction);
      return true;
    }
    case 'ArrowUp':
    case 'ArrowDown':
      hand.nudgeRow(event.key === 'ArrowUp' ? -1 : 1);
      return true;
    case 'Enter':
    case ' ':
      void hand.drop();
      return true;
    default:
      return false;
  }
}
