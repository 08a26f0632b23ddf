import {
  comparePlans,
  drivingChain,
  explain,
  level,
  type Names,
  type Plan,
  type Problem,
  sayChange,
  sayReason,
  sayUnmet,
} from '@common/planning';
import { at, link, maker, stage, startOf, studio } from './support/small-studio';

/** Sentences and chains on studios small enough to reason about by hand. Common practice, no source. */
const names: Names = {
  stage: (id) => id,
  maker: (id) => id,
  bay: (id) => id,
  craft: (id) => id,
  keyDate: (id) => id,
  craftsperson: (id) => (id === 'laminating' ? 'laminator' : `maker for ${id}`),
};
const DAYS = ['Mon', 'Tue', 'Wed', 'Thu', 'Fri', 'Sat', 'Sun'];
const say = (minute: number): string => {
  const date = new Date(minute * 60_000);
  return `${DAYS[(date.getUTCDay() + 6) % 7]} ${date.toISOString().slice(11, 16)}`;
};
const run = (problem: Problem): Plan => level(problem, { seed: 1, maxSchedules: 20, shouldStop: () => false }).plan;
const reasonsOf = (problem: Problem, plan: Plan, id: string): string[] =>
  (explain(problem, plan).find((one) => one.stageId === id)?.reasons ?? []).map((one) => sayReason(one, names, say));
const hands = (craftId: string) => [{ craftId, least: 1, most: 1 }];

describe('reasons in the trade’s words', () => {
  it('names the cure that a stage waits for', () => {
    const problem = studio({
      stages: [
        stage('silicone', { dwell: { minutes: 1510, advance: {}, attendedMinutes: 0, window: null } }),
        stage('demould'),
      ],
      links: [link('silicone', 'demould')],
    });
    expect(reasonsOf(problem, run(problem), 'demould')).toEqual(['waits for silicone to cure until Tue 02:10']);
    expect(reasonsOf(problem, run(problem), 'silicone')).toEqual(['starts as soon as the plan does']);
  });

  it('names what is in the booth', () => {
    const booth = { bayIds: ['booth'], units: 1, hold: { kind: 'work' } } as const;
    const problem = studio({
      bays: [{ id: 'booth', capacity: 1, open: null }],
      stages: [
        stage('coat', { places: [booth], pin: { start: at(0, 0), makerIds: null, bayIds: null } }),
        stage('varnish', { places: [booth] }),
      ],
    });
    const plan = run(problem);
    expect(reasonsOf(problem, plan, 'varnish')[0]).toBe('booth is taken by coat until Mon 01:00');
    expect(reasonsOf(problem, plan, 'coat')).toEqual(['pinned']);
  });

  it('names the shift, and then whose hands are full', () => {
    const problem = studio({
      makers: [maker('ana', { laminating: 1000 })],
      stages: ['a', 'b'].map((id) =>
        stage(id, { crew: hands('laminating'), continuity: 'session', effort: { kind: 'duration', minutes: 180 } }),
      ),
    });
    const plan = run(problem);
    expect(startOf(plan, 'a')).toBe(at(0, 8));
    expect(startOf(plan, 'b')).toBe(at(0, 13));
    expect(reasonsOf(problem, plan, 'a')[0]).toBe('no laminator on shift before Mon 08:00');
    expect(reasonsOf(problem, plan, 'b').slice(0, 2)).toEqual([
      'no laminator on shift before Mon 13:00',
      'no laminator free before Mon 11:00: ana is on a',
    ]);
  });
});

describe('a driving chain', () => {
  const problem = studio({
    makers: [maker('ana', { laminating: 1000 })],
    stages: [
      stage('lay-up', {
        crew: hands('laminating'),
        continuity: 'session',
        dwell: { minutes: 600, advance: {}, attendedMinutes: 0, window: null },
      }),
      stage('other', {
        productionId: 'second',
        crew: hands('laminating'),
        continuity: 'session',
        pin: { start: at(1, 8), makerIds: ['ana'], bayIds: null },
      }),
      stage('trim', { crew: hands('laminating'), continuity: 'session' }),
    ],
    links: [link('lay-up', 'trim')],
    keyDates: [
      { id: 'delivery', productionId: 'production', at: at(2, 12), strength: 'hard', weight: 1, stageIds: ['trim'] },
    ],
  });

  it('crosses into another production where its work stands in the way', () => {
    const chain = drivingChain(problem, run(problem), 'delivery');
    expect(chain.steps.map((step) => [step.stageId, step.because.kind])).toEqual([
      ['trim', 'crew-busy'],
      ['other', 'pinned'],
    ]);
    expect(chain.finish).toBe(at(1, 10));
    expect(chain.marginMinutes).toBe(26 * 60);
  });
});

describe('changes between plans', () => {
  it('are told one by one', () => {
    const before: Plan = {
      placements: [
        {
          stageId: 'a',
          work: [{ start: at(0, 8), end: at(0, 9) }],
          crew: [{ makerId: 'ana', craftId: 'carving' }],
          bayIds: ['booth'],
          dwellEnd: at(0, 9),
        },
        { stageId: 'gone', work: [{ start: at(0, 10), end: at(0, 11) }], crew: [], bayIds: [], dwellEnd: at(0, 11) },
      ],
    };
    const after: Plan = {
      placements: [
        {
          stageId: 'a',
          work: [{ start: at(1, 8), end: at(1, 9) }],
          crew: [{ makerId: 'ben', craftId: 'carving' }],
          bayIds: ['yard'],
          dwellEnd: at(1, 9),
        },
        { stageId: 'new', work: [{ start: at(2, 8), end: at(2, 9) }], crew: [], bayIds: [], dwellEnd: at(2, 9) },
      ],
    };
    expect(comparePlans(before, after).map((change) => sayChange(change, names, say))).toEqual([
      'gone is gone; it was to start Mon 10:00.',
      'a starts later: Tue 08:00 instead of Mon 08:00.',
      'a goes from ana to ben.',
      'a moves from booth to yard.',
      'new is new and starts Wed 08:00.',
    ]);
    expect(comparePlans(after, after)).toEqual([]);
  });
});

describe('broken requirements', () => {
  it('are told with what would mend them', () => {
    const told = sayUnmet(
      {
        rule: 'window',
        stageIds: ['coat 1', 'coat 2'],
        keyDateId: null,
        makerIds: [],
        bayIds: [],
        craftIds: [],
        by: 150,
      },
      names,
      say,
    );
    expect(told).toBe(
      'coat 2 starts 2 h 30 min after the window of coat 1 has closed. Start coat 1 later, or free a maker for coat 2.',
    );
  });
});
