import { getVtimezoneComponent } from '@touch4it/ical-timezones';
import ICAL from 'ical.js';
import { offsetMinutes } from '@common/time/zone';
import type { Minute } from '@common/time/span';

/**
 * The VTIMEZONE of a zone as lines ending in CRLF, or null where none can be trusted: the table of zones states one rule for
 * all years, so it is compared with this machine's own at every instant that the calendar uses. A calendar without it is
 * written in UTC, which every reader shows right.
 */
export function zoneComponent(zone: string, instants: Iterable<Minute>): string | null {
  const text = getVtimezoneComponent(zone);
  if (!text) {
    return null;
  }
  const lines = text
    .split(/\r?\n/)
    // Where the table came from is not for the reader, and a reader need not be sent to another host.
    .filter((line) => line !== '' && !/^(TZURL|X-LIC-LOCATION):/.test(line));
  // The table answers to some names with another's, and a TZID must be the one that the events name.
  if (!lines.includes(`TZID:${zone}`)) {
    return null;
  }
  const component = `${lines.join('\r\n')}\r\n`;
  return agrees(component, zone, instants) ? component : null;
}

function agrees(component: string, zone: string, instants: Iterable<Minute>): boolean {
  const described = new ICAL.Timezone({
    component: new ICAL.Component(ICAL.parse(component) as unknown[]),
    tzid: zone,
  });
  for (const instant of instants) {
    const offset = offsetMinutes(instant, zone);
    const wall = new Date((instant + offset) * 60_000);
    if (described.utcOffset(ICAL.Time.fromJSDate(wall, true)) !== offset * 60) {
      return false;
    }
  }
  return true;
}
