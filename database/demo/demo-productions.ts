import type { RecipeAmounts } from '@common/domain/recipe';
import type { KeyDateKind } from '@common/domain/key-date';
import type { LocalTime } from '@common/time/local-time';
import type { RECIPES } from './recipes';
import { CAST_BRACKETS, CONCRETE_BASIN, RELIEF, RESIN_CASTS } from './recipes-casts';
import { BACKCLOTH, PAPER_FIGURE, ROSTRUM, UPHOLSTERED } from './recipes-frames';
import { CARVED_SHELL, FLOWN, REFURBISHED } from './recipes-shells';

/** A production as it is planned here: dates as weekdays from today. */
export interface ProductionPlan {
  readonly key: string;
  readonly name: string;
  readonly client: string;
  readonly mark: string;
  readonly hue: number;
  readonly state: 'tentative' | 'committed';
  readonly note: string;
  /** Weekdays before today on which it was entered. */
  readonly enteredAgo: number;
  readonly dates: readonly DatePlan[];
  readonly pieces: readonly PiecePlan[];
}

/** A key date as a weekday from today. */
export interface DatePlan {
  readonly kind: KeyDateKind;
  readonly workday: number;
  readonly time: LocalTime;
  readonly strength: 'hard' | 'wished';
  readonly weight: number;
  /** Keys of pieces; none for all. */
  readonly pieces?: readonly string[];
}

/** A piece: what it is made from, how large, and how far it has come. */
export interface PiecePlan {
  readonly key: string;
  readonly name: string;
  readonly recipe: (typeof RECIPES)[number];
  readonly amounts: RecipeAmounts;
  readonly note?: string;
  /** Stages done, in their order. */
  readonly finished?: number;
  /** Share of the next stage that is still to do, where it has been started. */
  readonly startedLeft?: number;
  /** An agreed visit for the sign-off, as a weekday from today. */
  readonly visit?: { readonly workday: number; readonly time: LocalTime };
  readonly purchases?: readonly PurchasePlan[];
}

/** A bought-in part; days are weekdays from today, absent where it has not come so far. */
export interface PurchasePlan {
  readonly step: string;
  readonly name: string;
  readonly supplier: string;
  readonly leadDays: number;
  readonly ordered?: number;
  readonly due?: number;
  readonly received?: number;
  readonly costMinor: number;
}

const once = (size: number, coats = 1): RecipeAmounts => ({ size, casts: 1, moulds: 0, coats });

const ORCHARD: ProductionPlan = {
  key: 'orchard',
  name: 'The Glass Orchard',
  client: 'saltmarsh',
  mark: 'Go',
  hue: 3,
  state: 'committed',
  note: 'Opera in three acts. The trees are climbed in act two by the chorus, never above the first fork.',
  enteredAgo: 40,
  dates: [
    { kind: 'delivery', workday: 16, time: '17:00', strength: 'wished', weight: 2 },
    { kind: 'technical-rehearsal', workday: 17, time: '14:00', strength: 'hard', weight: 10 },
    { kind: 'opening', workday: 22, time: '19:00', strength: 'hard', weight: 10 },
  ],
  pieces: [
    {
      key: 'old-tree',
      name: 'Old tree',
      recipe: CARVED_SHELL,
      amounts: once(4.5, 2),
      finished: 4,
      visit: { workday: 1, time: '11:00' },
    },
    { key: 'young-tree', name: 'Young tree', recipe: CARVED_SHELL, amounts: once(3, 2), finished: 2, startedLeft: 0.5 },
    {
      key: 'terrace',
      name: 'Terrace',
      recipe: ROSTRUM,
      amounts: once(7, 2),
      finished: 2,
      purchases: [
        {
          step: 'cut',
          name: 'Box section and plate',
          supplier: 'Steel merchant',
          leadDays: 4,
          ordered: -6,
          due: -1,
          received: -1,
          costMinor: 48_500,
        },
        {
          step: 'clad',
          name: 'Birch ply, 18 mm',
          supplier: 'Timber yard',
          leadDays: 3,
          ordered: -2,
          due: 3,
          costMinor: 31_200,
        },
      ],
    },
    {
      key: 'apples',
      name: 'Glass apples',
      recipe: RESIN_CASTS,
      amounts: { size: 1, casts: 6, moulds: 2, coats: 1 },
      finished: 2,
    },
    {
      key: 'gate',
      name: 'Garden gate relief',
      recipe: RELIEF,
      amounts: { size: 1, casts: 2, moulds: 1, coats: 2 },
      finished: 1,
      visit: { workday: 1, time: '11:30' },
    },
    {
      key: 'owl',
      name: 'Feathered owl',
      recipe: UPHOLSTERED,
      amounts: once(0.8),
      finished: 1,
      purchases: [
        {
          step: 'feather',
          name: 'Goose feathers, dyed',
          supplier: 'Feather dealer',
          leadDays: 8,
          ordered: -3,
          due: 5,
          costMinor: 8_800,
        },
      ],
    },
    { key: 'bench', name: 'Orchard bench', recipe: REFURBISHED, amounts: once(2, 2), finished: 5 },
  ],
};

const TIDEWATER: ProductionPlan = {
  key: 'tidewater',
  name: 'Tidewater',
  client: 'tides',
  mark: 'Ti',
  hue: 0,
  state: 'committed',
  note: 'Exhibition on living with the sea. Visitors touch everything below a metre and a half.',
  enteredAgo: 33,
  dates: [
    { kind: 'delivery', workday: 13, time: '12:00', strength: 'wished', weight: 2 },
    { kind: 'fit-up', workday: 14, time: '09:00', strength: 'hard', weight: 8 },
    { kind: 'opening', workday: 18, time: '10:00', strength: 'hard', weight: 10 },
  ],
  pieces: [
    { key: 'jaw', name: 'Whale jaw', recipe: CARVED_SHELL, amounts: once(4, 2), finished: 5, startedLeft: 0.4 },
    {
      key: 'reef',
      name: 'Reef panels',
      recipe: RELIEF,
      amounts: { size: 1.2, casts: 3, moulds: 1, coats: 2 },
      finished: 2,
    },
    {
      key: 'landing',
      name: 'Landing stage',
      recipe: ROSTRUM,
      amounts: once(5, 2),
      finished: 2,
      startedLeft: 0.6,
      purchases: [
        {
          step: 'clad',
          name: 'Larch boards',
          supplier: 'Timber yard',
          leadDays: 5,
          ordered: -1,
          due: 4,
          costMinor: 42_000,
        },
      ],
    },
    {
      key: 'lamps',
      name: 'Lamp brackets',
      recipe: CAST_BRACKETS,
      amounts: { size: 0.8, casts: 4, moulds: 1, coats: 1 },
      finished: 2,
    },
    { key: 'sea', name: 'Winter sea', recipe: BACKCLOTH, amounts: once(3), finished: 2 },
    { key: 'thwart', name: 'Boat thwart', recipe: UPHOLSTERED, amounts: once(0.7), finished: 0 },
    { key: 'figurehead', name: 'Figurehead', recipe: REFURBISHED, amounts: once(3, 3), finished: 6 },
  ],
};

const MOON: ProductionPlan = {
  key: 'moon',
  name: 'The Moon Engine',
  client: 'pellwick',
  mark: 'Me',
  hue: 4,
  state: 'committed',
  note: 'New play, one set. Entered late; the technical rehearsal can not move.',
  enteredAgo: 12,
  dates: [
    { kind: 'rehearsal-loan', workday: 5, time: '10:00', strength: 'wished', weight: 2, pieces: ['seat'] },
    { kind: 'technical-rehearsal', workday: 12, time: '13:00', strength: 'hard', weight: 10 },
    { kind: 'dress-rehearsal', workday: 14, time: '19:00', strength: 'hard', weight: 6 },
    { kind: 'opening', workday: 15, time: '19:30', strength: 'hard', weight: 10 },
  ],
  pieces: [
    { key: 'moon', name: 'Moon', recipe: CARVED_SHELL, amounts: once(4, 2), finished: 3, startedLeft: 0.7 },
    {
      key: 'deck',
      name: 'Engine deck',
      recipe: ROSTRUM,
      amounts: once(5, 2),
      finished: 2,
      purchases: [
        {
          step: 'cut',
          name: 'Profile-cut steel rings',
          supplier: 'Steel cutter',
          leadDays: 6,
          ordered: -5,
          due: 1,
          costMinor: 61_000,
        },
        { step: 'clad', name: 'Castors, braked, 100 mm', supplier: 'Castor dealer', leadDays: 4, costMinor: 18_400 },
      ],
    },
    {
      key: 'gears',
      name: 'Gear brackets',
      recipe: CAST_BRACKETS,
      amounts: { size: 0.8, casts: 8, moulds: 2, coats: 1 },
      finished: 2,
    },
    { key: 'crescent', name: 'Crescent', recipe: FLOWN, amounts: once(2), finished: 2 },
    { key: 'stars', name: 'Star cloth', recipe: BACKCLOTH, amounts: once(3), finished: 1 },
    { key: 'seat', name: 'Pilot’s seat', recipe: UPHOLSTERED, amounts: once(0.8), finished: 2, startedLeft: 0.6 },
  ],
};

const FOUNTAIN: ProductionPlan = {
  key: 'fountain',
  name: 'Winter Fountain',
  client: 'saltmarsh',
  mark: 'Wf',
  hue: 1,
  state: 'committed',
  note: 'Asked for by telephone for the members’ evening. The concrete has to stay wet for seven days.',
  enteredAgo: 2,
  dates: [{ kind: 'delivery', workday: 5, time: '16:00', strength: 'hard', weight: 5 }],
  pieces: [
    { key: 'basin', name: 'Basin', recipe: CONCRETE_BASIN, amounts: once(1.5), finished: 1 },
    { key: 'plinth', name: 'Plinth from stock', recipe: REFURBISHED, amounts: once(1.5, 2) },
  ],
};

const LANTERNS: ProductionPlan = {
  key: 'lanterns',
  name: 'Lantern Walk',
  client: 'tides',
  mark: 'Lw',
  hue: 2,
  state: 'tentative',
  note: 'Quoted, not yet accepted. Carried outdoors after dark.',
  enteredAgo: 4,
  dates: [{ kind: 'delivery', workday: 26, time: '15:00', strength: 'wished', weight: 3 }],
  pieces: [
    { key: 'heron', name: 'Heron', recipe: PAPER_FIGURE, amounts: once(2, 3) },
    { key: 'kite', name: 'Kite fish', recipe: FLOWN, amounts: once(1.5) },
    { key: 'lights', name: 'Hand lanterns', recipe: RESIN_CASTS, amounts: { size: 1, casts: 4, moulds: 2, coats: 1 } },
    { key: 'boat', name: 'Parade boat', recipe: REFURBISHED, amounts: once(4, 3) },
    { key: 'banner', name: 'Long banner', recipe: BACKCLOTH, amounts: once(1) },
  ],
};

/** In order of entry: the latest comes last and is due first. */
export const PRODUCTION_PLANS: readonly ProductionPlan[] = [ORCHARD, TIDEWATER, MOON, LANTERNS, FOUNTAIN];
