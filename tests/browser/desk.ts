import type { Locator, Page } from 'playwright-core';
import { LevelRun, SessionView, WorkingPlanView } from '@common/contract';
import { DEMO_PASSWORD } from '@database/demo/seed-accounts';

/** Signs one of the demo's people in and waits for the page that they land on. */
export async function signIn(page: Page, url: string, person: string, landing: string): Promise<void> {
  await page.goto(url);
  await page.getByLabel('E-mail').fill(`${person}@example.test`);
  await page.getByLabel('Password').fill(DEMO_PASSWORD);
  await page.getByRole('button', { name: 'Sign in', exact: true }).click();
  await page.waitForURL(`**${landing}**`);
}

/** The working plan as the page's own session reads it. */
export async function readPlan(page: Page): Promise<WorkingPlanView> {
  const answer = await page.request.get(new URL('/api/plan', page.url()).href);
  return WorkingPlanView.parse(await answer.json());
}

/** Key dates that a plan misses, by id. */
export function missedDates(view: WorkingPlanView): readonly string[] {
  return view.unmet.flatMap(({ rule, keyDateId }) => (rule === 'key-date' && keyDateId !== null ? [keyDateId] : []));
}

/** The tapes on the wall, in the order in which they are drawn. */
export function tapes(page: Page): Locator {
  return page.locator('button[data-tape]');
}

/** The tape of one stage. */
export function tapeOf(page: Page, stageId: string): Locator {
  return page.locator(`button[data-tape$="|${stageId}"]`).first();
}

/** A stage that a hand can move, whole in the window and clear of its edges: not begun, tied to no instant, two hours at least. */
export async function movableStage(page: Page, view: WorkingPlanView): Promise<string> {
  const stages = new Map(view.problem.stages.map((stage) => [stage.id, stage]));
  const placements = new Map(view.plan.placements.map((placement) => [placement.stageId, placement]));
  for (const tape of await tapes(page).all()) {
    const stageId = (await tape.getAttribute('data-tape'))?.split('|')[1] ?? '';
    const [stage, start] = [stages.get(stageId), placements.get(stageId)?.work[0].start ?? 0];
    const isFree = stage?.progress.kind === 'to-do' && stage.fixedStart === null && stage.crew.length > 0;
    const box = await tape.boundingBox();
    if (!isFree || !box || start < view.now + 60 || stage.effort.minutes < 120) continue;
    if (box.x > 220 && box.x + 320 < 1000 && box.y > 200 && box.y < 640 && box.width > 30) return stageId;
  }
  throw new Error('No stage in the window can be moved.');
}

/** Levels by the buttons, waits for the comparison and takes it. */
export async function levelAndTake(page: Page): Promise<void> {
  await page.getByRole('button', { name: 'Level', exact: true }).click();
  await page.getByRole('button', { name: 'Take it' }).click({ timeout: 30_000 });
  await page.getByRole('dialog').waitFor({ state: 'hidden' });
  await page.getByRole('button', { name: 'Undo' }).and(page.locator(':enabled')).waitFor();
}

/** Waits until something is so; an error after five seconds. */
export async function expectSoon(isSo: () => Promise<boolean>): Promise<void> {
  for (let tries = 0; tries < 50; tries += 1) {
    if (await isSo()) return;
    await new Promise((resolve) => setTimeout(resolve, 100));
  }
  throw new Error('It did not come to be within five seconds.');
}

/** The API as one of the demo's people calls it, without a page. */
export interface DeskApi {
  get(path: string): Promise<unknown>;
  /** Sends a change; an error unless it is taken. */
  send(method: 'POST' | 'PATCH', path: string, body: object): Promise<unknown>;
  /** Levels, takes what was found and issues it. */
  levelAndIssue(): Promise<void>;
}

/** Signs one of the demo's people in without a browser. */
export async function signInByApi(url: string, person: string): Promise<DeskApi> {
  let cookie = '';
  let token = '';
  const call = async (method: string, path: string, body?: object): Promise<unknown> => {
    const headers = { Cookie: cookie, 'X-Fettle-Token': token, 'Content-Type': 'application/json' };
    const answer = await fetch(`${url}${path}`, {
      method,
      headers,
      ...(body !== undefined && { body: JSON.stringify(body) }),
    });
    const [set] = answer.headers.getSetCookie();
    if (set !== undefined) cookie = set.split(';')[0];
    if (!answer.ok) throw new Error(`${method} ${path}: ${String(answer.status)} ${await answer.text()}`);
    return answer.status === 204 ? undefined : await answer.json();
  };
  const session = async () => SessionView.parse(await call('GET', '/api/session'));
  ({ formToken: token } = await session());
  await call('POST', '/api/session', { email: `${person}@example.test`, password: DEMO_PASSWORD });
  ({ formToken: token } = await session());
  const plan = async () => WorkingPlanView.parse(await call('GET', '/api/plan'));
  return {
    get: (path) => call('GET', path),
    send: call,
    levelAndIssue: async () => {
      const { revision } = await plan();
      let run = LevelRun.parse(await call('POST', '/api/plan/level', { revision, mode: 'dates', seconds: 2, seed: 1 }));
      while (run.state === 'waiting' || run.state === 'running') {
        await new Promise((resolve) => setTimeout(resolve, 200));
        run = LevelRun.parse(await call('GET', `/api/plan/level/${run.id}`));
      }
      await call('POST', `/api/plan/level/${run.id}/take`, { revision });
      await call('POST', '/api/plan/issue', { revision: (await plan()).revision, note: '' });
    },
  };
}
