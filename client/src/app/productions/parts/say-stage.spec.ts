import type { StageLink } from '@common/contract';
import { BLANK_STAGE } from '../forms/stage-form';
import { sayCrew, sayDwell, sayHandsOn, sayLink, sayPlaces, type StageNames } from './say-stage';

const names: StageNames = {
  craftName: (id) => `craft ${id}`,
  bayName: (id) => `bay ${id}`,
  materialName: (id) => `material ${id}`,
  stageName: (id) => `stage ${id}`,
};
const link: StageLink = {
  id: 'l',
  fromStageId: 'a',
  toStageId: 'b',
  kind: 'finish-start',
  after: 'dwell',
  minGapMinutes: 0,
  maxGapMinutes: null,
  time: 'clock',
};

describe('a stage in words', () => {
  it('names its crew', () => {
    const crew = [
      { craftId: '1', least: 1, most: 1 },
      { craftId: '2', least: 2, most: 3 },
      { craftId: '3', least: 2, most: 2 },
    ];
    expect(sayCrew({ crew }, names)).toBe('craft 1, craft 2 × 2–3, craft 3 × 2');
  });

  it('tells the spread of its hours only where there is one', () => {
    expect(sayHandsOn(BLANK_STAGE)).toBe('2 h (1 h – 4 h)');
    expect(sayHandsOn({ handsOn: { lowMinutes: 60, likelyMinutes: 60, highMinutes: 60 } })).toBe('1 h');
    expect(sayHandsOn({ handsOn: { lowMinutes: 0, likelyMinutes: 0, highMinutes: 0 } })).toBe('');
  });

  it('tells its dwell and window', () => {
    const window = { kind: 'soft' as const, minutes: 4320, extraMinutes: 0, costMinor: 0 };
    const dwell = { materialId: '9', milestone: 'demould', minutes: 1440, attendedMinutes: 0, window };
    expect(sayDwell({ dwell }, names)).toBe('material 9, ready to demould or handle: 1 d; window 3 d');
    expect(sayDwell({ dwell: { ...dwell, materialId: null, milestone: null, window: null } }, names)).toBe(
      'dwell: 1 d',
    );
  });

  it('tells where', () => {
    const places = [{ bayIds: ['1', '2'], units: 2, hold: 'work' as const, untilStageId: null }];
    expect(sayPlaces({ places }, names)).toBe('bay 1 or bay 2 × 2');
  });

  it.each<[Partial<StageLink>, string]>([
    [{}, 'after stage a'],
    [{ after: 'work' }, 'after the work on stage a'],
    [{ kind: 'start-start', minGapMinutes: 120 }, 'once stage a has begun, at least 2 h later'],
    [{ maxGapMinutes: 90, time: 'working' }, 'after stage a, within 1 h 30 min of working time'],
  ])('tells what it waits for', (change, words) => {
    expect(sayLink({ ...link, ...change }, 'p', names)).toBe(words);
  });
});
