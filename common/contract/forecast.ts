import { z } from 'zod';
import { endpoint, OFFICE } from './endpoint';
import { Day, Id, Instant, MinuteStamp } from './primitives';

/** Under so many draws a forecast is not shown: its chances would be worth little. */
export const LEAST_DRAWS = 100;

/**
 * What is believed of the studio's times where nobody gave three points; see docs/planning.md, "Forecast". Shares are per mille
 * of what was planned.
 */
export const ForecastSettings = z.object({
  /** How many times the plan is lived through. */
  draws: z
    .int()
    .min(LEAST_DRAWS, `Under ${LEAST_DRAWS} draws the chances are worth little.`)
    .max(5000, 'More than 5,000 draws take long and tell hardly more.'),
  /** `past-hours` lets finished work move the spread of the hours to come; `estimates` believes estimates as they stand. */
  learning: z.enum(['past-hours', 'estimates']),
  dwellLowPermille: z
    .int()
    .min(100, 'No dwell is over in less than a tenth of the likely one.')
    .max(1000, 'The shortest dwell can’t be longer than the likely one, 100 %.'),
  dwellHighPermille: z
    .int()
    .min(1000, 'The longest dwell can’t be shorter than the likely one, 100 %.')
    .max(10_000, 'Ten times the likely dwell is the most.'),
  replyLowPermille: z
    .int()
    .min(0, 'An answer can’t come before it is asked for.')
    .max(1000, 'The soonest answer can’t come after the likely one, 100 %.'),
  replyHighPermille: z
    .int()
    .min(1000, 'The latest answer can’t come before the likely one, 100 %.')
    .max(20_000, 'Twenty times the likely wait is the most.'),
  /** How late a delivery comes at the worst, per mille of its lead time. */
  deliveryLatePermille: z
    .int()
    .min(0, 'Give how late a delivery may come: 0 % or more.')
    .max(5000, 'Five times the lead time is the most.'),
  /** Chance that a maker is away on a day that they should be there. */
  absencePermille: z
    .int()
    .min(0, 'A chance is 0 % or more.')
    .max(300, 'A chance above 30 % is leave: enter it as such.'),
  /** How much a warm or cold week moves all dwells at once: one standard deviation. */
  climateSpreadPermille: z
    .int()
    .min(0, 'A spread is 0 % or more.')
    .max(500, 'Weather that moves dwells by more than half is for the rooms’ own climates.'),
});
export type ForecastSettings = z.infer<typeof ForecastSettings>;

const Share = z.number().min(0).max(1);

/** How many instants a fan is drawn from: the least finish of all draws, the greatest, and every 2.5 per cent between. */
export const FAN_STEPS = 41;
const Fan = z.array(MinuteStamp).length(FAN_STEPS);

const Spread = z.object({ p10: MinuteStamp, p50: MinuteStamp, p80: MinuteStamp, p90: MinuteStamp });

/** One key date as forecast. Finishes are minutes since 1970-01-01T00:00Z; shares and chances run from 0 to 1. */
export const KeyDateForecastView = Spread.extend({
  keyDateId: Id,
  missChance: Share,
  fan: Fan,
  /** Stages by the share of draws in which they are on the driving chain, most often first. */
  drivers: z.array(z.object({ stageId: Id, name: z.string(), share: Share })),
  /** Stages by the rank correlation of their own time with the date, strongest first. */
  correlations: z.array(z.object({ stageId: Id, name: z.string(), rank: z.number().min(-1).max(1) })),
  /** The last forecast of an earlier day; null where there is none. */
  earlier: z.object({ day: Day, missChance: Share, p80: MinuteStamp }).nullable(),
});
export type KeyDateForecastView = z.infer<typeof KeyDateForecastView>;

/** The forecast of the working plan. Key dates of which a part has no place in the plan yet are not in it. */
export const ForecastView = z.object({
  revision: z.int(),
  madeAt: Instant,
  draws: z.int(),
  /** As many as the settings ask for; more than `draws` where it was stopped. */
  drawsAsked: z.int(),
  seed: z.int(),
  /** How the studio runs against its estimates, as it is believed: the middle, per mille, and how many finished stages say so. */
  overrun: z.object({
    learning: ForecastSettings.shape.learning,
    middlePermille: z.int(),
    spreadPermille: z.int(),
    pastStages: z.int(),
  }),
  keyDates: z.array(KeyDateForecastView),
  productions: z.array(z.object({ productionId: Id, fan: Fan })),
  stages: z.array(Spread.extend({ stageId: Id })),
});
export type ForecastView = z.infer<typeof ForecastView>;

/** Planned against actual hours of finished stages, by craft, and what is believed from them. */
export const PastHoursView = z.object({
  stages: z.int(),
  productions: z.int(),
  /** Before any stage was finished, and with them: the middle of actual over expected, and one standard deviation, per mille. */
  prior: z.object({ middlePermille: z.int(), spreadPermille: z.int() }),
  learnt: z.object({ middlePermille: z.int(), spreadPermille: z.int() }),
  crafts: z.array(
    z.object({ craftId: Id, name: z.string(), stages: z.int(), expectedMinutes: z.int(), actualMinutes: z.int() }),
  ),
});
export type PastHoursView = z.infer<typeof PastHoursView>;

export const forecastEndpoints = {
  readForecast: endpoint({
    method: 'GET',
    path: '/api/forecast',
    who: OFFICE,
    summary: 'The spread of every finish and the chance of missing each key date, by simulation of the working plan',
    response: ForecastView,
  }),
  stopForecast: endpoint({
    method: 'POST',
    path: '/api/forecast/stop',
    who: OFFICE,
    summary: 'Stop the forecast that is under way; whoever waits for it is answered from the draws made so far',
  }),
  readPastHours: endpoint({
    method: 'GET',
    path: '/api/past-hours',
    who: OFFICE,
    summary: 'Planned against actual hours of finished stages, and what the forecast learns from them',
    response: PastHoursView,
  }),
};
