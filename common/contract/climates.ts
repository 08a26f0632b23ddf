import { z } from 'zod';
import { WEEKDAYS } from '../domain/weekday';
import type { ClimateProfile as Profile } from '../dwell/climate-profile';
import { endpoint, OFFICE, WORKSHOP } from './endpoint';
import { FieldFault } from './problem-details';
import { Id, Instant, MinuteStamp } from './primitives';

const Celsius = z
  .number()
  .min(-30, 'Colder than −30 °C is no workshop.')
  .max(250, 'Hotter than 250 °C is no oven of a workshop.');
const Humidity = z.number().min(0, 'Humidity can’t be below 0 %.').max(100, 'Humidity can’t be above 100 %.');
const MinuteOfDay = z.int().min(0).max(1440);

/** The climate of a place over the seasons and the week; see docs/dwell.md. */
export const ClimateProfile = z.object({
  winterCelsius: Celsius,
  summerCelsius: Celsius,
  winterHumidityPercent: Humidity,
  summerHumidityPercent: Humidity,
  heating: z
    .object({
      days: z.array(z.enum(WEEKDAYS)).min(1, 'Choose the days on which it is heated.').max(7).readonly(),
      fromMinuteOfDay: MinuteOfDay,
      untilMinuteOfDay: MinuteOfDay,
      celsius: Celsius,
    })
    .refine((heating) => heating.fromMinuteOfDay < heating.untilMinuteOfDay, {
      message: 'Heating ends after it begins; for a night, heat until 24:00 and from 0:00.',
      path: ['untilMinuteOfDay'],
    })
    .nullable(),
  setBackCelsius: Celsius.nullable(),
}) satisfies z.ZodType<Profile>;
export type ClimateProfile = z.infer<typeof ClimateProfile>;

/** One place's climate: the whole studio where `bayId` is null. */
export const ClimateView = z.object({
  bayId: Id.nullable(),
  name: z.string(),
  /** Null: a bay has the studio's climate, and the studio the one temperature of its settings. */
  profile: ClimateProfile.nullable(),
  readings: z.object({ count: z.int(), from: Instant, until: Instant }).nullable(),
  /** The coming week as dwells are reckoned with it, in steps that hold until the next. */
  week: z.array(z.object({ from: MinuteStamp, celsius: z.number(), humidityPercent: z.number() })),
  /** 0 before anybody has set it. */
  version: z.int().min(0),
});
export type ClimateView = z.infer<typeof ClimateView>;

const Place = z.object({ bayId: Id.nullable() });

export const ClimateLogResult = z.object({
  readings: z.int(),
  faults: z.array(FieldFault),
  /** Stretches without a reading of more than six hours; the profile stands in for them. */
  gaps: z.array(z.object({ from: Instant, until: Instant })),
  taken: z.boolean(),
});
export type ClimateLogResult = z.infer<typeof ClimateLogResult>;

export const climateEndpoints = {
  listClimates: endpoint({
    method: 'GET',
    path: '/api/climates',
    who: WORKSHOP,
    summary: 'Temperature and humidity of the studio and of each bay',
    response: z.array(ClimateView),
  }),
  changeClimate: endpoint({
    method: 'PUT',
    path: '/api/climates',
    who: OFFICE,
    summary: 'Set the climate of the studio or of a bay, or let it go',
    body: Place.extend({ profile: ClimateProfile.nullable(), version: z.int().min(0) }),
    response: ClimateView,
  }),
  importClimateLog: endpoint({
    method: 'POST',
    path: '/api/climates/log',
    who: OFFICE,
    summary: 'Read a logger’s CSV: all rows or none; new readings replace old ones of the same times',
    body: Place.extend({
      csv: z.string().max(1_500_000, 'The file is longer than 1,500,000 characters. Split it.'),
      mode: z.enum(['try', 'take']),
    }),
    response: ClimateLogResult,
  }),
};
