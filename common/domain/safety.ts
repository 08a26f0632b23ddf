/**
 * Reminders for work that can hurt. They inform and decide nothing: the sheet of the product in use, the workshop's own
 * assessment and the law of the place come first. Figures are of Great Britain; a studio edits them for its own country.
 */
export const CAUTION_NOTICE =
  'These are reminders, not advice. The data sheet, your risk assessment and local law decide, and licensed or competent ' +
  'people do what is theirs to do.';

/** What a material of the library is made of, as far as cautions go. */
export const MATERIAL_FAMILIES = [
  'polyester',
  'epoxy',
  'polyurethane',
  'foam',
  'silicone',
  'alginate',
  'gypsum',
  'cement',
  'filler',
  'paint',
  'solvent-coating',
  'adhesive',
  'latex',
  'paper-clay',
  'fire-treatment',
] as const;
export type MaterialFamily = (typeof MATERIAL_FAMILIES)[number];

/**
 * Cautions by family. Sources of the figures: styrene, EH40/2005 as quoted by CLEAPSS (100 ppm over 8 h, 250 ppm over 15 min);
 * peroxide, International Chemical Safety Card 1028; isocyanates, HSE research report RR1199 (0.02 and 0.07 mg/m³ as NCO);
 * silica, EH40/2005 with addendum (0.1 mg/m³); foam exotherm and solvent-wet rags, common practice, no source.
 */
const BY_FAMILY: Readonly<Record<MaterialFamily, readonly string[]>> = {
  polyester: [
    'Styrene vapour: run the extraction and wear the right mask; the British limit is 100 ppm over a shift, 250 ppm over 15 minutes.',
    'Peroxide burns eyes for good: goggles on, eyewash within reach. It never meets accelerator unmixed, and is stored apart.',
    'A mixed pot heats itself. Stand leftovers outside in thin layers until cold; never leave a setting batch alone.',
  ],
  epoxy: [
    'Epoxy and hardener sensitise skin for life: gloves and sleeves, no solvent on skin, change what gets wet.',
    'A full pot runs away hot. Mix small, spread thin, and stay until the peak is past.',
    'Wash and abrade a cured surface before dust or paint: amine film and part-cured dust are harmful.',
  ],
  polyurethane: [
    'Isocyanates are a leading cause of asthma from work: trained people only, with extraction, supplied air where sprayed, and health checks.',
    'Keep wet hands, damp moulds and open pots apart: moisture makes gas and froth.',
  ],
  foam: [
    'A thick pour can smoulder inside hours later. Keep to the lift that the sheet allows, let it cool, stay on site.',
    'Isocyanate vapour while it rises: extraction, mask, nobody unprotected nearby.',
    'Foam burns fast and thick: no heat, no sparks, offcuts out of the room every evening.',
  ],
  silicone: [
    'Curing agents irritate skin and eyes: gloves and goggles while mixing.',
    'Addition-cure rubber stays liquid where sulphur, tin, amine or latex touched it: test a patch first.',
  ],
  alginate: [
    'Powder dust: tip it slowly and wear a mask. Casting from life is for trained hands, never over nose and mouth unattended.',
  ],
  gypsum: [
    'Plaster heats as it sets: never enclose a hand or limb in it.',
    'Dust from mixing and sanding: extraction or a mask. Keep it out of the drains.',
  ],
  cement: [
    'Wet cement burns skin by its alkali, unfelt at first: gloves, boots, wash at once.',
    'Cutting or sanding gives silica dust: wet or with extraction, and a mask; the British limit is 0.1 mg/m³.',
  ],
  filler: ['Hardener paste is a peroxide: eyes. Filler dust: sand with extraction and a mask.'],
  paint: ['Sprayed mist is not harmless for being water-based: booth, mask, and eyes.'],
  'solvent-coating': [
    'Flammable vapour: extraction on, no flame or spark, tins closed.',
    'Rags wet with oil or varnish can light themselves: spread to dry outside or drown in a lidded tin.',
  ],
  adhesive: ['Solvent glue: flammable, heady vapour; extraction on and no flame. Test on foam: some dissolve it.'],
  latex: ['Latex can set off allergy: ask before skin contact. It gives off ammonia: air the room.'],
  'paper-clay': ['Dry clay and filler dust: wet clean-up, no sweeping.'],
  'fire-treatment': [
    'Treat before paint, keep the certificate, and test a sample. Which class is asked for is settled with the venue and its fire authority.',
  ],
};

/** What work is done, as far as cautions go. */
export const HAZARDS = [
  'hot-wire',
  'grinding-dust',
  'welding',
  'lifting',
  'height',
  'compressed-air',
  'load-bearing',
  'flown',
  'moving-parts',
  'oven',
] as const;
export type Hazard = (typeof HAZARDS)[number];

/**
 * Cautions by kind of work. Sources: hot wire, CLEAPSS as above; welding fume, HSE safety alert STSU1-2019; compressed air,
 * 29 CFR 1910.242(b); lifting filter, HSE INDG143 rev. 4; load-bearing scenery, IStructE on demountable structures; the rest
 * common practice, no source.
 */
const BY_HAZARD: Readonly<Record<Hazard, readonly string[]>> = {
  'hot-wire': [
    'Keep the wire below smoking: overheated foam gives off styrene. Ventilate; a bench machine may need extraction.',
  ],
  'grinding-dust': ['Extraction at the tool and a fitted mask. Nobody else in the dust.'],
  welding: [
    'All welding fume can cause cancer, mild steel too: extraction indoors whatever the duration, and a mask for what is left.',
    'Hot work: clear foam and rags, screens up, extinguisher by, and somebody watches for an hour after.',
  ],
  lifting: [
    'Two people or a hoist. As a first filter 25 kg at knuckle height for a man and 16 kg for a woman, close to the body; 15 and 10 kg at arm’s length.',
  ],
  height: [
    'Avoid working at height, else prevent the fall, else soften it. There is no height below which this is not asked.',
  ],
  'compressed-air': ['Never on people. For cleaning below 2 bar with a guarded nozzle, goggles on.'],
  'load-bearing': [
    'People stand on it: a competent person designs, checks and signs before anybody does. Keep the calculation and the load test with the piece.',
  ],
  flown: [
    'Flown over people: rated fittings only, load-tested, inspected by a competent person; the venue’s head of flying decides.',
  ],
  'moving-parts': [
    'Powered movement comes under machinery law: guards, emergency stop, a competent person’s check. Electrical work by those licensed for it.',
  ],
  oven: ['Only what the oven is made for: no solvent-wet pieces, ventilated, watched until at temperature.'],
};

/** The reminders for a material; none for a family that is not on the list, as a studio may name its own. */
export function cautionsForFamily(family: string): readonly string[] {
  return (BY_FAMILY as Readonly<Record<string, readonly string[] | undefined>>)[family] ?? [];
}

/** The reminders for a kind of work. */
export function cautionsForHazard(hazard: Hazard): readonly string[] {
  return BY_HAZARD[hazard];
}
