import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { type EnvironmentProviders, type Provider, signal } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { provideRouter } from '@angular/router';
import type { WorkingPlanView } from '@common/contract';
import type { Move, Placement } from '@common/planning';
import { ForecastStore } from '../forecast-store';
import { InsightStore } from '../insight-store';
import { SPAWN_PLANNING_WORKER, PlanningLine } from '../planning-worker/planning-line';
import { type Answer, type AnswerBody, PROTOCOL, type Question } from '../planning-worker/protocol';
import { PlanStore } from '../plan-store';
import { BoardStore } from '../timeline/board-store';
import { HoldStore } from '../timeline/hold-store';

/** Answers like a planning worker that moves one stage and lets every other stand. */
export class FakePlanningWorker {
  onmessage: ((event: MessageEvent<Answer>) => void) | null = null;
  onerror: ((event: ErrorEvent) => void) | null = null;
  /** Moves that were tried, the latest last. */
  readonly tried: Move[] = [];
  private plan: readonly Placement[] = [];

  postMessage(question: Question): void {
    const body = this.answer(question);
    queueMicrotask(() =>
      this.onmessage?.(
        new MessageEvent('message', { data: { protocol: PROTOCOL, ask: question.ask, ...body } as Answer }),
      ),
    );
  }

  terminate(): void {
    this.onmessage = null;
  }

  private answer(question: Question): AnswerBody {
    switch (question.kind) {
      case 'hold-plan':
        this.plan = question.plan.placements;
        return { kind: 'plan-held' };
      case 'try-move':
        this.tried.push(question.move);
        return { kind: 'moved', trial: this.trial(question.move) };
      case 'try-moves':
        return { kind: 'tried', trials: question.moves.map((move) => this.trial(move)) };
      case 'read-reasons':
        return {
          kind: 'reasons',
          reasons: this.plan.map(({ stageId, work }) => ({
            stageId,
            reasons: [{ kind: 'horizon', until: work[0].start }],
          })),
        };
      case 'read-chains':
        return { kind: 'chains', chains: [] };
      case 'read-load':
        return { kind: 'load', load: { crafts: [] } };
    }
  }

  private trial(move: Move): Extract<AnswerBody, { kind: 'moved' }>['trial'] {
    const placement = this.plan.find((one) => one.stageId === move.stageId);
    if (!placement) return { moved: [], placements: [], unmet: [] };
    const by = (move.start ?? placement.work[0].start) - placement.work[0].start;
    const shifted: Placement = {
      ...placement,
      work: placement.work.map((span) => ({ start: span.start + by, end: span.end + by })),
      crew: placement.crew.map((member, index) => ({ ...member, makerId: move.makerIds?.[index] ?? member.makerId })),
      dwellEnd: placement.dwellEnd + by,
    };
    return { moved: [move.stageId], placements: [shifted], unmet: [] };
  }
}

/** The stores of the plan page on a made-up plan, with a worker and a server that answer here. */
export interface PlanBench {
  readonly worker: FakePlanningWorker;
  readonly http: HttpTestingController;
  readonly plan: PlanStore;
  readonly board: BoardStore;
  readonly hand: HoldStore;
}

/** Sets up TestBed with the plan's stores and hands the plan over as its server would. */
export async function openBench(
  view: WorkingPlanView,
  providers: (Provider | EnvironmentProviders)[] = [],
): Promise<PlanBench> {
  const worker = new FakePlanningWorker();
  TestBed.configureTestingModule({
    providers: [
      provideHttpClient(),
      provideHttpClientTesting(),
      provideRouter([]),
      { provide: SPAWN_PLANNING_WORKER, useValue: () => worker },
      PlanningLine,
      PlanStore,
      BoardStore,
      HoldStore,
      // What the wall shows besides is no matter of these tests, and a request that nobody answers would keep it from being still.
      { provide: ForecastStore, useValue: { fans: signal(new Map()), fresh: signal(true) } },
      InsightStore,
      ...providers,
    ],
  });
  const http = TestBed.inject(HttpTestingController);
  const plan = TestBed.inject(PlanStore);
  TestBed.tick();
  http.expectOne('/api/plan').flush(view);
  const bench = { worker, http, plan, board: TestBed.inject(BoardStore), hand: TestBed.inject(HoldStore) };
  await settle();
  return bench;
}

/** Lets effects run and answers arrive. */
export async function settle(): Promise<void> {
  for (let round = 0; round < 4; round += 1) {
    TestBed.tick();
    await Promise.resolve();
    await new Promise((resolve) => setTimeout(resolve));
  }
}

/** Gives jsdom, which lays nothing out, a wall of a desk's size. */
export function giveElementsSize(width = 1300, height = 800): void {
  Object.defineProperty(HTMLElement.prototype, 'clientWidth', { configurable: true, get: () => width });
  Object.defineProperty(HTMLElement.prototype, 'clientHeight', { configurable: true, get: () => height });
  class StillResizeObserver {
    observe(): void {}
    unobserve(): void {}
    disconnect(): void {}
  }
  Object.defineProperty(globalThis, 'ResizeObserver', { configurable: true, value: StillResizeObserver });
}
