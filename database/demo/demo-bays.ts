import type { DemoBay } from './demo-studio-types';
import type { DemoCalendar } from './demo-calendar';
import type { Pattern } from '@common/time/pattern';
import { minuteOfDay } from '@common/time/local-time';

/** The five bays. The welding bay keeps to hours that the neighbours agreed to. */
export function demoBays(calendar: DemoCalendar): readonly DemoBay[] {
  const open = (days: string, from: string, until: string): Pattern => ({
    firstDay: calendar.monday.replace(/^\d+/, (year) => String(Number(year) - 1)),
    rule: `FREQ=WEEKLY;BYDAY=${days}`,
    startMinuteOfDay: minuteOfDay(from),
    lengthMinutes: minuteOfDay(until) - minuteOfDay(from),
    exceptDays: [],
  });
  return [
    {
      ...bay('booth', 'Spray booth', 'booth', 1),
      temperatureCelsius: 22,
      humidityPercent: 45,
      size: { lengthMm: 6000, widthMm: 4000, heightMm: 3500 },
      note: 'Extraction on before the gun; doors shut for twenty minutes after.',
    },
    {
      ...bay('welding', 'Welding bay', 'welding', 2),
      openings: [open('MO,TU,WE,TH,FR', '08:00', '18:00'), open('SA', '09:00', '13:00')],
    },
    { ...bay('hot-wire', 'Hot-wire table', 'hot-wire', 1), size: { lengthMm: 2400, widthMm: 1200, heightMm: 1200 } },
    {
      ...bay('long-table', 'Long table', 'table', 4),
      temperatureCelsius: 19,
      humidityPercent: 50,
      size: { lengthMm: 9600, widthMm: 1500, heightMm: null },
      note: 'Four lengths of 2.4 m.',
    },
    {
      ...bay('drying-room', 'Drying room', 'oven', 4),
      temperatureCelsius: 32,
      humidityPercent: 30,
      size: { lengthMm: 4000, widthMm: 3000, heightMm: 2400 },
      note: 'Warm and dry day and night. Nothing solvent-wet.',
    },
  ];
}

function bay(key: string, name: string, kind: DemoBay['kind'], capacity: number): DemoBay {
  return {
    id: `bay:${key}`,
    name,
    kind,
    capacity,
    pieceId: null,
    temperatureCelsius: null,
    humidityPercent: null,
    size: null,
    openings: [],
    note: '',
  };
}
