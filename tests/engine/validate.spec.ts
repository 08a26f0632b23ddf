import { type Fault, fingerprint, level, type Problem, validate } from '@common/planning';
import { at, link, maker, MON, stage, studio } from './support/small-studio';

/** One fault at a time, and nothing said of a sound problem. Common practice, no source. */
const sound = studio({
  makers: [maker('ana', { carving: 1000 })],
  bays: [{ id: 'booth', capacity: 1, open: null }],
  stages: [
    stage('a', { crew: [{ craftId: 'carving', least: 1, most: 1 }], continuity: 'session' }),
    stage('b'),
    stage('c'),
  ],
  links: [link('a', 'b'), link('b', 'c')],
});
const withB = (changes: Parameters<typeof stage>[1]): Problem => ({
  ...sound,
  stages: sound.stages.map((one) => (one.id === 'b' ? { ...one, ...changes } : one)),
});

const cases: [Fault['kind'], Problem][] = [
  ['duplicate-id', { ...sound, stages: [...sound.stages, stage('a')] }],
  ['unknown-id', { ...sound, links: [link('a', 'ghost')] }],
  ['unknown-id', withB({ places: [{ bayIds: ['nowhere'], units: 1, hold: { kind: 'work' } }] })],
  ['not-an-integer', withB({ effort: { kind: 'duration', minutes: 1.5 } })],
  ['negative-amount', withB({ effort: { kind: 'duration', minutes: -1 } })],
  ['reversed-span', { ...sound, horizon: { start: MON, end: MON - 1 } }],
  [
    'spans-out-of-order',
    {
      ...sound,
      makers: [
        maker(
          'ana',
          { carving: 1000 },
          {
            shifts: [
              { start: at(1, 8), end: at(1, 9) },
              { start: at(0, 8), end: at(0, 9) },
            ],
          },
        ),
      ],
    },
  ],
  ['profile-out-of-order', { ...sound, advances: [{ id: 'cold', from: [5, 5], permille: [1, 2] }] }],
  ['crew-bounds', withB({ crew: [{ craftId: 'carving', least: 2, most: 1 }] })],
  ['craft-nobody-holds', withB({ crew: [{ craftId: 'gilding', least: 1, most: 1 }], continuity: 'session' })],
  ['too-few-hands', withB({ crew: [{ craftId: 'carving', least: 2, most: 2 }], continuity: 'session' })],
  [
    'session-too-long',
    withB({
      crew: [{ craftId: 'carving', least: 1, most: 1 }],
      continuity: 'session',
      effort: { kind: 'duration', minutes: 241 },
    }),
  ],
  ['crew-on-clock', withB({ crew: [{ craftId: 'carving', least: 1, most: 1 }] })],
  ['attended-by-nobody', withB({ dwell: { minutes: 60, advance: {}, attendedMinutes: 30, window: null } })],
  ['no-bay', withB({ places: [{ bayIds: [], units: 1, hold: { kind: 'work' } }] })],
  ['bay-too-small', withB({ places: [{ bayIds: ['booth'], units: 2, hold: { kind: 'work' } }] })],
  [
    'hold-not-let-go',
    withB({ places: [{ bayIds: ['booth'], units: 1, hold: { kind: 'until-stage', stageId: 'a' } }] }),
  ],
  [
    'window-before-dwell',
    withB({ dwell: { minutes: 60, advance: {}, attendedMinutes: 0, window: { kind: 'hard', minutes: 30 } } }),
  ],
  ['gaps-reversed', { ...sound, links: [link('a', 'b', { minGapMinutes: 20, maxGapMinutes: 10 })] }],
  ['link-cycle', { ...sound, links: [...sound.links, link('c', 'a')] }],
  ['link-cycle', { ...sound, links: [...sound.links, link('a', 'c', { kind: 'start-start', maxGapMinutes: 119 })] }],
  [
    'shifts-break-limits',
    {
      ...sound,
      makers: [
        maker('ana', { carving: 1000 }, { limits: { dayMinutes: 400, weekMinutes: 2400, restBetweenMinutes: 660 } }),
      ],
    },
  ],
];

describe('faults of a problem', () => {
  it('are none where it is sound', () => {
    expect(validate(sound)).toEqual([]);
  });

  it.each(cases)('%s', (kind, problem) => {
    expect(validate(problem).map((fault) => fault.kind)).toContain(kind);
  });

  it('name a ring of links stage by stage, and by how much it is too long', () => {
    const [cycle] = validate({ ...sound, links: [...sound.links, link('c', 'a')] });
    expect(cycle.kind === 'link-cycle' && [...cycle.stageIds].sort()).toEqual(['a', 'b', 'c']);
    expect(cycle.kind === 'link-cycle' && cycle.byMinutes).toBe(180);
  });

  it('allow a maximum gap that just fits', () => {
    expect(
      validate({ ...sound, links: [...sound.links, link('a', 'c', { kind: 'start-start', maxGapMinutes: 120 })] }),
    ).toEqual([]);
  });

  it('keep a search from starting only where the problem makes no sense', () => {
    const options = { seed: 1, maxSchedules: 1, shouldStop: () => false };
    expect(() => level({ ...sound, links: [link('a', 'ghost')] }, options)).toThrow('makes no sense');
    const ring = level({ ...sound, links: [...sound.links, link('c', 'a')] }, options);
    expect(ring.unmet.map((one) => one.rule)).toContain('link-cycle');
  });
});

describe('a fingerprint', () => {
  it('changes with any content and with nothing else', () => {
    const same = { ...sound, stages: [...sound.stages].reverse() };
    expect(fingerprint(same)).toBe(fingerprint(sound));
    expect(fingerprint(sound)).toMatch(/^[0-9a-f]{32}$/);
    const others = [
      withB({ crewLossPermille: 1 }),
      { ...sound, freezeUntil: MON + 1 },
      { ...sound, links: sound.links.slice(1) },
    ];
    expect(new Set([sound, ...others].map(fingerprint)).size).toBe(4);
  });
});
