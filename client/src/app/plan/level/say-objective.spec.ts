import { objectiveLines } from './say-objective';

const none = { unplaced: 0, hardLateness: 0, wishedLateness: 0, costMinor: 0, unevenness: 0, changes: 0, finishSum: 0 };
const money = (minor: number) => `£${minor / 100}`;
const line = (lines: ReturnType<typeof objectiveLines>, part: string) => lines.find((one) => one.part === part);

describe('the objective in words', () => {
  const before = { ...none, hardLateness: 180, costMinor: 4500, unevenness: 400 };
  const after = { ...none, costMinor: 6000, unevenness: 300, changes: 4 };
  const lines = objectiveLines(
    before,
    after,
    { hardLateness: 0, unevenness: 240, costMinor: 5000, changes: null },
    money,
  );

  it('says what got better and what it cost', () => {
    expect(line(lines, 'hardLateness')).toMatchObject({ before: '3 h', after: 'none', change: 'better' });
    expect(line(lines, 'costMinor')).toMatchObject({ before: '£45', after: '£60', change: 'worse' });
    expect(line(lines, 'unevenness')).toMatchObject({ before: '100 %', after: '75 %', change: 'better' });
    expect(line(lines, 'wishedLateness')).toMatchObject({ before: 'none', after: 'none', change: 'same' });
  });

  it('claims no more than is proven', () => {
    expect(line(lines, 'hardLateness')?.proven).toBe('proven: no plan does better');
    expect(line(lines, 'unevenness')?.proven).toBe('proven within 20 %');
    expect(line(lines, 'costMinor')?.proven).toBe('proven: not below £50');
    expect(line(lines, 'changes')?.proven).toBe('');
  });
});
