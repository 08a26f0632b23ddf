import { TestKey } from '@angular/cdk/testing';
import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { ChangeDetectionStrategy, Component } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import type { StageMove } from '@common/contract';
import { giveElementsSize, openBench, settle } from '../testing/plan-bench';
import { idOf, planFixture } from '../testing/plan-fixture';
import { HoldLedger } from './hold-ledger';
import { TimelineHarness } from './testing/timeline-harness';
import { Timeline } from './timeline';

@Component({
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [HoldLedger, Timeline],
  template: `<fettle-timeline (chosen)="chosen = $event" (saysWhy)="refused = $event" /><fettle-hold-ledger />`,
})
class Wall {
  chosen = '';
  refused = '';
}

const view = planFixture();

async function hang(shown = view) {
  giveElementsSize();
  const bench = await openBench(shown);
  const fixture = TestBed.createComponent(Wall);
  await fixture.whenStable();
  const wall = await TestbedHarnessEnvironment.loader(fixture).getHarness(TimelineHarness);
  return { ...bench, fixture, wall, text: () => (fixture.nativeElement as HTMLElement).textContent ?? '' };
}

describe('the wall', () => {
  it('has one tab stop, and says of each stage what, whose, when, who and where', async () => {
    const { wall } = await hang();
    expect(await wall.tabStops()).toBe(1);
    const [first] = await wall.stageNames();
    expect(first).toBe(
      'DG Carve the shape, Moon, The Drowned Garden; Mon 7 Dec 09:00 to Mon 7 Dec 16:30; Ines Amadi; Hot-wire table.',
    );
  });

  it('is walked with arrow keys', async () => {
    const { wall } = await hang();
    await wall.focusStage('DG Carve the shape, Moon');
    await wall.press(TestKey.RIGHT_ARROW);
    expect(await wall.focusedName()).toContain('Foam sign-off (sign-off), Moon');
    await wall.press(TestKey.DOWN_ARROW);
    expect(await wall.focusedName()).toContain(', Bell,');
    await wall.press(TestKey.HOME);
    expect(await wall.focusedName()).toContain('DG Carve the shape, Bell');
    expect(await wall.tabStops()).toBe(1);
  });

  it('opens a stage', async () => {
    const { wall, fixture } = await hang();
    await wall.openStage('DG Carve the shape, Bell');
    expect(fixture.componentInstance.chosen).toBe(idOf('stage', 6));
  });

  it('moves a stage by keys, tells what follows, and puts it down with Enter', async () => {
    const { wall, worker, http, text } = await hang();
    await wall.focusStage('DG Carve the shape, Moon');
    await wall.press('m', TestKey.RIGHT_ARROW, TestKey.RIGHT_ARROW);
    await settle();
    const start = view.plan.placements[0].work[0].start;
    expect(worker.tried.at(-1)).toMatchObject({ stageId: idOf('stage', 0), start: start + 30 });
    expect(await wall.ghosts()).toBe(1);
    expect(text()).toContain('Mon 7 Dec 09:30');
    await wall.press(TestKey.ENTER);
    const move = http.expectOne({ method: 'POST', url: '/api/plan/moves' });
    expect(move.request.body).toEqual({
      revision: 7,
      stageId: idOf('stage', 0),
      start: start + 30,
      makerIds: null,
      bayIds: null,
    } satisfies StageMove);
    move.flush({ revision: 8 });
    await settle();
    http.expectOne('/api/plan').flush({ ...view, revision: 8 });
    await settle();
    expect(await wall.ghosts()).toBe(0);
  });

  it('puts a stage back with Escape and asks nothing of the server', async () => {
    const { wall, http, hand } = await hang();
    await wall.focusStage('DG Carve the shape, Moon');
    await wall.press('m');
    await wall.pressWithShift(TestKey.RIGHT_ARROW);
    await settle();
    expect(hand.place()?.start).toBe(view.plan.placements[0].work[0].start + 1440);
    await wall.press(TestKey.ESCAPE);
    await settle();
    expect(hand.state().kind).toBe('idle');
    expect(await wall.ghosts()).toBe(0);
    http.expectNone('/api/plan/moves');
  });

  it('hands a stage to another maker who holds the craft with up and down', async () => {
    const { wall, worker } = await hang();
    await wall.focusStage('DG Carve the shape, Moon');
    await wall.press('m', TestKey.DOWN_ARROW);
    await settle();
    const asked = worker.tried.at(-1)?.makerIds?.at(0);
    const maker = view.problem.makers.find((one) => one.id === asked);
    expect(maker?.crafts.map((craft) => craft.craftId)).toContain(idOf('craft', 0));
    expect(asked).not.toBe(view.plan.placements[0].crew[0].makerId);
  });

  it('says why a finished stage stays', async () => {
    const stages = view.problem.stages.map((stage, index) =>
      index === 0
        ? {
            ...stage,
            progress: { kind: 'finished' as const, ...view.plan.placements[0].work[0], makerIds: [], bayIds: [] },
          }
        : stage,
    );
    const { wall, hand, fixture } = await hang({ ...view, problem: { ...view.problem, stages } });
    await wall.focusStage('DG Carve the shape, Moon');
    await wall.press('m');
    expect(hand.holding()).toBe(false);
    expect(fixture.componentInstance.refused).toBe(idOf('stage', 0));
  });

  it('says which dates pay', async () => {
    const { wall, text, hand } = await hang();
    await wall.focusStage('DG Carve the shape, Moon');
    hand.take(idOf('stage', 17), `piece:${idOf('piece', 2)}`, 'keys');
    hand.nudgeDays(9);
    await settle();
    expect(text()).toMatch(/Technical rehearsal, The Drowned Garden\s*margin .* → late .*loses 9 d/s);
  });
});
