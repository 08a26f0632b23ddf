import * as fc from 'fast-check';
import { expandRecipe, type ExpandedRecipe } from './expand-recipe';
import { type RecipeDraft, recipeAmountsFault, recipeFaults, type RecipeStep } from './recipe';
import type { StageDraft } from './stage-draft';
import { stageFaults } from './stage-rules';

const stage = (name: string, given: Partial<StageDraft> = {}): StageDraft => ({
  name,
  kind: 'make',
  handsOn: { lowMinutes: 60, likelyMinutes: 90, highMinutes: 150 },
  crew: [{ craftId: 'casting', least: 1, most: 1 }],
  crewLossPermille: 0,
  continuity: 'shifts',
  places: [],
  dwell: null,
  cautions: [],
  note: '',
  visitAt: null,
  replyMinutes: 0,
  ...given,
});

const step = (name: string, given: Partial<RecipeStep> = {}): RecipeStep => ({
  stage: stage(name),
  after: [],
  each: 'once',
  mould: 'none',
  untilStep: null,
  ...given,
});

const recipe = (...steps: RecipeStep[]): RecipeDraft => ({
  name: 'Test',
  makes: '',
  sizeUnit: 'm²',
  usualSize: 1,
  usualCasts: 1,
  usualMoulds: 0,
  usualCoats: 1,
  steps,
});

const CASTING = recipe(
  step('Pattern'),
  step('Mould', { after: [0], each: 'mould', mould: 'makes' }),
  step('Lay-up', { after: [1], each: 'cast', mould: 'fills', untilStep: 3 }),
  step('Demould', { after: [2], each: 'cast' }),
  step('Assemble', { after: [3] }),
  step('Coat', { after: [4], each: 'coat' }),
  step('Rub down', { after: [5], each: 'coat' }),
  step('Pack', { after: [6] }),
);

const amounts = (given: Partial<Parameters<typeof expandRecipe>[1]> = {}) => ({
  size: 1,
  casts: 3,
  moulds: 2,
  coats: 2,
  ...given,
});

function tell({ stages, links }: ExpandedRecipe): string[] {
  const name = (place: number) =>
    `${stages[place].draft.name}${stages[place].nth === null ? '' : ` ${stages[place].nth}`}`;
  return links.map((link) => `${name(link.from)} > ${name(link.to)}`);
}

describe('expanding a recipe', () => {
  it('lays out casts in their moulds and coats one after another', () => {
    expect(tell(expandRecipe(CASTING, amounts()))).toEqual([
      'Pattern > Mould 1',
      'Pattern > Mould 2',
      'Mould 1 > Lay-up 1',
      'Lay-up 1 > Demould 1',
      'Mould 2 > Lay-up 2',
      'Lay-up 2 > Demould 2',
      'Mould 1 > Lay-up 3',
      'Lay-up 3 > Demould 3',
      'Demould 1 > Assemble',
      'Demould 2 > Assemble',
      'Demould 3 > Assemble',
      'Assemble > Coat 1',
      'Coat 1 > Rub down 1',
      'Rub down 1 > Coat 2',
      'Coat 2 > Rub down 2',
      'Rub down 2 > Pack',
    ]);
  });

  it('has each stage remember which of how many it is, its mould, and who lets go of it', () => {
    const { stages, moulds } = expandRecipe(CASTING, amounts());
    expect(moulds).toBe(2);
    const layUps = stages.filter((one) => one.draft.name === 'Lay-up');
    expect(layUps.map(({ nth, of, mould }) => [nth, of, mould])).toEqual([
      [1, 3, 0],
      [2, 3, 1],
      [3, 3, 0],
    ]);
    layUps.forEach((one) => expect(stages[one.untilStage ?? -1].draft.name).toBe('Demould'));
    layUps.forEach((one) => expect(stages[one.untilStage ?? -1].nth).toBe(one.nth));
  });

  it('says nothing of repeats where there is one', () => {
    const { stages } = expandRecipe(CASTING, amounts({ casts: 1, moulds: 1, coats: 1 }));
    expect(stages.every((one) => one.nth === null && one.of === null)).toBe(true);
  });

  it('scales what is made, in fives rounded up, and nothing else', () => {
    const check = step('Load test', { stage: stage('Load test', { kind: 'check' }), after: [0] });
    const { stages } = expandRecipe(recipe(step('Weld'), check), amounts({ size: 2.3 }));
    expect(stages[0].draft.handsOn).toEqual({ lowMinutes: 140, likelyMinutes: 210, highMinutes: 345 });
    expect(stages[1].draft.handsOn.likelyMinutes).toBe(90);
  });

  it('refuses amounts that it can not make, and faulty recipes', () => {
    expect(recipeAmountsFault(CASTING, amounts({ moulds: 0 }))).toContain('moulds');
    expect(recipeAmountsFault(CASTING, amounts({ size: 0 }))).toContain('how large');
    expect(recipeAmountsFault(CASTING, amounts({ casts: 1.5 }))).toContain('whole');
    expect(() => expandRecipe(CASTING, amounts({ moulds: 0 }))).toThrow(RangeError);
    expect(() => expandRecipe(recipe(step('A', { after: [0] })), amounts())).toThrow('before it');
  });

  it('is a chain without circles that loses no step, whatever the amounts', () => {
    const counts = fc.integer({ min: 1, max: 6 });
    fc.assert(
      fc.property(counts, counts, counts, (casts, moulds, coats) => {
        const { stages, links } = expandRecipe(CASTING, amounts({ casts, moulds, coats }));
        expect(stages).toHaveLength(3 + moulds + 2 * casts + 2 * coats);
        links.forEach((link) => expect(link.from).toBeLessThan(link.to));
        const waitedFor = new Set(links.map((link) => link.from));
        // A mould beyond the casts is made for nothing, and nothing but that and the last stage has no follower.
        const idle = stages.filter((_, place) => !waitedFor.has(place)).map((one) => one.draft.name);
        expect(idle).toEqual([...Array<string>(Math.max(0, moulds - casts)).fill('Mould'), 'Pack']);
      }),
    );
  });
});

describe('faults of a recipe', () => {
  it('are none for a sound one', () => {
    expect(recipeFaults(CASTING)).toEqual([]);
  });

  it.each([
    ['a mould that nothing makes', recipe(step('Fill', { each: 'cast', mould: 'fills' })), 'no step makes one'],
    ['a mould filled once', recipe(step('Fill', { mould: 'fills' })), 'for each cast'],
    ['a mould made once', recipe(step('Make', { mould: 'makes' })), 'for each mould'],
    ['a place kept until an earlier step', recipe(step('A', { untilStep: 0 })), 'until a step after'],
    ['repeats that do not match', recipe(step('A', { untilStep: 1, each: 'cast' }), step('B')), 'repeated alike'],
  ])('are told for %s', (_what, faulty, words) => {
    expect(recipeFaults(faulty).join(' ')).toContain(words);
  });
});

describe('faults of a stage', () => {
  const place = { bayIds: ['booth'], units: 1, hold: 'work', untilStageId: null } as const;
  const dwell = { materialId: 'm', milestone: 'touch', minutes: 60, attendedMinutes: 0, window: null };
  const window = { kind: 'soft', minutes: 30, extraMinutes: 10, costMinor: 0 } as const;

  it('are none for a sound one', () => {
    expect(stageFaults(stage('Lay-up', { places: [place], dwell }))).toEqual([]);
  });

  it.each<[string, Partial<StageDraft>]>([
    ['/handsOn/lowMinutes', { handsOn: { lowMinutes: 5, likelyMinutes: 4, highMinutes: 9 } }],
    ['/handsOn/highMinutes', { handsOn: { lowMinutes: 1, likelyMinutes: 4, highMinutes: 3 } }],
    ['/crew/0/most', { crew: [{ craftId: 'casting', least: 2, most: 1 }] }],
    ['/crew', { crew: [] }],
    ['/continuity', { continuity: 'clock' }],
    ['/places/0/bayIds', { places: [{ ...place, bayIds: [] }] }],
    ['/places/0/untilStageId', { places: [{ ...place, untilStageId: 's' }] }],
    ['/dwell/window/minutes', { dwell: { ...dwell, window } }],
    ['/dwell/milestone', { dwell: { ...dwell, milestone: null } }],
    ['/replyMinutes', { kind: 'sign-off' }],
  ])('are told at %s', (pointer, given) => {
    expect(stageFaults(stage('Lay-up', given)).map((fault) => fault.pointer)).toContain(pointer);
  });
});
