import {
  craftLoad,
  drivingChain,
  explain,
  type Move,
  type Plan,
  type Problem,
  replaceAfterMove,
} from '@common/planning';
import { type Answer, type AnswerBody, PROTOCOL, type Question, type Trial } from './protocol';

/** What the worker keeps between questions: the plan that they are about. */
export interface HeldPlan {
  readonly problem: Problem;
  readonly plan: Plan;
}

/** The worker's side of the protocol, apart from the worker: holds a plan and answers about it. */
export class PlanningDesk {
  private held: HeldPlan | null = null;

  /** Answers every question, whatever happens on the way. */
  answer(question: Question): Answer {
    const address = { protocol: PROTOCOL, ask: question.ask } as const;
    if (question.protocol !== PROTOCOL) {
      return { ...address, kind: 'failed', message: 'This page is older than its planning worker. Reload it.' };
    }
    try {
      return { ...address, ...this.answerBody(question) };
    } catch (error) {
      return { ...address, kind: 'failed', message: error instanceof Error ? error.message : String(error) };
    }
  }

  private answerBody(question: Question): AnswerBody {
    if (question.kind === 'hold-plan') {
      this.held = { problem: question.problem, plan: question.plan };
      return { kind: 'plan-held' };
    }
    const held = this.held;
    if (held === null) return { kind: 'failed', message: 'No plan has been handed over yet.' };
    switch (question.kind) {
      case 'try-move':
        return { kind: 'moved', trial: tryMove(held, question.move) };
      case 'try-moves':
        return { kind: 'tried', trials: question.moves.map((move) => tryMove(held, move)) };
      case 'read-reasons':
        return { kind: 'reasons', reasons: explain(held.problem, held.plan) };
      case 'read-chains':
        return {
          kind: 'chains',
          chains: held.problem.keyDates.map((date) => drivingChain(held.problem, held.plan, date.id)),
        };
      case 'read-load':
        return { kind: 'load', load: { crafts: craftLoad(held.problem, held.plan) } };
    }
  }
}

function tryMove({ problem, plan }: HeldPlan, move: Move): Trial {
  const result = replaceAfterMove(problem, plan, move);
  const moved = new Set(result.moved);
  return {
    moved: result.moved,
    placements: result.plan.placements.filter((placement) => moved.has(placement.stageId)),
    unmet: result.unmet,
  };
}
