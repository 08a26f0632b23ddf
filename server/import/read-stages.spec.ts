import fc from 'fast-check';
import { MOST_ROWS } from './csv-table';
import { MOST_TOLD } from './fault-list';
import { type ExistingPiece, type PlannedStage, readStages } from './read-stages';
import type { KnownWords } from './row-stage';

const KNOWN: KnownWords = {
  crafts: [
    { id: 'c1', key: 'laminating', name: 'Laminating' },
    { id: 'c2', key: 'painting', name: 'Painting' },
    { id: 'c3', key: 'filling-sanding', name: 'Filling & sanding' },
  ],
  bays: [
    { id: 'b1', name: 'Spray booth' },
    { id: 'b2', name: 'Long table' },
  ],
  materials: [
    {
      id: 'm1',
      name: 'Polyester laminating',
      attendedMinutes: 45,
      milestones: [
        { milestone: 'demould', likelyMinutes: 720 },
        { milestone: 'next-layer', likelyMinutes: 120 },
      ],
    },
  ],
  zone: 'Europe/London',
  currencyDecimals: 2,
};

function read(csv: string, pieces: readonly ExistingPiece[] = []): readonly PlannedStage[] {
  const reading = readStages(csv, KNOWN, pieces);
  if (reading.kind === 'faults')
    throw new Error(reading.faults.map(({ line, detail }) => `${line}: ${detail}`).join('\n'));
  return reading.stages;
}

/** The faults of a file, as "line: sentence". */
function faults(csv: string, pieces: readonly ExistingPiece[] = []): readonly string[] {
  const reading = readStages(csv, KNOWN, pieces);
  return reading.kind === 'faults' ? reading.faults.map(({ line, detail }) => `${line ?? '-'}: ${detail}`) : [];
}

const HEAD = 'piece,stage,craft,likely hours,after';

describe('readStages', () => {
  it('reads every column', () => {
    const [stage] = read(
      [
        'piece;stage;kind;craft;makers least;makers most;craft 2;low hours;likely hours;high hours;crew loss percent;continuity;' +
          'bay;units;hold;material;milestone;attended hours;window;window hours;window extra hours;window cost;cautions;note;reply hours;visit',
        'Head;Lay up;make;Laminating;1;2;painting;3;4,5;6:15 ;7,5;session;' +
          'long table | Spray booth;2;dwell;polyester laminating;Demould;1;soft;24;2;12,50;Wear a mask | No flame;Two coats;48;2026-07-01 09:30',
      ].join('\n'),
    );
    expect(stage).toEqual({
      line: 2,
      pieceName: 'Head',
      draft: {
        name: 'Lay up',
        kind: 'make',
        handsOn: { lowMinutes: 180, likelyMinutes: 270, highMinutes: 375 },
        crew: [
          { craftId: 'c1', least: 1, most: 2 },
          { craftId: 'c2', least: 1, most: 1 },
        ],
        crewLossPermille: 75,
        continuity: 'session',
        dwell: {
          materialId: 'm1',
          milestone: 'demould',
          minutes: 720,
          attendedMinutes: 60,
          window: { kind: 'soft', minutes: 1440, extraMinutes: 120, costMinor: 1250 },
        },
        cautions: ['Wear a mask', 'No flame'],
        note: 'Two coats',
        visitAt: '2026-07-01T08:30:00.000Z',
        replyMinutes: 2880,
      },
      places: [{ bayIds: ['b2', 'b1'], units: 2, hold: 'dwell', until: null }],
      after: { kind: 'above' },
      existingPieceId: null,
      waitsFor: [],
      heldUntil: [null],
    });
  });

  it('lets a row follow the one above it in its piece, nothing, or whatever it names, further down too', () => {
    const stages = read(
      [
        HEAD,
        'Head,Carve,laminating,2,',
        'Base,Weld,painting,1,',
        'Head,Prime,painting,1,',
        'Head,Ears,laminating,1,-',
        'Base,Fit,painting,1,Head > paint | weld',
        'Head,Paint,painting,3,Prime | Ears',
      ].join('\n'),
    );
    const names = stages.map((stage) =>
      stage.waitsFor.map((ref) => (ref.kind === 'new' ? stages[ref.index].draft.name : ref.id)),
    );
    expect(names).toEqual([[], [], ['Carve'], [], ['Paint', 'Weld'], ['Prime', 'Ears']]);
  });

  it('adds to a piece that is there, after its last stage', () => {
    const head = {
      id: 'p1',
      name: 'Head',
      stages: [
        { id: 's1', name: 'Carve' },
        { id: 's2', name: 'Prime' },
      ],
    };
    const [paint, again] = read([HEAD, 'head,Paint,painting,3,', 'head,Wax,painting,1,carve'].join('\n'), [head]);
    expect(paint).toMatchObject({ existingPieceId: 'p1', waitsFor: [{ kind: 'existing', id: 's2' }] });
    expect(again.waitsFor).toEqual([{ kind: 'existing', id: 's1' }]);
  });

  it('finds the stage until which a place is held', () => {
    const csv =
      'piece,stage,craft,likely hours,bay,hold\nHead,Lay up,laminating,4,Long table,until: Demould\nHead,Demould,laminating,1,,';
    expect(read(csv)[0].heldUntil).toEqual([{ kind: 'new', index: 1 }]);
  });

  it('takes the dwell’s own hours before the material’s', () => {
    const csv =
      'piece,stage,likely hours,continuity,dwell hours,material,milestone\nHead,Rest,0,clock,10,Polyester laminating,next layer';
    expect(read(csv)[0].draft.dwell).toMatchObject({
      materialId: 'm1',
      milestone: 'next-layer',
      minutes: 600,
      attendedMinutes: 0,
    });
  });
});

describe('what readStages puts up with', () => {
  it.each([
    ['a byte order mark', `\uFEFF${HEAD}\nHead,Carve,laminating,2,`],
    ['line ends of three kinds', `${HEAD}\r\nHead,Carve,laminating,2,\r\r\n`],
    ['blank lines and blank rows', `\n\n${HEAD}\n\n,,,,\nHead,Carve,laminating,2,\n\n`],
    ['tabs', `${HEAD.replaceAll(',', '\t')}\nHead\tCarve\tlaminating\t2\t`],
    ['a separator line', `sep=;\n${HEAD.replaceAll(',', ';')}\nHead;Carve;laminating;2;`],
    ['headings spelt in their own way', `PIECE, Stage ,"Craft",LIKELY_HOURS,after\nHead,Carve,laminating,2,`],
    ['columns without a heading and without content', `${HEAD},,\nHead,Carve,laminating,2,,,`],
    ['rows that end early', `${HEAD}\nHead,Carve,laminating,2`],
    ['spaces around cells', `${HEAD}\n  Head ,Carve  , laminating,2 ,  `],
    ['hours with their unit', `${HEAD}\nHead,Carve,laminating,2 h,`],
    ['hours as a clock shows them', `${HEAD}\nHead,Carve,laminating,2:00,`],
    ['a local decimal', `${HEAD}\nHead,Carve,laminating,"2,0",`],
  ])('%s', (_, csv) => {
    const [stage] = read(csv);
    expect([stage.pieceName, stage.draft.name, stage.draft.crew[0].craftId, stage.draft.handsOn.likelyMinutes]).toEqual(
      ['Head', 'Carve', 'c1', 120],
    );
  });

  it('an inch mark in a bare cell', () => {
    expect(read(`${HEAD}\nHead,Cut 6" pipe,painting,2,`)[0].draft.name).toBe('Cut 6" pipe');
  });

  it('words of any kind, through any delimiter, quoting and line end', () => {
    const word = fc
      .string({ unit: 'grapheme', minLength: 1, maxLength: 20 })
      .map((text) => text.replace(/[\s"|>\uFEFF]+/g, ' ').trim())
      .filter((text) => text !== '' && !/^sep=/i.test(text));
    const note = fc
      .array(fc.oneof(word, fc.constantFrom('"', ',', ';', '\t', '\n')), { maxLength: 8 })
      .map((parts) => parts.join(' ').trim());
    const row = fc.record({ piece: word, note, minutes: fc.integer({ min: 0, max: 5_000 }) });
    const style = fc.record({
      delimiter: fc.constantFrom(',', ';', '\t'),
      newline: fc.constantFrom('\n', '\r\n', '\r'),
      point: fc.constantFrom('.', ','),
    });
    fc.assert(
      fc.property(fc.array(row, { minLength: 1, maxLength: 12 }), style, (rows, { delimiter, newline, point }) => {
        const quote = (text: string): string => `"${text.replaceAll('"', '""').replaceAll('\n', newline)}"`;
        const lines = rows.map(({ piece, note: text, minutes }, index) =>
          [
            quote(piece),
            `stage ${index}`,
            'laminating',
            quote(
              String(minutes / 60)
                .slice(0, 8)
                .replace('.', point),
            ),
            quote(text),
          ].join(delimiter),
        );
        const head = ['piece', 'stage', 'craft', 'likely hours', 'note'].join(delimiter);
        const stages = read([head, ...lines, ''].join(newline));
        expect(stages.map((stage) => [stage.pieceName, stage.draft.note, stage.draft.handsOn.likelyMinutes])).toEqual(
          rows.map(({ piece, note: text, minutes }) => [piece, text, minutes]),
        );
      }),
    );
  });

  it('nothing at random: any text is read or refused, and never thrown at', () => {
    const fragment = fc.oneof(
      fc.constantFrom('piece', 'stage', ',', ';', '"', '\n', '\r\n', '\t', ' ', '>', '|', 'sep=', '-'),
      fc.string({ maxLength: 5 }),
    );
    fc.assert(
      fc.property(fc.array(fragment, { maxLength: 60 }), (parts) => {
        const reading = readStages(`${HEAD}\n${parts.join('')}`, KNOWN, []);
        expect(reading.kind === 'stages' ? reading.stages.length : reading.faults.length).toBeGreaterThan(0);
      }),
      { numRuns: 500 },
    );
  });
});

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
