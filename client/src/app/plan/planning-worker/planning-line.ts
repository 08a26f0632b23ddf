import { DestroyRef, inject, Injectable, InjectionToken } from '@angular/core';
import { type Answer, type AnswerBody, PROTOCOL, type QuestionBody } from './protocol';
import { spawnWorker } from './spawn-worker';

/** Starts a planning worker; a token so that specs can answer in its place. */
export const SPAWN_PLANNING_WORKER = new InjectionToken<
  () => Pick<Worker, 'postMessage' | 'terminate' | 'onmessage' | 'onerror'>
>('spawn planning worker', { providedIn: 'root', factory: () => spawnWorker });

type AnswerTo = (answer: AnswerBody) => void;

/** The page's end of the line to the planning worker: numbers questions and brings each answer to whoever asked. */
@Injectable()
export class PlanningLine {
  private readonly spawn = inject(SPAWN_PLANNING_WORKER);
  private readonly waiting = new Map<number, AnswerTo>();
  private worker: ReturnType<typeof this.spawn> | null = null;
  private asked = 0;

  constructor() {
    inject(DestroyRef).onDestroy(() => this.hangUp());
  }

  /** Asks a question; the promise never rejects: what goes wrong is an answer of kind `failed`. */
  ask(question: QuestionBody): Promise<AnswerBody> {
    this.asked += 1;
    const ask = this.asked;
    return new Promise((resolve) => {
      this.waiting.set(ask, resolve);
      this.open().postMessage({ protocol: PROTOCOL, ask, ...question });
    });
  }

  private open(): ReturnType<typeof this.spawn> {
    if (this.worker !== null) return this.worker;
    const worker = this.spawn();
    worker.onmessage = (event: MessageEvent<Answer>) => this.receive(event.data);
    worker.onerror = (event) => this.fail(event.message || 'The planning worker could not be started.');
    this.worker = worker;
    return worker;
  }

  private receive(answer: Answer): void {
    const answerTo = this.waiting.get(answer.ask);
    this.waiting.delete(answer.ask);
    answerTo?.(answer);
  }

  /** A worker that broke is let go: the next question starts another. Everyone who waits is told. */
  private fail(message: string): void {
    const answers = [...this.waiting.values()];
    this.hangUp();
    answers.forEach((answerTo) => answerTo({ kind: 'failed', message }));
  }

  private hangUp(): void {
    this.worker?.terminate();
    this.worker = null;
    this.waiting.clear();
  }
}
