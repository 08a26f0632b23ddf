/** A reading of the clock on the wall, `HH:MM` from `00:00` to `24:00`; the last is the end of the day. */
export type LocalTime = string;

const SHAPE = /^(?:([01]\d|2[0-3]):([0-5]\d)|24:00)$/;

/** Whether `text` is a clock reading such as `08:30`. */
export function isLocalTime(text: string): boolean {
  return SHAPE.test(text);
}

/** Minutes since midnight on the wall: 0 to 1440. */
export function minuteOfDay(time: LocalTime): number {
  if (!isLocalTime(time)) {
    throw new RangeError(`“${time}” is not a clock reading such as 08:30.`);
  }
  const [hours, minutes] = time.split(':').map(Number);
  return hours * 60 + minutes;
}

/** The clock reading so many minutes after midnight; 1440 is written `24:00`. */
export function localTimeOf(minutes: number): LocalTime {
  return `${String(Math.floor(minutes / 60)).padStart(2, '0')}:${String(minutes % 60).padStart(2, '0')}`;
}
