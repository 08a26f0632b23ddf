import type { EntityManager } from 'typeorm';
import { constantClimate, type ClimateHistory } from '@common/dwell/climate';
import { profileHistory, withReadings, type ClimateReading as Reading } from '@common/dwell/climate-profile';
import type { Span } from '@common/time/span';
import { Bay, Climate, ClimateReading, ROOM_PLACE, Studio } from '@database/entities';

/** What is known of the climates of the studio and its bays. */
export interface StudioClimates {
  /** By place: `room`, or a bay's id. */
  readonly rows: ReadonlyMap<string, Climate>;
  /** In order of time. */
  readonly readings: ReadonlyMap<string, readonly Reading[]>;
  /** The course at a place; null for a bay that has the studio's. */
  readonly history: (place: string) => ClimateHistory | null;
}

/** The place of a bay, or of the studio itself. */
export function placeOf(bayId: string | null): string {
  return bayId ?? ROOM_PLACE;
}

/**
 * Reads all climates and lays them out over a frame: a place's profile with its readings on top, a bay's single temperature where it
 * has no profile, the studio's where it has neither. Readings of a bay without either lie on the studio's course.
 */
export async function readClimates(manager: EntityManager, frame: Span): Promise<StudioClimates> {
  const { zone, settings } = await manager.findOneByOrFail(Studio, { single: true });
  const rows = new Map((await manager.find(Climate)).map((row) => [row.place, row]));
  const readings = new Map<string, Reading[]>();
  for (const { place, at, celsius, humidityPercent } of await manager.find(ClimateReading, { order: { at: 'ASC' } })) {
    const list = readings.get(place) ?? [];
    readings.set(place, list);
    list.push({ at, celsius, humidityPercent });
  }
  const bays = new Map((await manager.find(Bay)).map((bay) => [bay.id, bay]));
  const constant = { celsius: settings.roomTemperatureCelsius, humidityPercent: settings.roomHumidityPercent };
  const own = (place: string): ClimateHistory | null => {
    const profile = rows.get(place)?.profile;
    if (profile) return profileHistory(profile, frame, zone);
    if (place === ROOM_PLACE) return constantClimate(constant);
    const bay = bays.get(place);
    if (!bay || (bay.temperatureCelsius === null && bay.humidityPercent === null)) return null;
    return constantClimate({
      celsius: bay.temperatureCelsius ?? constant.celsius,
      humidityPercent: bay.humidityPercent ?? constant.humidityPercent,
    });
  };
  const history = (place: string): ClimateHistory | null => {
    const measured = readings.get(place) ?? [];
    const under = own(place) ?? (measured.length > 0 ? history(ROOM_PLACE) : null);
    return under && withReadings(under, measured);
  };
  return { rows, readings, history };
}
