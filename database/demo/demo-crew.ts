import type { CraftKey } from '@common/domain/craft';
import type { MakerPattern } from '@common/planning-input';
import { addDays } from '@common/time/calendar-day';
import { minuteOfDay } from '@common/time/local-time';
import type { DemoCalendar } from './demo-calendar';
import type { DemoClosure, DemoMaker } from './demo-studio-types';

/** Makers have been here a year: fortnights are counted from a Monday so many weeks ago. */
const WEEKS_HERE = 52;

type Crafts = Partial<Record<CraftKey, number>>;

/** The eight makers, each with another week. */
export function demoMakers(calendar: DemoCalendar): readonly DemoMaker[] {
  const { works, allows } = patternsFrom(addDays(calendar.monday, -7 * WEEKS_HERE));
  const evenings = allows('MO,TU,WE,TH', '16:30', '18:30');
  const saturdays = allows('SA', '09:00', '13:00');
  return [
    maker('ines', 'Ines Okereke', 'IO', 2350, { carving: 1150, 'filling-sanding': 1000, design: 900 }, [
      works('MO,TU,WE,TH,FR', '08:30', '16:30'),
      evenings,
    ]),
    maker(
      'tom',
      'Tom Brannock',
      'TB',
      2450,
      { metalwork: 1100, woodwork: 900, 'electrics-pneumatics': 900, transport: 900 },
      [
        // A nine-day fortnight: longer days, and every other Friday off.
        works('MO,TU,WE,TH', '08:00', '16:45'),
        works('FR', '08:00', '16:45', 2),
        saturdays,
      ],
    ),
    {
      ...maker('priya', 'Priya Vennor', 'PV', 2500, { laminating: 1200, moulding: 1100, casting: 1000 }, [
        works('MO,TU,WE,TH', '08:00', '16:30'),
        works('FR', '08:00', '13:00', 2),
        saturdays,
      ]),
      leave: [leave('priya', calendar.workday(8), 1, 'Dentist and school')],
    },
    maker(
      'marek',
      'Marek Hallam',
      'MH',
      2200,
      { laminating: 900, casting: 1100, 'filling-sanding': 1000, carving: 800 },
      [works('MO,TU,WE,TH,FR', '12:00', '20:00')],
    ),
    {
      ...maker('sunniva', 'Sunniva Dale', 'SD', 2400, { painting: 1200, 'soft-finishing': 800, design: 900 }, [
        works('TU,WE,TH', '09:00', '17:00'),
        allows('SA', '09:00', '13:00'),
      ]),
      leave: [leave('sunniva', calendar.workday(23), 4, 'Walking')],
      note: 'Part-time: Tuesday to Thursday.',
    },
    maker('joss', 'Joss Attery', 'JA', 2250, { woodwork: 1100, metalwork: 900, transport: 1000, design: 1000 }, [
      works('MO,TU,WE,TH,FR', '08:30', '16:30'),
      evenings,
    ]),
    {
      ...maker('bea', 'Bea Lindgarth', 'BL', 2150, { 'soft-finishing': 1200, painting: 1000, 'filling-sanding': 900 }, [
        works('MO,TU,WE,FR', '09:00', '17:00'),
      ]),
      note: 'Not on Thursdays.',
    },
    maker(
      'rufus',
      'Rufus Omondo',
      'RO',
      2100,
      { moulding: 1000, casting: 900, 'filling-sanding': 1100, painting: 900 },
      [works('MO,TU,WE,TH,FR', '09:00', '17:00'), saturdays],
    ),
  ];
}

/** A day when nobody works. */
export function demoClosures(calendar: DemoCalendar): readonly DemoClosure[] {
  const day = calendar.workday(21);
  return [{ id: 'closure:training', name: 'First-aid and fire training', days: { from: day, until: addDays(day, 1) } }];
}

function maker(
  key: string,
  name: string,
  initials: string,
  hourCostMinor: number,
  crafts: Crafts,
  patterns: readonly MakerPattern[],
): DemoMaker {
  return {
    id: `maker:${key}`,
    name,
    initials,
    crafts: Object.entries(crafts).map(([craft, pacePermille]) => ({ craftId: `craft:${craft}`, pacePermille })),
    patterns,
    leave: [],
    hourCostMinor,
    dayLimitMinutes: null,
    weekLimitMinutes: null,
    note: '',
  };
}

function leave(key: string, from: string, days: number, note: string): DemoMaker['leave'][number] {
  return { id: `leave:${key}`, days: { from, until: addDays(from, days) }, note };
}

function patternsFrom(firstDay: string) {
  const pattern = (
    kind: MakerPattern['kind'],
    days: string,
    from: string,
    until: string,
    weeks: number,
  ): MakerPattern => ({
    kind,
    firstDay,
    rule: `FREQ=WEEKLY;${weeks === 1 ? '' : `INTERVAL=${weeks};`}BYDAY=${days}`,
    startMinuteOfDay: minuteOfDay(from),
    lengthMinutes: minuteOfDay(until) - minuteOfDay(from),
    exceptDays: [],
  });
  return {
    works: (days: string, from: string, until: string, weeks = 1) => pattern('ordinary', days, from, until, weeks),
    allows: (days: string, from: string, until: string) => pattern('overtime', days, from, until, 1),
  };
}
