import fc from 'fast-check';
import { packLanes } from './lanes';

const extents = fc.array(
  fc
    .tuple(fc.integer({ min: 0, max: 500 }), fc.integer({ min: 0, max: 80 }))
    .map(([from, length]) => ({ from, to: from + length })),
  { maxLength: 60 },
);

describe('lanes', () => {
  it('never lets two extents overlap in one lane', () => {
    fc.assert(
      fc.property(extents, (items) => {
        const { laneOf } = packLanes(items);
        for (let i = 0; i < items.length; i += 1) {
          for (let j = i + 1; j < items.length; j += 1) {
            const overlap = items[i].from < items[j].to && items[j].from < items[i].to;
            if (overlap) expect(laneOf[i]).not.toBe(laneOf[j]);
          }
        }
      }),
    );
  });

  it('takes no more lanes than extents overlap at the busiest point', () => {
    fc.assert(
      fc.property(extents, (items) => {
        // Only what has a length covers a point; an extent of none may fall inside another and still need a lane of its own.
        const wide = items.map(({ from, to }) => ({ from, to: Math.max(to, from + 1) }));
        const busiest = Math.max(
          0,
          ...wide.map(({ from }) => wide.filter((one) => one.from <= from && from < one.to).length),
        );
        expect(packLanes(wide).count).toBe(Math.max(1, busiest));
      }),
    );
  });

  it('has one empty lane for nothing', () => {
    expect(packLanes([])).toEqual({ laneOf: [], count: 1 });
  });
});
