import fc from 'fast-check';
import { readStages } from './read-stages';
import { KNOWN, read, HEAD } from './testing/reading';

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
