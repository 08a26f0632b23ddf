import { isMark, PRODUCTION_HUES, productionHue, suggestMark } from './production-hue';

type Rgb = readonly [number, number, number];

/** Linear light of a `#RRGGBB`, by the transfer function of IEC 61966-2-1. */
function linear(hex: string): Rgb {
  const part = (from: number) => {
    const value = parseInt(hex.slice(from, from + 2), 16) / 255;
    return value <= 0.04045 ? value / 12.92 : ((value + 0.055) / 1.055) ** 2.4;
  };
  return [part(1), part(3), part(5)];
}

function times(matrix: readonly Rgb[], [r, g, b]: Rgb): Rgb {
  const row = ([x, y, z]: Rgb) => x * r + y * g + z * b;
  return [row(matrix[0]), row(matrix[1]), row(matrix[2])];
}

/** Contrast ratio of WCAG 2.2. */
function contrast(a: string, b: string): number {
  const luminance = (hex: string) =>
    times(
      [
        [0.2126, 0.7152, 0.0722],
        [0, 0, 0],
        [0, 0, 0],
      ],
      linear(hex),
    )[0];
  const [low, high] = [luminance(a), luminance(b)].sort((x, y) => x - y);
  return (high + 0.05) / (low + 0.05);
}

/** OKLab of linear light (Ottosson 2020), clipped to what a screen shows. */
function okLab(rgb: Rgb): Rgb {
  const shown = rgb.map((value) => Math.min(1, Math.max(0, value))) as unknown as Rgb;
  const cones = times(
    [
      [0.4122214708, 0.5363325363, 0.0514459929],
      [0.2119034982, 0.6806995451, 0.1073969566],
      [0.0883024619, 0.2817188376, 0.6299787005],
    ],
    shown,
  ).map(Math.cbrt) as unknown as Rgb;
  return times(
    [
      [0.2104542553, 0.793617785, -0.0040720468],
      [1.9779984951, -2.428592205, 0.4505937099],
      [0.0259040371, 0.7827717662, -0.808675766],
    ],
    cones,
  );
}

/** Machado, Oliveira & Fernandes 2009, severity 1.0. */
const EYES: Readonly<Record<string, readonly Rgb[]>> = {
  normal: [
    [1, 0, 0],
    [0, 1, 0],
    [0, 0, 1],
  ],
  protanope: [
    [0.152286, 1.052583, -0.204868],
    [0.114503, 0.786281, 0.099216],
    [-0.003882, -0.048116, 1.051998],
  ],
  deuteranope: [
    [0.367322, 0.860646, -0.227968],
    [0.280085, 0.672501, 0.047413],
    [-0.01182, 0.04294, 0.968881],
  ],
  tritanope: [
    [1.255528, -0.076749, -0.178779],
    [-0.078411, 0.930809, 0.147602],
    [0.004733, 0.691367, 0.3039],
  ],
};

function leastDistance(colours: readonly string[], eyes: readonly Rgb[]): number {
  const seen = colours.map((hex) => okLab(times(eyes, linear(hex))));
  const distances = seen.flatMap((a, i) =>
    seen.slice(i + 1).map((b) => Math.hypot(a[0] - b[0], a[1] - b[1], a[2] - b[2])),
  );
  return Math.min(...distances);
}

/** Five times the just noticeable difference of about 0.02 in OKLab. Common practice, no source. */
const APART = 0.1;

describe('hues of productions', () => {
  it.each(Object.keys(EYES))('stay apart for a %s eye in both themes', (eye) => {
    expect(
      leastDistance(
        PRODUCTION_HUES.map((hue) => hue.light),
        EYES[eye],
      ),
    ).toBeGreaterThan(APART);
    expect(
      leastDistance(
        PRODUCTION_HUES.map((hue) => hue.dark),
        EYES[eye],
      ),
    ).toBeGreaterThan(APART);
  });

  // WCAG 2.2: 1.4.11 asks 3:1 for what carries meaning, 1.4.3 asks 4.5:1 for text.
  it.each(PRODUCTION_HUES)('$name stands out from the grounds and carries its mark', (hue) => {
    ['#F6F2EA', '#FFFFFF'].forEach((ground) => expect(contrast(hue.light, ground)).toBeGreaterThanOrEqual(3));
    ['#1C1B19', '#262421'].forEach((ground) => expect(contrast(hue.dark, ground)).toBeGreaterThanOrEqual(3));
    expect(contrast(hue.light, hue.onLight)).toBeGreaterThanOrEqual(4.5);
    expect(contrast(hue.dark, hue.onDark)).toBeGreaterThanOrEqual(4.5);
  });

  it('come round again', () => {
    expect(productionHue(12)).toBe(productionHue(2));
    expect(productionHue(-1)).toBe(PRODUCTION_HUES[9]);
  });
});

describe('marks', () => {
  it('are two letters', () => {
    expect(['Mo', 'Éa', 'M', 'Moo', 'M1', ''].map(isMark)).toEqual([true, true, false, false, false, false]);
  });

  it('are suggested from the name and avoid those taken', () => {
    expect(suggestMark('The Glass Orchard', [])).toBe('Tg');
    expect(suggestMark('The Glass Orchard', ['TG'])).toBe('Th');
    expect(suggestMark('Orrery', [])).toBe('Or');
    expect(isMark(suggestMark('1984', []))).toBe(true);
  });
});
