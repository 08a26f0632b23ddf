import fc from 'fast-check';
import { type Hold, type HoldEvent, type HoldState, IDLE, type Place, stepHold } from './hold-machine';

const places = fc.record<Place>({
  start: fc.integer({ min: 0, max: 8 }),
  makerIds: fc.option(fc.subarray(['ines', 'tom'])),
  bayIds: fc.option(fc.subarray(['booth', 'bench'])),
});
const holds = fc.record<Hold>({
  stageId: fc.constantFrom('carve', 'paint'),
  rowKey: fc.constantFrom('maker:ines', 'maker:tom'),
  origin: places,
  by: fc.constantFrom('pointer', 'keys'),
});
const events = fc.oneof(
  holds.map((hold): HoldEvent => ({ kind: 'take', hold })),
  places.map((place): HoldEvent => ({ kind: 'aim', place })),
  fc.constantFrom<HoldEvent>({ kind: 'drop' }, { kind: 'escape' }, { kind: 'settle' }),
);

function run(list: readonly HoldEvent[]): HoldState[] {
  const states: HoldState[] = [IDLE];
  for (const event of list) states.push(stepHold(states[states.length - 1], event));
  return states;
}

const origin: Place = { start: 480, makerIds: ['ines'], bayIds: null };
const hold: Hold = { stageId: 'carve', rowKey: 'maker:ines', origin, by: 'pointer' };
const elsewhere: Place = { start: 600, makerIds: ['tom'], bayIds: null };

describe('the hand that holds a stage', () => {
  it('never loses where a stage came from', () => {
    fc.assert(
      fc.property(fc.array(events, { maxLength: 40 }), (list) => {
        const states = run(list);
        for (let i = 1; i < states.length; i += 1) {
          const [before, after] = [states[i - 1], states[i]];
          if (before.kind !== 'idle' && after.kind !== 'idle') expect(after.hold).toBe(before.hold);
        }
      }),
    );
  });

  it('drops nothing after an escape until a stage is taken again', () => {
    fc.assert(
      fc.property(fc.array(events, { maxLength: 40 }), (list) => {
        const states = run(list);
        let escaped = false;
        states.slice(1).forEach((state, index) => {
          if (state.kind === 'escaped') escaped = true;
          if (list[index].kind === 'take' && states[index].kind === 'idle') escaped = false;
          if (escaped) expect(state.kind).not.toBe('dropped');
        });
      }),
    );
  });

  it('drops only what was moved, and where it was last aimed', () => {
    const moved = run([{ kind: 'take', hold }, { kind: 'aim', place: elsewhere }, { kind: 'drop' }]);
    expect(moved.at(-1)).toEqual({ kind: 'dropped', hold, place: elsewhere });
    const back = run([
      { kind: 'take', hold },
      { kind: 'aim', place: elsewhere },
      { kind: 'aim', place: { ...origin } },
      { kind: 'drop' },
    ]);
    expect(back.at(-1)).toEqual(IDLE);
    expect(run([{ kind: 'take', hold }, { kind: 'drop' }]).at(-1)).toEqual(IDLE);
  });

  it('ignores a pointer that still moves after an escape', () => {
    const states = run([
      { kind: 'take', hold },
      { kind: 'aim', place: elsewhere },
      { kind: 'escape' },
      { kind: 'aim', place: { ...elsewhere, start: 700 } },
      { kind: 'drop' },
    ]);
    expect(states[3]).toEqual({ kind: 'escaped', hold });
    expect(states.at(-1)).toEqual(IDLE);
  });

  it('takes makers in any order for the same place', () => {
    const two: Hold = { ...hold, origin: { ...origin, makerIds: ['ines', 'tom'] } };
    const state = run([
      { kind: 'take', hold: two },
      { kind: 'aim', place: { ...origin, makerIds: ['tom', 'ines'] } },
    ]).at(-1);
    expect(state?.kind).toBe('held');
  });
});
