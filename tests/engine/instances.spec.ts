import { readdirSync } from 'node:fs';
import { join } from 'node:path';
import { timedPlan } from '@common/planning/exact/level-exactly';
import { timedModel } from '@common/planning/exact/timed-model';
import { instancePlan } from '../bench/instances/instance-plan';
import { instanceProblem } from '../bench/instances/instance-problem';
import { readDzn } from '../bench/instances/read-dzn';
import { isInstanceFile, readInstance } from '../bench/instances/read-instance';
import { readMplib } from '../bench/instances/read-mplib';
import { readSch } from '../bench/instances/read-sch';
import { readSm } from '../bench/instances/read-sm';
import { validatePlan } from '../bench/instances/validate-plan';
import { sharedInstancesFor } from '../bench/shared-data';

// Four little files made up for these tests, in the published formats.
const sm = `projects : 1
jobs (incl. supersource/sink ):  4
horizon : 5
RESOURCES
  - renewable                 :  1   R
PRECEDENCE RELATIONS:
jobnr.    #modes  #successors   successors
   1        1          2           2   3
   2        1          1           4
   3        1          1           4
   4        1          0
REQUESTS/DURATIONS:
jobnr. mode duration  R 1
--------------------------
  1      1     0       0
  2      1     2       1
  3      1     3       2
  4      1     0       0
RESOURCEAVAILABILITIES:
  R 1
    2
`;
const sch = `2\t1\t0\t0
0\t1\t2\t1\t3\t[0]\t[0]
1\t1\t2\t2\t3\t[4]\t[2]
2\t1\t2\t1\t3\t[-6]\t[3]
3\t1\t0
0\t1\t0\t0
1\t1\t2\t1
2\t1\t3\t1
3\t1\t0\t0
1
`;
const mplib = `2
1
3

3 0
1
0 0 1 1:2
2 3 1 1:3
0 0 1 2:3

3 4
1
0 0 1 2:2
5 1 1 2:3
0 0 0
`;
const dzn = `% made up
nActs = 4;
dur = [0,3,2,0];
nSkills = 2;
sreq = [| 0,0,
  | 1,0,
  | 1,1,
  | 0,0, |];
nResources = 2;
mastery = [| true,false,
  | true,true, |];
nPrecs = 4;
pred = [1,1,2,3];
succ = [2,3,4,4];
`;

describe('instance files', () => {
  it('reads a PSPLIB file with its own numbering', () => {
    const data = readSm('little.sm', sm);
    expect(data.activities.map((activity) => [activity.label, activity.duration, activity.demands])).toEqual([
      ['1', 0, [0]],
      ['2', 2, [1]],
      ['3', 3, [2]],
      ['4', 0, [0]],
    ]);
    expect(data.capacities).toEqual([2]);
    expect(data.arcs).toContainEqual({ from: 2, to: 3, lag: 3 });
  });

  it('reads minimum and maximum lags, also with the line ends of another system', () => {
    const data = readSch('little.sch', sch.replaceAll('\n', '\r\n'));
    expect(data.arcs).toContainEqual({ from: 1, to: 2, lag: 4 });
    expect(data.arcs).toContainEqual({ from: 2, to: 1, lag: -6 });
    const link = instanceProblem(data).links.find((one) => one.fromStageId === 'a1' && one.toStageId === 'a2');
    expect(link).toMatchObject({ kind: 'start-start', minGapMinutes: 4, maxGapMinutes: 6 });
  });

  it('reads several projects with links across them', () => {
    const data = readMplib('little.txt', mplib);
    expect(data.activities.map((activity) => activity.label)).toEqual(['1:1', '1:2', '1:3', '2:1', '2:2', '2:3']);
    expect(data.arcs).toContainEqual({ from: 2, to: 5, lag: 0 });
    expect(data.activities[4].release).toBe(4);
  });

  it('reads skills', () => {
    const data = readDzn('little.dzn', dzn);
    expect(data.skills?.required[2]).toEqual([1, 1]);
    expect(data.skills?.mastery).toEqual([
      [true, false],
      [true, true],
    ]);
    expect(instanceProblem(data).stages[2].crew).toEqual([
      { craftId: 'c0', least: 1, most: 1 },
      { craftId: 'c1', least: 1, most: 1 },
    ]);
  });

  it.each([
    [
      'a word for a number',
      () => readSm('x.sm', sm.replace('2      1     2', '2      1   two')),
      'x.sm, line 16: "two"',
    ],
    ['a missing section', () => readSm('x.sm', sm.replace('RESOURCEAVAILABILITIES:', '')), 'is missing'],
    [
      'a file cut short',
      () => readSch('x.sch', sch.split('\n').slice(0, 6).join('\n')),
      'x.sch, line 6: the file ends',
    ],
    [
      'a successor that is not there',
      () => readSch('x.sch', sch.replace('1\t3\t[0]', '1\t9\t[0]')),
      'line 2: a successor',
    ],
    ['too few lags', () => readSch('x.sch', sch.replace('\t[-6]', '')), 'line 4'],
    ['a project that is not there', () => readMplib('x.txt', mplib.replace('2:3\n\n', '7:1\n\n')), 'x.txt, line 9'],
    ['a ragged table', () => readDzn('x.dzn', dzn.replace('1,1', '1')), 'x.dzn, line 5: "sreq": row 3'],
    ['an item left out', () => readDzn('x.dzn', dzn.replace('nSkills = 2;', '')), '"nSkills": the item is missing'],
    ['an item without end', () => readDzn('x.dzn', dzn.replace('[2,3,4,4];', '[2,3,4,4]')), 'semicolon'],
    ['an ending of another kind', () => readInstance('x.doc'), 'the ending should be'],
    ['a file that is not there', () => readInstance('nowhere.sm'), 'cannot be read'],
  ])('says what is wrong with %s', (_, read, sentence) => {
    expect(read).toThrow(sentence);
  });
});

describe('the validator of the formats', () => {
  const data = readSm('little.sm', sm);
  const valid = { starts: [0, 0, 2, 5], crews: null, makespan: 5 };

  it('has nothing against a valid plan', () => {
    expect(validatePlan(data, valid)).toEqual([]);
  });

  it.each([
    ['an overdrawn resource', { ...valid, starts: [0, 0, 1, 4] }, 'Resource 1 has 3 of 2'],
    ['a broken precedence', { ...valid, starts: [0, 0, 2, 4] }, 'starts less than 3 after'],
    ['a makespan that is too short', { ...valid, makespan: 4 }, 'ends after the stated makespan'],
    ['a fraction', { ...valid, starts: [0, 0.5, 3, 6], makespan: 6 }, 'no whole start'],
  ])('finds %s', (_, plan, sentence) => {
    expect(validatePlan(data, plan).join(' ')).toContain(sentence);
  });

  it('finds a person in two places, without the skill, or missing', () => {
    const skilled = readDzn('little.dzn', dzn);
    const crews = [
      [],
      [[1, 1]],
      [
        [2, 1],
        [1, 2],
      ],
      [],
    ] as const;
    const faults = validatePlan(skilled, { starts: [0, 0, 0, 3], crews, makespan: 3 }).join(' ');
    expect(faults).toContain('Resource 1 lacks skill 2');
    expect(faults).toContain('at once');
    expect(validatePlan(skilled, { starts: [0, 0, 3, 5], crews: [[], [], [], []], makespan: 5 })[0]).toContain(
      '0 of 1',
    );
  });
});

describe('a plan between the two worlds', () => {
  it('keeps starts and crews on the way to the engine and back', () => {
    const data = readDzn('little.dzn', dzn);
    const model = timedModel(instanceProblem(data));
    if (model === null) throw new Error('The instance should be a timed problem.');
    const crews = [
      [],
      [[0, 0]],
      [
        [0, 0],
        [1, 1],
      ],
      [],
    ] as const;
    const plan = timedPlan(model, { starts: [0, 0, 3, 5], crews, makespan: 5 });
    const back = instancePlan(data, plan);
    expect(back).toEqual({
      starts: [0, 0, 3, 5],
      crews: [
        [],
        [[1, 1]],
        [
          [1, 1],
          [2, 2],
        ],
        [],
      ],
      makespan: 5,
    });
  });
});

const shared = sharedInstancesFor('reading published sets');
const sets = [
  ['psplib/j30', 480, 32],
  ['psplib/j60', 480, 62],
  ['psplib/j120', 120, 122],
  ['rcpsp-max/j10', 270, 12],
  ['rcpsp-max/ubo50', 90, 52],
  ['multi-project/mplib1-set3', 51, 24 * 62],
  ['multi-skill/set-1a', 216, 22],
  ['multi-skill/set-2a', 110, null],
] as const;

(shared === null ? describe.skip : describe)('published sets', () => {
  it.each(sets)('%s is read whole', (set, files, activities) => {
    const directory = join(shared ?? '', set);
    const names = readdirSync(directory).filter(isInstanceFile);
    expect(names).toHaveLength(files);
    for (const name of names.slice(0, 60)) {
      const data = readInstance(join(directory, name));
      if (activities !== null) expect(data.activities).toHaveLength(activities);
      expect(instanceProblem(data).stages).toHaveLength(data.activities.length);
    }
  });
});
