import { PRODUCTION_HUES } from '@common/domain/production-hue';

/** A part of a hue: itself, the text that stands on it, or a tint that ink is read on. */
export type HuePart = 'fill' | 'on' | 'wash';

/** The CSS colour of a production's hue in the theme of the moment; indices beyond the last hue come round again. */
export function hueColour(hue: number, part: HuePart = 'fill'): string {
  const count = PRODUCTION_HUES.length;
  const index = ((Math.trunc(hue) % count) + count) % count;
  return `var(--hue-${index}${part === 'fill' ? '' : `-${part}`})`;
}

/** Writes the domain's hues on the root element as `--hue-0`, `--hue-0-on`, `--hue-0-wash` and so on, for both themes. */
export function writeHues(root: HTMLElement): void {
  PRODUCTION_HUES.forEach((hue, index) => {
    root.style.setProperty(`--hue-${index}`, `light-dark(${hue.light}, ${hue.dark})`);
    root.style.setProperty(`--hue-${index}-on`, `light-dark(${hue.onLight}, ${hue.onDark})`);
    root.style.setProperty(
      `--hue-${index}-wash`,
      `color-mix(in oklab, light-dark(${hue.light}, ${hue.dark}) 16%, var(--gesso))`,
    );
  });
}
