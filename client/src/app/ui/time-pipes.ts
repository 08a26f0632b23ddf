import { inject, Pipe, type PipeTransform } from '@angular/core';
import type { DayRange, Instant } from '@common/contract';
import { formatMinutes } from '@common/time/format-instant';
import { sayDay, sayDays, sayHours } from './say-time';
import { STUDIO_CLOCK } from './studio-clock';

function thisYear(now: number): string {
  return String(new Date(now).getFullYear());
}

/** Hands-on minutes as hours: "7 h 30". */
@Pipe({ name: 'hours' })
export class HoursPipe implements PipeTransform {
  transform(minutes: number): string {
    return sayHours(minutes);
  }
}

/** A length of time by the clock: "3 h 20 min", "2 d 4 h". */
@Pipe({ name: 'clockTime' })
export class ClockTimePipe implements PipeTransform {
  transform(minutes: number): string {
    return formatMinutes(minutes);
  }
}

/** A calendar day: "Tue 14 Apr", with its year where that is not this one. */
@Pipe({ name: 'day' })
export class DayPipe implements PipeTransform {
  private readonly clock = inject(STUDIO_CLOCK);

  transform(day: string): string {
    return sayDay(day, thisYear(this.clock.now()));
  }
}

/** A half-open range of calendar days by its first and last day. */
@Pipe({ name: 'days' })
export class DaysPipe implements PipeTransform {
  private readonly clock = inject(STUDIO_CLOCK);

  transform(days: DayRange): string {
    return sayDays(days, thisYear(this.clock.now()));
  }
}

/** The date of an instant in the studio's zone: "Tue 14 Apr". */
@Pipe({ name: 'dateOf', pure: false })
export class DateOfPipe implements PipeTransform {
  private readonly clock = inject(STUDIO_CLOCK);

  transform(instant: Instant): string {
    const day = new Intl.DateTimeFormat('en-CA', { timeZone: this.clock.zone(), dateStyle: 'short' });
    return sayDay(day.format(new Date(instant)), thisYear(this.clock.now()));
  }
}
