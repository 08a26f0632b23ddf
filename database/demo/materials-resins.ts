import { arrhenius, type DemoMaterial, material, NO_LAW, perTenDegrees, USUAL_PRACTICE } from './demo-material';

/**
 * Polyester cures by a redox reaction of 40 to 60 kJ/mol (J. Appl. Polym. Sci. 102:1870, 2006). Field charts of its gel time
 * climb much more steeply in the cold; 2.5 per ten degrees lies between.
 */
const POLYESTER_CURE = arrhenius(50);
const POLYESTER_GEL = perTenDegrees(2.5);

/**
 * From an epoxy gel, recoat and cure chart (scribd.com document 708897795): gel and recoat fit 1.9 per ten degrees, hardness
 * 3.1; the full cure is said to halve at 30 °C (a resin maker's glossary, nilsmalmgren.com/technical/glossary).
 */
const EPOXY_GEL = perTenDegrees(1.9);
const EPOXY_HARDNESS = perTenDegrees(3.1);
const EPOXY_FULL = perTenDegrees(2);
const EPOXY_SHEET = 'Working notes for fast and slow epoxies, glen-l.com/supplies/pxman-exotherm.html';
const EPOXY_FULL_SOURCE = 'Seven days at 20 °C, nilsmalmgren.com/technical/glossary';

/** No numeric table found; doubling from memory. */
const POLYURETHANE = perTenDegrees(2);

/** Laminating, casting and foaming resins. */
export const RESINS: readonly DemoMaterial[] = [
  material(
    'polyester',
    {
      name: 'Polyester laminating resin, peroxide 1–2 %',
      family: 'polyester',
      band: { minimum: 15, maximum: 35 },
      attended: 60,
      note: 'Stays tacky in air. Never quicken it with more peroxide; warm the room instead.',
    },
    [
      ['pot-life', [0.25, 0.4, 0.75], POLYESTER_GEL, 'Resin data sheet, expydoc.com/doc/3735445; usual practice'],
      ['demould', [4, 12, 24], POLYESTER_CURE, USUAL_PRACTICE],
      ['next-layer', [1, 2, 4], POLYESTER_GEL, USUAL_PRACTICE],
      ['next-layer-until', [24, 48, 72], POLYESTER_CURE, USUAL_PRACTICE],
      ['sandable', [8, 16, 24], POLYESTER_CURE, USUAL_PRACTICE],
      ['full-cure', [120, 168, 336], POLYESTER_CURE, USUAL_PRACTICE],
    ],
  ),
  material(
    'gelcoat',
    { name: 'Polyester gelcoat, in the mould', family: 'polyester', band: { minimum: 16, maximum: 27 }, attended: 45 },
    [
      [
        'pot-life',
        [0.17, 0.3, 0.5],
        POLYESTER_GEL,
        'Gelcoat application notes of a composites supplier: 10–17 min at 25 °C',
      ],
      ['next-layer', [0.75, 1.5, 4], POLYESTER_GEL, 'The same notes: glove test at 45–60 min'],
      ['next-layer-until', [12, 24, 48], POLYESTER_CURE, USUAL_PRACTICE],
      ['full-cure', [168, 168, 336], POLYESTER_CURE, USUAL_PRACTICE],
    ],
  ),
  material(
    'flowcoat',
    {
      name: 'Polyester flow coat, waxed',
      family: 'polyester',
      band: { minimum: 15, maximum: 30 },
      attended: 45,
      note: 'Nothing sticks to it once the wax film is set: abrade first.',
    },
    [
      ['pot-life', [0.25, 0.33, 0.5], POLYESTER_GEL, USUAL_PRACTICE],
      ['touch', [1.5, 3, 6], POLYESTER_CURE, USUAL_PRACTICE],
      ['next-layer-until', [1, 1.5, 2], POLYESTER_GEL, USUAL_PRACTICE],
      ['sandable', [12, 24, 48], POLYESTER_CURE, USUAL_PRACTICE],
      ['full-cure', [168, 168, 336], POLYESTER_CURE, USUAL_PRACTICE],
    ],
  ),
  material(
    'epoxy-fast',
    { name: 'Epoxy laminating resin, fast', family: 'epoxy', band: { minimum: 5, maximum: 40 }, attended: 45 },
    [
      ['pot-life', [0.13, 0.17, 0.2], EPOXY_GEL, EPOXY_SHEET],
      ['demould', [8, 12, 24], EPOXY_HARDNESS, EPOXY_SHEET],
      ['next-layer', [2, 3, 4], EPOXY_GEL, USUAL_PRACTICE],
      ['next-layer-until', [8, 12, 24], EPOXY_GEL, 'Then wash and abrade; usual practice'],
      ['sandable', [8, 12, 24], EPOXY_HARDNESS, EPOXY_SHEET],
      ['full-cure', [168, 168, 240], EPOXY_FULL, EPOXY_FULL_SOURCE],
    ],
  ),
  material(
    'epoxy-slow',
    {
      name: 'Epoxy laminating resin, slow',
      family: 'epoxy',
      band: { minimum: 15, maximum: 40 },
      attended: 60,
      note: 'Below 15 °C a thin laminate may be soft after several days.',
    },
    [
      ['pot-life', [0.33, 0.42, 0.5], EPOXY_GEL, EPOXY_SHEET],
      ['demould', [16, 24, 48], EPOXY_HARDNESS, USUAL_PRACTICE],
      ['next-layer', [4, 6, 9], EPOXY_GEL, USUAL_PRACTICE],
      ['next-layer-until', [12, 24, 48], EPOXY_GEL, 'Then wash and abrade; usual practice'],
      ['sandable', [16, 24, 48], EPOXY_HARDNESS, USUAL_PRACTICE],
      ['full-cure', [168, 168, 240], EPOXY_FULL, EPOXY_FULL_SOURCE],
    ],
  ),
  material(
    'pu-casting',
    { name: 'Polyurethane casting resin', family: 'polyurethane', band: { minimum: 18, maximum: 30 }, attended: 15 },
    [
      [
        'pot-life',
        [0.03, 0.1, 0.25],
        POLYURETHANE,
        'davidneat.wordpress.com/materials/casting/polyurethane-resin: sets in 5–15 min',
      ],
      [
        'demould',
        [0.33, 0.42, 1],
        POLYURETHANE,
        'davidneat.wordpress.com/materials/casting/polyurethane-resin: 20–30 min',
      ],
      ['next-layer-until', [2, 4, 6], POLYURETHANE, USUAL_PRACTICE],
      ['sandable', [6, 6, 12], POLYURETHANE, 'University course notes on graded materials: machinable after 6 h'],
      ['full-cure', [24, 72, 168], POLYURETHANE, 'The same course notes: about 7 days'],
    ],
  ),
  material(
    'pu-foam-pour',
    {
      name: 'Rigid polyurethane foam, two-part pour',
      family: 'foam',
      band: { minimum: 15, maximum: 30 },
      attended: 60,
    },
    [
      ['pot-life', [0.05, 0.07, 0.1], POLYURETHANE, 'Pouring guide of a foam maker: reacts in about 4 min'],
      ['demould', [0.25, 0.5, 1], POLYURETHANE, USUAL_PRACTICE],
      ['next-layer', [0.1, 0.25, 0.5], POLYURETHANE, USUAL_PRACTICE],
      ['sandable', [1, 2, 4], POLYURETHANE, 'Ready to carve; usual practice'],
      ['full-cure', [24, 24, 48], POLYURETHANE, USUAL_PRACTICE],
    ],
  ),
  material(
    'pu-foam-one-part',
    {
      name: 'One-part polyurethane foam',
      family: 'foam',
      band: { minimum: 5, maximum: 35 },
      note: 'Needs moisture: mist the joint in a dry room.',
    },
    [
      ['touch', [0.15, 0.2, 0.5], NO_LAW, USUAL_PRACTICE],
      ['next-layer', [0.5, 1, 2], NO_LAW, USUAL_PRACTICE],
      ['sandable', [2, 5, 24], NO_LAW, 'Ready to carve; usual practice'],
      ['full-cure', [12, 24, 48], NO_LAW, USUAL_PRACTICE],
    ],
  ),
];
