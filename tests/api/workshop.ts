import type { Visitor } from './studio';

/** Records that tests of productions and plans start from, made through the API. */
export interface Workshop {
  readonly craftId: string;
  readonly makerIds: readonly string[];
  readonly bayId: string;
  readonly clientId: string;
}

/** Works at any hour, so that a plan of the tests does not hang on what time it is. */
const ALWAYS = {
  firstDay: '2026-01-01',
  rule: 'FREQ=DAILY',
  startMinuteOfDay: 0,
  lengthMinutes: 1440,
};

/** A craft, two makers who hold it, a booth and a client. */
export async function furnish(manager: Visitor): Promise<Workshop> {
  const craft = await manager.post('/api/crafts', { key: 'painting', name: 'Painting' });
  const crafts = [{ craftId: craft.body.id as string, pacePermille: 1000 }];
  const limits = { dayLimitMinutes: 1440, weekLimitMinutes: 10_080 };
  const makerIds: string[] = [];
  for (const name of ['Pia', 'Quin']) {
    const fields = { name, initials: name[0], crafts, patterns: [ALWAYS], hourCostMinor: 2500, ...limits };
    makerIds.push((await manager.post('/api/makers', fields)).body.id as string);
  }
  const bay = await manager.post('/api/bays', { name: 'Booth', kind: 'booth', capacity: 1 });
  const client = await manager.post('/api/clients', { name: 'Pellwick' });
  return { craftId: crafts[0].craftId, makerIds, bayId: bay.body.id as string, clientId: client.body.id as string };
}

/** A production with one empty piece. */
export async function addProduction(
  manager: Visitor,
  clientId: string,
  name: string,
  keyDates: object[] = [],
  state: 'committed' | 'tentative' = 'committed',
) {
  const fields = { name, clientId, mark: 'Ab', hue: 3, state, keyDates };
  const production = (await manager.post('/api/productions', fields)).body;
  const whole = (await manager.post(`/api/productions/${production.id}/pieces`, { name: 'Moon', recipe: null })).body;
  return { productionId: production.id as string, pieceId: whole.piecesInOrder[0].id as string };
}

/** A stage of two hours for one painter, otherwise as given. */
export function stageOf(craftId: string, name: string, more: object = {}): object {
  return {
    name,
    kind: 'make',
    handsOn: { lowMinutes: 90, likelyMinutes: 120, highMinutes: 180 },
    crew: [{ craftId, least: 1, most: 1 }],
    crewLossPermille: 0,
    continuity: 'session',
    places: [],
    dwell: null,
    cautions: [],
    note: '',
    visitAt: null,
    replyMinutes: 0,
    afterStageIds: [],
    ...more,
  };
}
