import { at, demoRecipe, keeping } from './demo-recipe';
import { VARNISH } from './recipes-shells';

/** A deck that people stand on. */
export const ROSTRUM = demoRecipe(
  'rostrum',
  {
    name: 'Welded and clad rostrum',
    makes:
      'A deck that people stand and dance on: checked before it is welded, tested before it is clad, signed before it is used.',
    sizeUnit: 'm² of deck',
    usualSize: 6,
    usualCasts: 1,
    usualMoulds: 0,
    usualCoats: 2,
  },
  [
    { key: 'design', name: 'Draw and calculate', hours: [0.4, 0.6, 1], crew: ['design'], hazards: ['load-bearing'] },
    {
      key: 'design-check',
      name: 'Competent person checks the design',
      kind: 'check',
      hours: [16, 24, 48],
      hazards: ['load-bearing'],
    },
    {
      key: 'cut',
      name: 'Cut the steel',
      hours: [0.3, 0.4, 0.7],
      crew: ['metalwork'],
      places: [at('welding')],
      hazards: ['lifting'],
    },
    {
      key: 'weld',
      name: 'Weld the frame',
      hours: [0.8, 1.2, 1.9],
      crew: [['metalwork', 1, 2]],
      places: [at('welding')],
      hazards: ['welding'],
    },
    {
      key: 'load-test',
      name: 'Load test',
      kind: 'check',
      hours: [2, 3, 4],
      crew: ['metalwork'],
      continuity: 'session',
      hazards: ['load-bearing', 'lifting'],
      note: 'To the load that the checked design names. Write down load, time and who watched.',
    },
    {
      key: 'prime',
      name: 'Prime the steel',
      hours: [0.15, 0.2, 0.3],
      crew: ['painting'],
      continuity: 'session',
      places: [at('booth')],
      dwell: { material: 'red-oxide', milestone: 'next-layer' },
    },
    {
      key: 'clad',
      name: 'Clad in ply',
      hours: [0.6, 0.9, 1.4],
      crew: [['woodwork', 1, 2]],
      dwell: { material: 'pva', milestone: 'demould' },
    },
    {
      key: 'fire',
      name: 'Fire-treat the cladding',
      hours: [0.1, 0.15, 0.25],
      crew: ['painting'],
      dwell: { material: 'fire-treatment', milestone: 'next-layer' },
    },
    {
      key: 'texture',
      name: 'Texture the deck',
      hours: [0.3, 0.5, 0.8],
      crew: ['filling-sanding'],
      dwell: { material: 'water-filler', milestone: 'sandable' },
    },
    {
      key: 'paint',
      name: 'Paint the deck and facings',
      hours: [0.4, 0.6, 1],
      crew: ['painting'],
      dwell: { material: 'scenic-acrylic', milestone: 'next-layer' },
    },
    { ...VARNISH, hours: [0.1, 0.15, 0.2] },
    {
      key: 'release',
      name: 'Competent person releases it for use',
      kind: 'check',
      hours: [8, 16, 24],
      hazards: ['load-bearing'],
    },
  ],
);

/** A frame finished soft. */
export const UPHOLSTERED = demoRecipe(
  'upholstered',
  {
    name: 'Upholstered and feathered',
    makes: 'A seat, a bird, a headdress: a frame padded, covered and finished soft.',
    sizeUnit: 'seat',
    usualSize: 1,
    usualCasts: 1,
    usualMoulds: 0,
    usualCoats: 1,
  },
  [
    {
      key: 'frame',
      name: 'Build the frame',
      hours: [3, 4.5, 7],
      crew: ['woodwork'],
      dwell: { material: 'pva', milestone: 'sandable' },
    },
    {
      key: 'pad',
      name: 'Pad with foam',
      hours: [1.5, 2.5, 4],
      crew: ['soft-finishing'],
      dwell: { material: 'contact-adhesive', milestone: 'sandable' },
    },
    { key: 'cover', name: 'Cut and sew the cover', hours: [3, 4.5, 7], crew: ['soft-finishing'] },
    { key: 'feather', name: 'Set the feathers and trim', hours: [3, 5, 8], crew: ['soft-finishing'] },
    {
      key: 'fire-papers',
      name: 'Fire papers for the cloth',
      kind: 'check',
      hours: [16, 24, 48],
      note: 'Which test the venue asks for is settled with it. The certificates stay with the piece.',
    },
  ],
);

/** A painted cloth. */
export const BACKCLOTH = demoRecipe(
  'backcloth',
  {
    name: 'Painted backcloth',
    makes: 'Cloth sewn, fire-treated, primed and painted flat.',
    sizeUnit: '10 m² of cloth',
    usualSize: 4,
    usualCasts: 1,
    usualMoulds: 0,
    usualCoats: 1,
  },
  [
    { key: 'sew', name: 'Seam and web the cloth', hours: [0.5, 0.8, 1.2], crew: ['soft-finishing'] },
    {
      key: 'fire',
      name: 'Fire-treat the cloth',
      hours: [0.2, 0.3, 0.5],
      crew: ['soft-finishing'],
      dwell: { material: 'fire-treatment', milestone: 'next-layer' },
    },
    {
      key: 'prime',
      name: 'Stretch and prime',
      hours: [0.4, 0.6, 1],
      crew: ['painting'],
      dwell: { material: 'scenic-acrylic', milestone: 'next-layer' },
    },
    { key: 'draw', name: 'Draw up', hours: [0.6, 0.9, 1.5], crew: ['painting'] },
    {
      key: 'lay-in',
      name: 'Lay in',
      hours: [0.8, 1.2, 2],
      crew: [['painting', 1, 2]],
      dwell: { material: 'scenic-acrylic', milestone: 'next-layer' },
    },
    {
      key: 'detail',
      name: 'Paint the detail',
      hours: [1, 1.6, 2.6],
      crew: ['painting'],
      dwell: { material: 'scenic-acrylic', milestone: 'sandable' },
    },
    { key: 'roll', name: 'Roll and tie', hours: [0.1, 0.2, 0.3], crew: ['soft-finishing'], hazards: ['lifting'] },
  ],
);

/** A light figure to be carried. */
export const PAPER_FIGURE = demoRecipe(
  'paper-figure',
  {
    name: 'Papier-mâché figure on a wire armature',
    makes: 'A light figure to be carried: wire, three layers of paper, paint.',
    sizeUnit: 'm² of surface',
    usualSize: 2,
    usualCasts: 1,
    usualMoulds: 0,
    usualCoats: 3,
  },
  [
    {
      key: 'armature',
      name: 'Bend and weld the armature',
      hours: [1, 1.5, 2.4],
      crew: ['metalwork'],
      places: [at('welding')],
      hazards: ['welding'],
    },
    {
      key: 'layer',
      name: 'Lay a layer of paper',
      hours: [0.6, 0.9, 1.4],
      crew: ['soft-finishing'],
      each: 'coat',
      places: [keeping('drying-room')],
      dwell: { material: 'papier-mache', milestone: 'next-layer', window: { extraMinutes: 45, costMinor: 1200 } },
    },
    {
      key: 'sand',
      name: 'Smooth and sand',
      hours: [0.4, 0.6, 1],
      crew: ['filling-sanding'],
      hazards: ['grinding-dust'],
    },
    { key: 'sign-off', name: 'White sign-off', kind: 'sign-off', hours: [0, 0, 0], replyHours: 48 },
    {
      key: 'paint',
      name: 'Paint',
      hours: [0.8, 1.3, 2],
      crew: ['painting'],
      dwell: { material: 'scenic-acrylic', milestone: 'sandable' },
    },
  ],
);
