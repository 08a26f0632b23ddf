import { at, idOf, MONDAY, planFixture } from '../../testing/plan-fixture';
import { drawTape } from './draw-tape';
import { bayTape, heldBays, pieceTape } from './tape';
import { labelFor } from './tape-label';
import { makeTimeScale, xOf } from './time-scale';

const { problem, plan } = planFixture();
const scale = makeTimeScale({ start: MONDAY, end: at(30, 0) }, [], { litPx: 17, unlitPx: 17 });
const drawn = { left: 0, right: 20_000 };

function drawnStage(n: number, kind: 'make' | 'check' | 'sign-off' | 'transport') {
  return drawTape({ tape: pieceTape(problem.stages[n], plan.placements[n]), kind, scale, drawn });
}

describe('drawing a tape', () => {
  it('tears work that goes on another day and ties the pieces with a thread', () => {
    const overnight = problem.stages.findIndex((stage, n) => {
      const work = plan.placements[n].work;
      return (
        stage.effort.minutes > 0 && work.some((span, index) => index > 0 && span.start - work[index - 1].end > 600)
      );
    });
    expect(overnight).toBeGreaterThanOrEqual(0);
    const drawing = drawnStage(overnight, 'make');
    expect(drawing.thread).not.toBe('');
    expect(drawing.work.match(/M/g)?.length).toBeGreaterThan(1);
  });

  it('draws lunch over', () => {
    const drawing = drawnStage(2, 'make');
    const { work } = plan.placements[2];
    expect(work.length).toBeGreaterThanOrEqual(1);
    expect(drawing.work.match(/M/g)?.length).toBeLessThanOrEqual(work.length);
  });

  it('draws a dwell from the end of work to its own end', () => {
    const drawing = drawnStage(2, 'make');
    const { work, dwellEnd } = plan.placements[2];
    const end = xOf(scale, dwellEnd) - xOf(scale, work[0].start);
    expect(drawing.dwellBox).toContain(`L${Math.round(end * 100) / 100} 4`);
    expect(drawing.hatch).not.toBe('');
    expect(drawnStage(0, 'make').hatch).toBe('');
  });

  it('gives each kind of stage an outline of its own', () => {
    const kinds = ['make', 'check', 'sign-off', 'transport'] as const;
    expect(new Set(kinds.map((kind) => drawnStage(4, kind).work)).size).toBe(4);
  });

  it('brackets what a bay is kept for', () => {
    const held = heldBays(problem, plan).find((one) => one.stageId === idOf('stage', 2));
    const tape = bayTape(problem.stages[2], plan.placements[2], held?.span ?? { start: 0, end: 1 });
    expect(drawTape({ tape, kind: 'make', scale, drawn }).hold).toMatch(/^M0.5 0.5/);
  });
});

describe('the words on a tape', () => {
  it('stand on it where they fit, beside it where there is room, and nowhere else', () => {
    const label = (bodyWidth: number, dwellWidth: number, roomAfter: number) =>
      labelFor({ bodyWidth, dwellWidth, roomAfter, nameLength: 15 });
    expect(label(200, 0, 0)).toMatchObject({ mark: 'on', name: 'on' });
    expect(label(26, 0, 300)).toMatchObject({ mark: 'on', name: 'beside' });
    expect(label(26, 150, 20)).toMatchObject({ mark: 'on', name: 'over-dwell' });
    expect(label(10, 30, 20)).toMatchObject({ mark: 'none', name: 'none' });
  });
});
