import { MOST_ROWS } from './csv-table';
import { MOST_TOLD } from './fault-list';
import { read, faults, HEAD } from './testing/reading';

describe('what readStages refuses', () => {
  it.each<[string, string, readonly string[]]>([
    ['an empty file', '', ['1: The file is empty. Its first line names the columns, such as piece, stage, craft.']],
    ['headings alone', HEAD, ['1: There are no stages in the file.']],
    ['a missing column', 'piece,craft\nHead,painting', ['1: The column “stage” is missing.']],
    ['a column twice', `${HEAD},Craft\nHead,Carve,painting,2,,painting`, ['1: The column “craft” is there twice.']],
    [
      'a slip in a heading',
      `piece,stage,crafft\nHead,Carve,painting`,
      ['1: “crafft” is not a column that is known. Is “craft” meant?'],
    ],
    [
      'content without a heading',
      `${HEAD},\nHead,Carve,painting,2,,x`,
      ['2: Column 6 has no heading, but there is something in it.'],
    ],
    [
      'cells too many',
      `${HEAD}\nHead,Carve,painting,2,,,x`,
      [
        '2: There are 7 cells where the first line names 5 columns. A cell with a comma, a semicolon or a line break in it goes between quotation marks.',
      ],
    ],
    [
      'a quotation mark that is never closed',
      `${HEAD}\nHead,Carve,painting,2,\nHead,"Paint,painting,2,\nHead,Wax,painting,2,`,
      ['3: In the row that begins here a quotation mark opens and is never closed.'],
    ],
    [
      'an unknown craft',
      `${HEAD}\nHead,Carve,smithing,2,`,
      ['2: The craft “smithing” is not known. There are: Laminating, Painting, Filling & sanding.'],
    ],
    [
      'a craft with a slip',
      `${HEAD}\nHead,Carve,laminatng,2,`,
      ['2: The craft “laminatng” is not known. Is “Laminating” meant?'],
    ],
    [
      'hours that are none',
      `${HEAD}\nHead,Carve,painting,two,`,
      ['2: The likely hours “two” is not a number such as 2, 2.5 or 2,5.'],
    ],
    [
      'hours that could be two things',
      `${HEAD}\nHead,Carve,painting,"1,500",`,
      [
        '2: The likely hours “1,500” could mean 1500 or 1.500: write it without the comma, or with a point before decimals.',
      ],
    ],
    [
      'hours missing',
      `${HEAD}\nHead,Carve,painting,,`,
      ['2: The likely hours are missing; write 0 if nobody’s hands are needed.'],
    ],
    [
      'hours without a craft',
      `${HEAD}\nHead,Carve,,2,`,
      ['2: Hands-on work needs a craft; without hands, let it run by the clock.'],
    ],
    ['no names', `${HEAD}\n,,painting,2,`, ['2: The piece is missing.', '2: The stage is missing.']],
    [
      'a stage twice',
      `${HEAD}\nHead,Carve,painting,2,\nhead,CARVE,painting,2,`,
      ['3: “Head: CARVE” stands on line 2 already. Give this one another name.'],
    ],
    [
      'an unknown stage',
      `${HEAD}\nHead,Carve,painting,2,\nHead,Paint,painting,2,Carv`,
      ['3: The after “Carv” is not a stage of “Head”. Is “Carve” meant?'],
    ],
    [
      'an unknown piece',
      `${HEAD}\nHead,Carve,painting,2,Tail > Carve`,
      ['2: The after “Tail > Carve” names a piece that is not there. There are: Head.'],
    ],
    [
      'itself',
      `${HEAD}\nHead,Carve,painting,2,Carve`,
      ['2: These stages wait for each other in a circle: “Head: Carve” (line 2) waits for “Head: Carve” (line 2).'],
    ],
    [
      'a circle',
      `${HEAD}\nHead,A,painting,1,C\nHead,B,painting,1,\nHead,C,painting,1,\nHead,D,painting,1,`,
      [
        '2: These stages wait for each other in a circle: “Head: A” (line 2) waits for “Head: C” (line 4) waits for “Head: B” (line 3) waits for “Head: A” (line 2).',
      ],
    ],
    [
      'a fault only once, not again where another row names it',
      `${HEAD}\nHead,Carve,smithing,2,\nHead,Paint,painting,2,Carve`,
      ['2: The craft “smithing” is not known. There are: Laminating, Painting, Filling & sanding.'],
    ],
    [
      'a milestone without a material',
      'piece,stage,likely hours,milestone\nHead,Rest,0,demould',
      ['2: There is a milestone but no material.'],
    ],
    [
      'a material without its milestone',
      'piece,stage,likely hours,material\nHead,Rest,0,polyester laminating',
      ['2: Name the milestone of Polyester laminating that is waited for: demould, next-layer.'],
    ],
    [
      'a window without a dwell',
      'piece,stage,likely hours,window,window hours\nHead,Rest,0,hard,3',
      ['2: There is a window or attended hours, but no dwell.'],
    ],
    [
      'hours out of order',
      'piece,stage,craft,low hours,likely hours\nHead,A,painting,3,2',
      ['2: The low hours can not be more than the likely ones.'],
    ],
    [
      'a day that is none',
      'piece,stage,kind,visit\nHead,A,sign-off,2026-02-30 10:00',
      ['2: The visit “2026-02-30 10:00” is not a day and a time such as 2026-05-04 09:30.'],
    ],
  ])('%s', (_, csv, told) => {
    expect(faults(csv)).toEqual(told);
  });

  it('names the line on which a row begins, whatever its cells hold', () => {
    const csv = `\uFEFF\r\n${HEAD},note\r\n\r\nHead,Carve,painting,2,,"one\r\ntwo\r\n\r\nthree"\r\nHead,Prime,smithing,2,,\r\n`;
    expect(faults(csv)).toEqual([
      '8: The craft “smithing” is not known. There are: Laminating, Painting, Filling & sanding.',
    ]);
  });

  it('a stage that the production has', () => {
    const head = {
      id: 'p1',
      name: 'Head',
      stages: [
        { id: 's1', name: 'Coat' },
        { id: 's2', name: 'Coat' },
      ],
    };
    expect(faults(`${HEAD}\nHead,Coat,painting,1,`, [head])).toEqual([
      '2: “Head: Coat” is in the production already. Give this one another name.',
    ]);
    expect(faults(`${HEAD}\nHead,Wax,painting,1,coat`, [head])).toEqual([
      '2: The after “coat” is the name of 2 stages. Link it by hand after the import.',
    ]);
  });

  it('a place held until its own stage', () => {
    const csv = 'piece,stage,craft,likely hours,bay,hold\nHead,Lay up,laminating,4,Long table,until Lay up';
    expect(faults(csv)).toEqual([
      '2: A place can not be held until its own stage: name the later one that lets it go.',
    ]);
  });
});

describe('size', () => {
  const rows = (count: number, row: (index: number) => string): string =>
    [HEAD, ...Array.from({ length: count }, (_, index) => row(index))].join('\n');

  /** Processor time, so that a busy machine fails nothing; far above what it takes and far below anything quadratic. */
  const MOST_SECONDS = 5;
  const secondsSince = (since: NodeJS.CpuUsage): number => process.cpuUsage(since).user / 1e6;

  it('reads 10,000 rows, in one chain, in seconds', () => {
    const since = process.cpuUsage();
    expect(read(rows(MOST_ROWS, (index) => `Head,Stage ${index},laminating,1,`))).toHaveLength(MOST_ROWS);
    expect(secondsSince(since)).toBeLessThan(MOST_SECONDS);
  });

  it('refuses 10,000 faulty rows in seconds, telling the first and counting the rest', () => {
    const since = process.cpuUsage();
    const told = faults(rows(MOST_ROWS, (index) => `Head,Stage ${index},smithing,x,Nowhere > Stage ${index}`));
    expect(told).toHaveLength(MOST_TOLD + 1);
    expect(told[MOST_TOLD]).toBe(
      `-: There are ${2 * MOST_ROWS - MOST_TOLD} more faults. Mend these first, then try again.`,
    );
    expect(secondsSince(since)).toBeLessThan(MOST_SECONDS);
  });

  it('refuses a circle of 10,000 without losing its breath', () => {
    const [told] = faults(
      rows(MOST_ROWS, (index) => `Head,S${index},laminating,1,${index === 0 ? `S${MOST_ROWS - 1}` : ''}`),
    );
    expect(told).toMatch(/^2: These stages wait for each other in a circle: “Head: S0” \(line 2\) waits for/);
  });

  it('refuses more', () => {
    expect(faults(rows(MOST_ROWS + 1, () => 'Head,A,laminating,1,'))).toEqual([
      '1: The file has 10001 rows, and 10000 can be read at once. Split it.',
    ]);
  });
});
