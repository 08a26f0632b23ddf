import { at, demoRecipe, keeping, type Step } from './demo-recipe';

/** Coats of water-based varnish; each waits for the last, and a day's delay means rubbing down first. */
export const VARNISH: Step = {
  key: 'varnish',
  name: 'Varnish coat',
  hours: [0.15, 0.2, 0.3],
  crew: ['painting'],
  continuity: 'session',
  places: [keeping('booth')],
  dwell: { material: 'water-varnish', milestone: 'next-layer', window: { extraMinutes: 30, costMinor: 1500 } },
  each: 'coat',
};

const PAINTED: readonly Step[] = [
  {
    key: 'prime',
    name: 'Prime',
    hours: [0.2, 0.3, 0.4],
    crew: ['painting'],
    continuity: 'session',
    places: [keeping('booth')],
    dwell: { material: 'red-oxide-water', milestone: 'next-layer' },
  },
  {
    key: 'base',
    name: 'Lay in the base colours',
    hours: [0.4, 0.6, 1],
    crew: ['painting'],
    dwell: { material: 'scenic-acrylic', milestone: 'next-layer' },
  },
  { key: 'detail', name: 'Paint the detail and break it down', hours: [0.8, 1.2, 2], crew: ['painting'] },
];

/** A large free form. */
export const CARVED_SHELL = demoRecipe(
  'carved-shell',
  {
    name: 'Carved foam under a laminated shell',
    makes: 'A large free form, light and hard: carved in foam, approved as foam, then laminated, filled and painted.',
    sizeUnit: 'm² of surface',
    usualSize: 4,
    usualCasts: 1,
    usualMoulds: 0,
    usualCoats: 2,
  },
  [
    { key: 'template', name: 'Templates and sections', hours: [0.3, 0.5, 0.8], crew: ['design'] },
    {
      key: 'block',
      name: 'Block up and glue the foam',
      hours: [0.3, 0.5, 0.8],
      crew: ['carving'],
      places: [keeping('long-table')],
      dwell: { material: 'pu-foam-one-part', milestone: 'sandable' },
    },
    {
      key: 'wire',
      name: 'Rough out on the hot wire',
      hours: [0.4, 0.6, 1],
      crew: ['carving'],
      places: [at('hot-wire')],
      hazards: ['hot-wire'],
    },
    {
      key: 'carve',
      name: 'Carve the form',
      hours: [1.5, 2.4, 4],
      crew: [['carving', 1, 2]],
      hazards: ['grinding-dust'],
    },
    {
      key: 'sign-off',
      name: 'Foam sign-off',
      kind: 'sign-off',
      hours: [0, 0, 0],
      replyHours: 24,
      note: 'The last cheap moment for a change: after it there is glass on the foam.',
    },
    {
      key: 'seal',
      name: 'Seal the foam',
      hours: [0.2, 0.3, 0.5],
      crew: ['filling-sanding'],
      dwell: { material: 'water-filler', milestone: 'next-layer' },
      note: 'Polyester dissolves polystyrene: no pinhole left.',
    },
    {
      key: 'laminate',
      name: 'Laminate the shell',
      hours: [0.8, 1.2, 1.9],
      crew: [['laminating', 1, 2]],
      continuity: 'session',
      places: [keeping('long-table')],
      dwell: { material: 'polyester', milestone: 'demould' },
      hazards: ['lifting'],
    },
    {
      key: 'fill',
      name: 'Fill and sand',
      hours: [1, 1.5, 2.4],
      crew: [['filling-sanding', 1, 2]],
      dwell: { material: 'body-filler', milestone: 'full-cure' },
      hazards: ['grinding-dust'],
    },
    ...PAINTED,
    VARNISH,
  ],
);

/** A piece that hangs over people. */
export const FLOWN = demoRecipe(
  'flown-piece',
  {
    name: 'Flown piece',
    makes: 'A light piece that hangs over people: engineered points, a slow epoxy skin, a load test and an inspection.',
    sizeUnit: 'm² of surface',
    usualSize: 2,
    usualCasts: 1,
    usualMoulds: 0,
    usualCoats: 1,
  },
  [
    { key: 'design', name: 'Design the points and the frame', hours: [0.8, 1.2, 2], crew: ['design'] },
    {
      key: 'design-check',
      name: 'Competent person checks the design',
      kind: 'check',
      hours: [16, 24, 48],
      hazards: ['flown'],
    },
    {
      key: 'frame',
      name: 'Weld the frame and points',
      hours: [1.5, 2.2, 3.5],
      crew: ['metalwork'],
      places: [at('welding')],
      hazards: ['welding', 'flown'],
    },
    {
      key: 'carve',
      name: 'Carve the core on the frame',
      hours: [1.5, 2.2, 3.5],
      crew: ['carving'],
      after: ['design-check', 'frame'],
      hazards: ['grinding-dust'],
    },
    { key: 'sign-off', name: 'Foam sign-off', kind: 'sign-off', hours: [0, 0, 0], replyHours: 24 },
    {
      key: 'laminate',
      name: 'Laminate in epoxy',
      hours: [1, 1.5, 2.4],
      crew: [['laminating', 1, 2]],
      continuity: 'session',
      places: [keeping('drying-room')],
      dwell: { material: 'epoxy-slow', milestone: 'demould' },
    },
    {
      key: 'load-test',
      name: 'Load test',
      kind: 'check',
      hours: [1.5, 2, 3],
      crew: ['metalwork'],
      continuity: 'session',
      hazards: ['flown', 'lifting'],
      note: 'To the factor that the checked design asks for. Write down load, time and who watched.',
    },
    {
      key: 'fill',
      name: 'Fill and sand',
      hours: [0.8, 1.2, 2],
      crew: ['filling-sanding'],
      dwell: { material: 'body-filler', milestone: 'full-cure' },
      hazards: ['grinding-dust'],
    },
    ...PAINTED,
    { key: 'inspection', name: 'Inspection before it flies', kind: 'check', hours: [8, 16, 24], hazards: ['flown'] },
  ],
);

/** A piece that comes back. */
export const REFURBISHED = demoRecipe(
  'refurbished',
  {
    name: 'Refurbish and varnish',
    makes: 'A piece that comes back from a tour: cleaned, mended, touched in, varnished.',
    sizeUnit: 'm² of surface',
    usualSize: 3,
    usualCasts: 1,
    usualMoulds: 0,
    usualCoats: 3,
  },
  [
    {
      key: 'clean',
      name: 'Clean and abrade',
      hours: [0.3, 0.5, 0.9],
      crew: ['filling-sanding'],
      hazards: ['grinding-dust'],
      note: 'Unknown old paint: test for lead before sanding.',
    },
    {
      key: 'mend',
      name: 'Mend and fill',
      hours: [0.3, 0.6, 1.2],
      crew: ['filling-sanding'],
      dwell: { material: 'body-filler', milestone: 'full-cure' },
    },
    {
      key: 'touch-in',
      name: 'Touch in',
      hours: [0.4, 0.7, 1.2],
      crew: ['painting'],
      dwell: { material: 'scenic-acrylic', milestone: 'next-layer' },
    },
    VARNISH,
  ],
);
