import { findConflict, sayConflict, type Names } from '@common/planning';
import { timedProblem, type TimedSketch } from './support/timed-problems';

const names: Names = {
  stage: (id) => `Stage ${id.slice(1)}`,
  maker: (id) => id,
  bay: (id) => `Bay ${id.slice(1)}`,
  craft: (id) => id,
  keyDate: (id) => id,
  craftsperson: (id) => id,
};

function said(sketch: TimedSketch): string | null {
  const conflict = findConflict(timedProblem(sketch), { maxConflicts: 1000, shouldStop: () => false });
  return conflict === null ? null : sayConflict(conflict, names, (at) => `minute ${at}`);
}

describe('a conflict in words', () => {
  it('names the gaps of a cycle and by how much they miss', () => {
    const sentence = said({
      durations: [1, 1, 1],
      gaps: [
        [0, 1, 50, null],
        [1, 2, 50, null],
        [0, 2, 0, 90],
      ],
      end: 500,
    });
    expect(sentence).toContain('by 10 min');
    expect(sentence).toContain('Stage 1 comes at least 50 min after Stage 0');
    expect(sentence).toContain('Stage 2 follows Stage 0 within 1 h 30 min');
  });

  it('names the stages and the bay that collide', () => {
    const sentence = said({
      durations: [4, 4],
      gaps: [[0, 1, 0, 2]],
      bays: [{ capacity: 1, demands: [1, 1] }],
      end: 40,
    });
    expect(sentence).toMatch(/^Stage 0 and Stage 1 ask together for more of Bay 0 than there is/);
  });

  it('names the chain that comes too late', () => {
    expect(said({ durations: [30, 30], gaps: [[0, 1, 30, null]], end: 50 })).toContain(
      'Stage 1 cannot keep to the end of the planned time, minute 50: from minute 0 on',
    );
  });
});
