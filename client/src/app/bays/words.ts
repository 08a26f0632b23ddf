import type { BayView } from '@common/contract';

/** How a bay's kind is written. */
export const BAY_KIND_WORDS: Readonly<Record<BayView['kind'], string>> = {
  booth: 'Spray booth',
  welding: 'Welding bay',
  'hot-wire': 'Hot-wire table',
  table: 'Table',
  oven: 'Oven',
  floor: 'Floor',
  store: 'Store',
  mould: 'Mould',
  other: 'Other',
};

/** "6 × 3 × 2.8 m": inner size; the height only where it is known. */
export function saySize(size: NonNullable<BayView['size']>): string {
  const metres = [size.lengthMm, size.widthMm, size.heightMm]
    .filter((mm) => mm !== null)
    .map((mm) => String(mm / 1000));
  return `${metres.join(' × ')} m`;
}
