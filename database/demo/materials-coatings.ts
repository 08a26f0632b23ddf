import { BY_AIR, type DemoMaterial, material, NO_LAW, perTenDegrees, USUAL_PRACTICE } from './demo-material';

/** A solvent primer's own table (idoc.tips, red-oxide primer data sheet, 15 to 35 °C) fits 1.15 to 1.22 per ten degrees. */
const OXIDATIVE = perTenDegrees(1.2);
const PRIMER_SHEET = 'Data sheet at idoc.tips, red-oxide primer; mas-paints.com red-oxide-primer';

/** As a polyester gel, between laboratory and field charts. */
const POLYESTER_FILLER = perTenDegrees(2.5);

/** Fillers, primers, paints, varnishes and glues. */
export const COATINGS: readonly DemoMaterial[] = [
  material(
    'body-filler',
    {
      name: 'Polyester body filler',
      family: 'filler',
      band: { minimum: 15, maximum: 35 },
      note: 'Below 18 °C it takes hours.',
    },
    [
      ['pot-life', [0.05, 0.08, 0.12], POLYESTER_FILLER, USUAL_PRACTICE],
      ['next-layer', [0.5, 0.5, 0.75], POLYESTER_FILLER, USUAL_PRACTICE],
      ['sandable', [0.33, 0.5, 0.75], POLYESTER_FILLER, 'Refinishing notes: doxuchem.com, archiepaint.com 2012/06'],
      ['full-cure', [1, 2, 24], POLYESTER_FILLER, 'Before paint; usual practice'],
    ],
  ),
  material('water-filler', { name: 'Water-based filler', family: 'filler', band: { minimum: 8, maximum: 35 } }, [
    ['pot-life', [0.25, 0.5, 1], BY_AIR, USUAL_PRACTICE],
    ['next-layer', [1, 2, 4], BY_AIR, USUAL_PRACTICE],
    ['sandable', [2, 4, 24], BY_AIR, USUAL_PRACTICE],
    ['full-cure', [24, 48, 96], BY_AIR, USUAL_PRACTICE],
  ]),
  material(
    'red-oxide',
    {
      name: 'Red-oxide primer, solvent',
      family: 'solvent-coating',
      band: { minimum: 10, maximum: 35 },
      note: 'Humidity at most 85 %, and the steel 3 °C above the dew point.',
    },
    [
      ['touch', [4, 6, 8], OXIDATIVE, PRIMER_SHEET],
      ['next-layer', [6, 20, 24], OXIDATIVE, `${PRIMER_SHEET}; bluraychemical.com red-oxide-primer`],
      [
        'next-layer-until',
        [240, 312, 336],
        OXIDATIVE,
        '10 days at 35 °C, 12 at 25 °C, 14 at 15 °C: idoc.tips, red-oxide primer',
      ],
      ['sandable', [16, 20, 24], OXIDATIVE, USUAL_PRACTICE],
      ['full-cure', [168, 168, 240], OXIDATIVE, 'idoc.tips, red-oxide primer'],
    ],
  ),
  material(
    'red-oxide-water',
    { name: 'Red-oxide primer, water-based', family: 'paint', band: { minimum: 10, maximum: 35 } },
    [
      ['touch', [0.5, 0.5, 0.7], BY_AIR, 'Water-based primer sheet, scribd.com document 548465050'],
      ['next-layer', [2, 2, 6], BY_AIR, 'Water-based primer sheet, scribd.com document 548465050'],
      ['sandable', [2, 4, 16], BY_AIR, USUAL_PRACTICE],
      ['full-cure', [168, 168, 240], BY_AIR, USUAL_PRACTICE],
    ],
  ),
  material('scenic-acrylic', { name: 'Acrylic scenic paint', family: 'paint', band: { minimum: 10, maximum: 35 } }, [
    ['touch', [0.5, 1, 2], BY_AIR, USUAL_PRACTICE],
    ['next-layer', [1, 3, 4], BY_AIR, 'Emulsion, touch 1 h and recoat 4 h: widmertime.com acrylic paint drying'],
    ['sandable', [4, 12, 24], BY_AIR, USUAL_PRACTICE],
    ['full-cure', [168, 336, 720], BY_AIR, USUAL_PRACTICE],
  ]),
  material(
    'water-varnish',
    {
      name: 'Water-based varnish',
      family: 'paint',
      band: { minimum: 12, maximum: 35 },
      note: 'Two to four coats; abrade after a day.',
    },
    [
      ['touch', [0.5, 1, 2], BY_AIR, USUAL_PRACTICE],
      ['next-layer', [2, 3, 6], BY_AIR, 'Varnish sheet, scribd.com document 722174884'],
      ['next-layer-until', [24, 24, 24], NO_LAW, 'Then abrade; varnish sheet, scribd.com document 722174884'],
      ['sandable', [3, 6, 24], BY_AIR, USUAL_PRACTICE],
      ['full-cure', [72, 168, 336], BY_AIR, USUAL_PRACTICE],
    ],
  ),
  material(
    'solvent-varnish',
    { name: 'Solvent varnish, oil or polyurethane', family: 'solvent-coating', band: { minimum: 13, maximum: 32 } },
    [
      ['touch', [2, 6, 12], OXIDATIVE, USUAL_PRACTICE],
      ['next-layer', [4, 12, 24], OXIDATIVE, 'Varnish sheet, manualzz.com/doc/53126021'],
      ['next-layer-until', [24, 48, 72], OXIDATIVE, 'Then abrade; usual practice'],
      ['sandable', [12, 24, 48], OXIDATIVE, USUAL_PRACTICE],
      ['full-cure', [168, 336, 720], OXIDATIVE, USUAL_PRACTICE],
    ],
  ),
  material(
    'shellac',
    {
      name: 'Shellac',
      family: 'solvent-coating',
      band: { minimum: 10, maximum: 35 },
      note: 'Blushes in air above 70 % humidity. Each coat melts into the last.',
    },
    [
      ['touch', [0.25, 0.5, 0.75], NO_LAW, 'anyshelter.com, how long shellac takes to dry'],
      ['next-layer', [0.5, 1, 4], NO_LAW, 'engineerfix.com coats-of-shellac; woodworkingstreet.com shellac'],
      ['sandable', [1, 4, 24], NO_LAW, USUAL_PRACTICE],
      ['full-cure', [24, 48, 168], NO_LAW, 'woodrio.com shellac; another says a month'],
    ],
  ),
  material(
    'fire-treatment',
    {
      name: 'Fire-retardant treatment, water-borne',
      family: 'fire-treatment',
      band: { minimum: 10, maximum: 35 },
      note: 'Before any paint or sealer. The certificate takes its own time.',
    },
    [
      [
        'next-layer',
        [4, 12, 24],
        BY_AIR,
        'Before paint: certifiedflameproofing.com scenery; hours from usual practice',
      ],
      ['full-cure', [12, 24, 48], BY_AIR, USUAL_PRACTICE],
    ],
  ),
  material('pva', { name: 'Wood glue, PVA', family: 'adhesive', band: { minimum: 5, maximum: 35 } }, [
    ['pot-life', [0.1, 0.17, 0.25], BY_AIR, USUAL_PRACTICE],
    ['demould', [0.5, 1.25, 2], BY_AIR, 'Clamping time; a curing study found 75 min at least'],
    ['sandable', [2, 4, 24], BY_AIR, 'Ready to machine; usual practice'],
    ['full-cure', [24, 24, 168], BY_AIR, 'Usual practice; a water-resistant type takes a week'],
  ]),
  material(
    'contact-adhesive',
    {
      name: 'Contact adhesive',
      family: 'adhesive',
      band: { minimum: 15, maximum: 35 },
      note: 'The solvent type eats polystyrene foam.',
    },
    [
      ['next-layer', [0.25, 0.4, 1], NO_LAW, 'Flash-off; usual practice. Water-based takes 1–2 h'],
      ['next-layer-until', [1, 2, 4], NO_LAW, USUAL_PRACTICE],
      ['sandable', [1, 1, 2], NO_LAW, USUAL_PRACTICE],
      ['full-cure', [24, 48, 72], NO_LAW, USUAL_PRACTICE],
    ],
  ),
];
