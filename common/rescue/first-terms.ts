import { MEASURE_KINDS } from '../domain/measure-kind';
import type { RescueTerms } from './measure';

/** What a studio begins with; prices in minor units of its currency. Common practice, no source. */
export const FIRST_TERMS: RescueTerms = {
  allowed: MEASURE_KINDS,
  eveningMinutes: 120,
  eveningDays: 14,
  weekendMinutes: 480,
  freelancerDayMinor: 26_000,
  freelancerDays: 5,
  heatCelsius: 24,
  heatHourMinor: 180,
  mouldMinor: 40_000,
  materialMinor: 4_000,
  signOffMinor: 8_000,
  partDeliveryMinor: 30_000,
  laterDayMinor: 25_000,
  laterDays: 21,
  goalPermille: 200,
};
