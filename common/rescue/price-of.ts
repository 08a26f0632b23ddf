import type { StudioSnapshot } from '../planning-input';
import { MINUTES_PER_DAY } from '../time/zone';
import type { Measure, RescueTerms } from './measure';

/**
 * What a measure costs at the most, in minor units: time that is offered counts as if it were worked. A date's price is per day
 * begun.
 */
export function priceOf(measure: Measure, snapshot: StudioSnapshot, terms: RescueTerms): number {
  switch (measure.kind) {
    case 'overtime':
      return overtimePay(snapshot, measure.makerId, measure.minutesADay * workdays(measure.from, measure.until));
    case 'weekend-shift':
      return overtimePay(snapshot, measure.makerId, measure.minutes);
    case 'freelancer':
      return measure.days * terms.freelancerDayMinor;
    case 'heat':
      return Math.ceil(((measure.until - measure.from) / 60) * terms.heatHourMinor);
    case 'second-mould':
      return terms.mouldMinor;
    case 'faster-material':
      return terms.materialMinor;
    case 'earlier-sign-off':
      return terms.signOffMinor;
    case 'part-delivery':
      return terms.partDeliveryMinor;
    case 'later-date':
      return Math.ceil((measure.at - dateOf(snapshot, measure.keyDateId)) / MINUTES_PER_DAY) * terms.laterDayMinor;
  }
}

function overtimePay({ makers, settings }: StudioSnapshot, makerId: string, minutes: number): number {
  const hourCostMinor = makers.find((maker) => maker.id === makerId)?.hourCostMinor ?? 0;
  return Math.ceil(((minutes / 60) * hourCostMinor * settings.overtimePermille) / 1000);
}

/** Days from Monday to Friday in a half-open range. */
function workdays(from: string, until: string): number {
  let days = 0;
  for (
    const day = new Date(`${from}T00:00Z`);
    day < new Date(`${until}T00:00Z`);
    day.setUTCDate(day.getUTCDate() + 1)
  ) {
    if (day.getUTCDay() % 6 !== 0) days += 1;
  }
  return days;
}

function dateOf({ productions }: StudioSnapshot, keyDateId: string): number {
  for (const { keyDates } of productions) {
    const found = keyDates.find((date) => date.id === keyDateId);
    if (found) return found.at;
  }
  return 0;
}
