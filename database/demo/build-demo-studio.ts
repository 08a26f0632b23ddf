import { CRAFTS } from '@common/domain/craft';
import type { CalendarDay } from '@common/time/span';
import { demoBays } from './demo-bays';
import { type DemoCalendar, demoCalendar, DEMO_ZONE } from './demo-calendar';
import { demoClosures, demoMakers } from './demo-crew';
import { joinParts, pieceId, productionPieces } from './demo-pieces';
import { PRODUCTION_PLANS, type ProductionPlan } from './demo-productions';
import type { DemoAccount, DemoClient, DemoProduction, DemoSettings, DemoStudio } from './demo-studio-types';
import { MATERIALS } from './materials';
import { RECIPES } from './recipes';

const SETTINGS: DemoSettings = {
  changePenaltyMinor: 500,
  unevennessWeight: 1,
  earlinessWeight: 1,
  freezeMinutes: 24 * 60,
  restBetweenMinutes: 11 * 60,
  dayLimitMinutes: 10 * 60,
  weekLimitMinutes: 48 * 60,
  overtimePermille: 1500,
  roomTemperatureCelsius: 18,
  roomHumidityPercent: 55,
};

const CLIENTS: readonly DemoClient[] = [
  { id: 'client:saltmarsh', name: 'Saltmarsh Opera' },
  { id: 'client:tides', name: 'Museum of Tides' },
  { id: 'client:pellwick', name: 'Pellwick Playhouse' },
];

const ACCOUNTS: readonly DemoAccount[] = [
  account('owner', 'Wren Castellow', 'owner'),
  account('manager', 'Hal Ostrey', 'manager'),
  { ...account('ines', 'Ines Okereke', 'maker'), makerId: 'maker:ines' },
  { ...account('priya', 'Priya Vennor', 'maker'), makerId: 'maker:priya' },
  { ...account('tom', 'Tom Brannock', 'maker'), makerId: 'maker:tom' },
  { ...account('pellwick', 'Edda Marshal', 'client'), clientId: 'client:pellwick' },
  { ...account('saltmarsh', 'Cosmo Vaile', 'client'), clientId: 'client:saltmarsh' },
];

/**
 * The demo studio as it stands on `today`: three productions that meet in one week, two smaller ones, work behind and work
 * ahead. The same day gives the same studio; another day the same work at other dates.
 */
export function buildDemoStudio(today: CalendarDay): DemoStudio {
  const calendar = demoCalendar(today);
  const makers = demoMakers(calendar);
  const parts = joinParts(PRODUCTION_PLANS.map((plan) => productionPieces(plan, { calendar, makers })));
  return {
    name: 'Cinderwharf Workshop',
    zone: DEMO_ZONE,
    currency: 'GBP',
    settings: SETTINGS,
    closures: demoClosures(calendar),
    crafts: CRAFTS.map((craft) => ({ id: `craft:${craft.key}`, ...craft })),
    materials: MATERIALS,
    recipes: RECIPES.map(({ stepKeys: _stepKeys, ...recipe }) => recipe),
    makers,
    bays: [...demoBays(calendar), ...parts.moulds],
    clients: CLIENTS,
    productions: PRODUCTION_PLANS.map((plan) => productionOf(plan, calendar)),
    pieces: parts.pieces,
    stages: parts.stages,
    links: parts.links,
    purchases: parts.purchases,
    accounts: ACCOUNTS,
  };
}

function productionOf(plan: ProductionPlan, calendar: DemoCalendar): DemoProduction {
  const { key, name, mark, hue, state, note } = plan;
  return {
    id: `production:${key}`,
    name,
    clientId: `client:${plan.client}`,
    mark,
    hue,
    state,
    note,
    createdAt: calendar.at(-plan.enteredAgo, '10:00'),
    keyDates: plan.dates.map((date) => ({
      id: `key-date:${key}/${date.kind}`,
      kind: date.kind,
      at: calendar.at(date.workday, date.time),
      strength: date.strength,
      weight: date.weight,
      pieceIds: (date.pieces ?? []).map((piece) => pieceId(key, piece)),
    })),
  };
}

function account(key: string, name: string, role: DemoAccount['role']): DemoAccount {
  return { id: `account:${key}`, name, email: `${key}@example.test`, role, makerId: null, clientId: null };
}
