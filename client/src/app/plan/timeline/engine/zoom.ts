import type { HourWidths } from './time-scale';

/** Pixels of one working hour. */
export type Zoom = number;

/** Named zooms, widest first; a name stands in the address bar, anything between them is a number of pixels. */
export const ZOOM_NAMES = ['hours', 'days', 'weeks', 'months'] as const;
export type ZoomName = (typeof ZOOM_NAMES)[number];

export const ZOOM_PX: Readonly<Record<ZoomName, Zoom>> = { hours: 64, days: 17, weeks: 6.5, months: 2.2 };

const NARROWEST = 1;
const WIDEST = 96;
/** A folded night hour beside a working one. */
const FOLD = 0.22;

/** Holds a zoom inside what can be read. */
export function clampZoom(zoom: Zoom): Zoom {
  return Math.min(WIDEST, Math.max(NARROWEST, zoom));
}

/** The name nearest to a zoom, by ratio. */
export function nearestZoomName(zoom: Zoom): ZoomName {
  const apart = (name: ZoomName): number => Math.abs(Math.log(zoom / ZOOM_PX[name]));
  return ZOOM_NAMES.reduce((best, name) => (apart(name) < apart(best) ? name : best));
}

/** Reads a zoom from the address bar: a name, or pixels; null where it is neither. */
export function readZoom(text: string | null | undefined): Zoom | null {
  const named = ZOOM_NAMES.find((name) => name === text);
  if (named) return ZOOM_PX[named];
  const px = Number(text);
  return text && Number.isFinite(px) && px > 0 ? clampZoom(px) : null;
}

/** Writes a zoom for the address bar: its name where it has one. */
export function writeZoom(zoom: Zoom): string {
  return ZOOM_NAMES.find((name) => ZOOM_PX[name] === zoom) ?? zoom.toFixed(1);
}

/** Hour widths at a zoom; nights as wide as days where they are not folded. */
export function hourWidths(zoom: Zoom, nights: 'folded' | 'whole'): HourWidths {
  return { litPx: zoom, unlitPx: nights === 'folded' ? zoom * FOLD : zoom };
}
