import { TestBed } from '@angular/core/testing';
import { planFixture } from '../testing/plan-fixture';
import { PlanningDesk } from './answer-question';
import { PlanningLine, SPAWN_PLANNING_WORKER } from './planning-line';
import { type Answer, PROTOCOL, type Question } from './protocol';

class FakeWorker {
  onmessage: ((event: MessageEvent<Answer>) => void) | null = null;
  onerror: ((event: ErrorEvent) => void) | null = null;
  readonly asked: Question[] = [];
  terminated = false;
  postMessage(question: Question): void {
    this.asked.push(question);
  }
  terminate(): void {
    this.terminated = true;
  }
  reply(answer: Answer): void {
    this.onmessage?.(new MessageEvent('message', { data: answer }));
  }
}

function open() {
  const workers: FakeWorker[] = [];
  const spawn = () => {
    workers.push(new FakeWorker());
    return workers[workers.length - 1];
  };
  TestBed.configureTestingModule({ providers: [PlanningLine, { provide: SPAWN_PLANNING_WORKER, useValue: spawn }] });
  return { line: TestBed.inject(PlanningLine), workers };
}

describe('the line to the planning worker', () => {
  it('starts no worker before the first question, and one only', async () => {
    const { line, workers } = open();
    expect(workers).toHaveLength(0);
    const first = line.ask({ kind: 'read-reasons' });
    const second = line.ask({ kind: 'read-load' });
    expect(workers).toHaveLength(1);
    workers[0].reply({ protocol: PROTOCOL, ask: 2, kind: 'load', load: { crafts: [] } });
    workers[0].reply({ protocol: PROTOCOL, ask: 1, kind: 'reasons', reasons: [] });
    expect((await first).kind).toBe('reasons');
    expect((await second).kind).toBe('load');
  });

  it('tells everyone who waits when the worker breaks, and starts another for the next', async () => {
    const { line, workers } = open();
    const lost = line.ask({ kind: 'read-reasons' });
    workers[0].onerror?.(new ErrorEvent('error', { message: 'out of memory' }));
    expect(await lost).toEqual({ kind: 'failed', message: 'out of memory' });
    expect(workers[0].terminated).toBe(true);
    void line.ask({ kind: 'read-reasons' });
    expect(workers).toHaveLength(2);
  });
});

describe('the planning worker’s desk', () => {
  const { problem, plan } = planFixture();

  it('says so where no plan was handed over', () => {
    const answer = new PlanningDesk().answer({ protocol: PROTOCOL, ask: 4, kind: 'read-load' });
    expect(answer).toMatchObject({ ask: 4, kind: 'failed' });
  });

  it('refuses a page of another version', () => {
    const question = { protocol: 2, ask: 1, kind: 'hold-plan', problem, plan } as unknown as Question;
    expect(new PlanningDesk().answer(question).kind).toBe('failed');
  });

  it('turns a crash into an answer', () => {
    const desk = new PlanningDesk();
    desk.answer({ protocol: PROTOCOL, ask: 1, kind: 'hold-plan', problem, plan });
    const move = { stageId: 'no such stage', start: 0, makerIds: null, bayIds: null };
    expect(desk.answer({ protocol: PROTOCOL, ask: 2, kind: 'try-move', move })).toMatchObject({
      ask: 2,
      kind: 'failed',
    });
  });
});
