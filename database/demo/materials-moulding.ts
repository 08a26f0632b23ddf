import { arrhenius, BY_AIR, type DemoMaterial, material, NO_LAW, perTenDegrees, USUAL_PRACTICE } from './demo-material';

/** No numeric table found: doubling for addition cure and less for condensation, from memory. */
const ADDITION_CURE = perTenDegrees(2);
const CONDENSATION_CURE = perTenDegrees(1.5);

/** ASTM C1074: about 40 to 45 kJ/mol for plain cement, E/R near 5000 K. */
const CEMENT = arrhenius(41.57);

/** What moulds and casts are made of, resins apart. */
export const MOULDING_MATERIALS: readonly DemoMaterial[] = [
  material(
    'silicone-tin',
    {
      name: 'Silicone rubber, tin cure',
      family: 'silicone',
      band: { minimum: 15, maximum: 60 },
      note: 'Some do not cure below 15 °C. Very dry air slows it; never heat it above 70 °C.',
    },
    [
      [
        'pot-life',
        [0.33, 0.75, 1.25],
        CONDENSATION_CURE,
        'kcmouldings.co.uk/html/siliconerubber.html: 45–75 min at 20 °C',
      ],
      [
        'demould',
        [12, 16, 24],
        CONDENSATION_CURE,
        'kcmouldings.co.uk/html/siliconerubber.html; kangdesilicone.com, how long to leave it',
      ],
      ['next-layer', [1, 2, 4], CONDENSATION_CURE, USUAL_PRACTICE],
      ['next-layer-until', [24, 24, 24], CONDENSATION_CURE, USUAL_PRACTICE],
      [
        'full-cure',
        [24, 168, 168],
        CONDENSATION_CURE,
        'Hard after 24 h; alcohol and shrinkage gone after about 7 days',
      ],
    ],
  ),
  material(
    'silicone-addition',
    {
      name: 'Silicone rubber, addition cure',
      family: 'silicone',
      band: { minimum: 15, maximum: 60 },
      note: 'Stays liquid where sulphur, tin, amine or latex touched it.',
    },
    [
      [
        'pot-life',
        [0.08, 0.5, 0.75],
        ADDITION_CURE,
        'davidneat.wordpress.com/materials/mouldmaking/silicone-rubber: 5–40 min',
      ],
      [
        'demould',
        [0.5, 5, 24],
        ADDITION_CURE,
        'davidneat.wordpress.com/materials/mouldmaking/silicone-rubber; kangdesilicone.com',
      ],
      ['next-layer', [0.25, 0.75, 1.5], ADDITION_CURE, USUAL_PRACTICE],
      ['next-layer-until', [24, 24, 24], ADDITION_CURE, USUAL_PRACTICE],
    ],
  ),
  material(
    'alginate',
    {
      name: 'Alginate',
      family: 'alginate',
      band: { minimum: null, maximum: null },
      attended: 30,
      note: 'The water’s warmth sets the pace. Cast within three quarters of an hour or the mould has shrunk.',
    },
    [
      ['pot-life', [0.05, 0.07, 0.1], NO_LAW, 'introsculpture11.blogspot.com 2011/03: about 4 min'],
      ['demould', [0.1, 0.15, 0.25], NO_LAW, USUAL_PRACTICE],
      ['next-layer-until', [0.7, 0.75, 0.8], NO_LAW, 'introsculpture11.blogspot.com 2011/03'],
    ],
  ),
  material(
    'plaster',
    {
      name: 'Gypsum plaster',
      family: 'gypsum',
      band: { minimum: 5, maximum: 45 },
      note: 'Dry it below 49 °C, or it turns to powder.',
    },
    [
      ['pot-life', [0.33, 0.5, 0.75], NO_LAW, 'greenyplace.com, how long plaster takes to harden (weak source)'],
      ['demould', [0.5, 1, 2], NO_LAW, 'Supplier’s questions and answers on fibre-reinforced gypsum: 1–1.5 h'],
      ['sandable', [1, 4, 24], BY_AIR, USUAL_PRACTICE],
      ['full-cure', [24, 72, 168], BY_AIR, 'Drying plaster casts, azmanual.top/manuals/574710; dry in 5–7 days'],
    ],
  ),
  material(
    'acrylic-gypsum',
    {
      name: 'Acrylic-bound gypsum',
      family: 'gypsum',
      band: { minimum: 10, maximum: 35 },
      note: 'Dry it out of the mould, in warm air.',
    },
    [
      ['pot-life', [0.15, 0.25, 0.4], NO_LAW, USUAL_PRACTICE],
      ['demould', [0.5, 0.67, 1.5], NO_LAW, 'finres-sa.com ac100-user-guide: 30–40 min; another says 40–90'],
      ['next-layer', [0.25, 0.5, 1], NO_LAW, USUAL_PRACTICE],
      ['next-layer-until', [24, 24, 24], NO_LAW, USUAL_PRACTICE],
      ['sandable', [1, 4, 24], BY_AIR, USUAL_PRACTICE],
      ['full-cure', [24, 48, 72], BY_AIR, 'finres-sa.com ac100-user-guide: 24 h in air; then it may be sealed'],
    ],
  ),
  material(
    'fibre-concrete',
    {
      name: 'Glass-fibre concrete, without polymer',
      family: 'cement',
      band: { minimum: 5, maximum: 40 },
      attended: 30,
      note: 'Cured wet under cover for seven days; without that it crazes. No fans.',
    },
    [
      ['pot-life', [0.5, 1, 1.5], CEMENT, USUAL_PRACTICE],
      [
        'demould',
        [12, 16, 24],
        CEMENT,
        'reynoldsam.com/curing-procedure-gfrc: 12–16 h from 16 °C; concretelab.co.uk demould-time',
      ],
      ['next-layer-until', [1.5, 2, 2], CEMENT, USUAL_PRACTICE],
      ['sandable', [24, 48, 72], CEMENT, USUAL_PRACTICE],
      ['full-cure', [168, 168, 168], NO_LAW, 'Seven days wet without polymer, whatever the warmth: reynoldsam.com/faq'],
    ],
  ),
  material(
    'latex',
    {
      name: 'Latex, brushed',
      family: 'latex',
      band: { minimum: 10, maximum: 50 },
      note: 'Eight to fourteen coats, each dry before the next.',
    },
    [
      ['next-layer', [1, 3, 24], BY_AIR, 'allexpertarticles.com/en/3/1163: about 3 h a coat; others say a day'],
      ['next-layer-until', [48, 48, 48], NO_LAW, 'While kept clean; usual practice'],
      ['demould', [24, 72, 96], BY_AIR, 'holdenslatex.com/natural-latex-faq: 4 days at room temperature'],
      ['full-cure', [96, 96, 120], BY_AIR, 'holdenslatex.com/natural-latex-faq'],
    ],
  ),
  material(
    'papier-mache',
    {
      name: 'Papier-mâché',
      family: 'paper-clay',
      band: { minimum: 10, maximum: 45 },
      note: 'Moulds if it stays wet for a day: fan and dry air.',
    },
    [
      ['next-layer', [6, 18, 24], BY_AIR, 'revolution-lejeu.fr, papier-mâché (weak source)'],
      ['next-layer-until', [24, 36, 48], NO_LAW, USUAL_PRACTICE],
      ['sandable', [24, 48, 72], BY_AIR, 'eatsip365.com paper-mache-clay: 6 mm in 1–3 days'],
      ['full-cure', [48, 72, 168], BY_AIR, 'Until the weight stays constant; usual practice'],
    ],
  ),
  material(
    'air-dry-clay',
    {
      name: 'Air-drying clay',
      family: 'paper-clay',
      band: { minimum: 5, maximum: 35 },
      note: 'Dry slowly and turn it, or it cracks.',
    },
    [
      ['demould', [24, 36, 48], BY_AIR, 'Questions and answers of a toy shop’s help pages: 1–2 days'],
      ['sandable', [24, 48, 72], BY_AIR, 'recettesmaroc.com air-dry clay: 6–12 mm in 1–3 days (weak source)'],
      ['full-cure', [48, 96, 168], BY_AIR, USUAL_PRACTICE],
    ],
  ),
  material(
    'oven-clay',
    {
      name: 'Oven-hardened polymer clay',
      family: 'paper-clay',
      band: { minimum: null, maximum: null },
      attended: 60,
      note: 'Baked at 110–130 °C; the room says nothing about it.',
    },
    [
      ['full-cure', [0.25, 0.5, 1], NO_LAW, 'For each 6 mm; usual practice'],
      ['sandable', [0.5, 1, 2], NO_LAW, 'When cool; usual practice'],
    ],
  ),
];
