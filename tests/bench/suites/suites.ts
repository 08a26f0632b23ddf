import { calibrationSuite } from './calibration-suite';
import { dragSuite } from './drag-suite';
import { forecastSuite } from './forecast-suite';
import { instanceSuite } from './instance-suite';
import { levellingSuite } from './levelling-suite';
import { rescueSuite } from './rescue-suite';
import { studioSuite } from './studio-suite';
import type { Suite } from './suite';

/** Every benchmark by the name that the command line calls it. A new suite is a file beside this one and a line here. */
export const suites: ReadonlyMap<string, Suite> = new Map<string, Suite>([
  [
    'psplib',
    instanceSuite({
      about: 'single projects with renewable resources (sets j30, j60, j120)',
      folder: 'psplib',
      usualSet: 'j30',
      usualBudget: { kind: 'schedules', schedules: 5000 },
    }),
  ],
  [
    'rcpspmax',
    instanceSuite({
      about: 'minimum and maximum gaps (sets j10, j20, ubo10, ubo20, ubo50)',
      folder: 'rcpsp-max',
      usualSet: 'ubo20',
      usualBudget: { kind: 'seconds', seconds: 5 },
    }),
  ],
  [
    'multiproject',
    instanceSuite({
      about: 'portfolios of projects over shared resources (set mplib1-set3)',
      folder: 'multi-project',
      usualSet: 'mplib1-set3',
      usualBudget: { kind: 'seconds', seconds: 30 },
    }),
  ],
  [
    'multiskill',
    instanceSuite({
      about: 'people with several skills (sets set-1a, set-2a)',
      folder: 'multi-skill',
      usualSet: 'set-1a',
      usualBudget: { kind: 'seconds', seconds: 2 },
    }),
  ],
  ['levelling', levellingSuite],
  ['studio', studioSuite],
  ['drag', dragSuite],
  ['forecast', forecastSuite],
  ['calibration', calibrationSuite],
  ['rescue', rescueSuite],
]);
