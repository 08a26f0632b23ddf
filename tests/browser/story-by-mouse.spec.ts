import ICAL from 'ical.js';
import type { Page } from 'playwright-core';
import { axeFindings, takePicture, withBrowser } from '../support/browser';
import { withRunningStudio } from '../support/running-studio';
import { expectSoon, levelAndTake, missedDates, movableStage, readPlan, signIn, tapeOf, tapes } from './desk';

jest.setTimeout(120_000);

describe('a manager’s first five minutes, by mouse', () => {
  const studio = withRunningStudio();
  const browser = withBrowser();
  let page: Page;
  let faults: readonly string[];

  beforeAll(async () => {
    ({ page, faults } = await browser.open({ viewport: { width: 1440, height: 900 }, colorScheme: 'light' }));
    await signIn(page, studio.url, 'manager', '/plan');
    await tapes(page).first().waitFor();
  });

  it('shows productions that collide, and says that dates would be missed', async () => {
    const view = await readPlan(page);
    const technical = view.directory.keyDates.filter(({ kind }) => kind === 'technical-rehearsal').map(({ id }) => id);
    expect(missedDates(view).some((id) => technical.includes(id))).toBe(true);
    await page.getByRole('button', { name: /things can’t be met/ }).click();
    const panel = page.getByText(/Technical rehearsal/).first();
    await panel.waitFor();
    await takePicture(page, 'story-1-collision');
    await page.keyboard.press('Escape');
    expect(await axeFindings(page)).toEqual([]);
  });

  it('levels, compares before anything is taken, and leaves one date that can’t be met', async () => {
    const before = await readPlan(page);
    await page.goto(`${studio.url}/plan`);
    await tapes(page).first().waitFor();
    await page.getByRole('button', { name: 'Level', exact: true }).click();
    await page.getByRole('heading', { name: 'Which dates gain, which lose' }).waitFor({ timeout: 30_000 });
    const dialog = page.getByRole('dialog');
    expect(await dialog.innerText()).toMatch(/Technical rehearsal, The Moon Engine\s+late by .*\s+.* in hand\s+gains/);
    expect((await readPlan(page)).revision).toBe(before.revision);
    await takePicture(page, 'story-2-comparison');
    await page.getByRole('button', { name: 'Leave it' }).click();
    await levelAndTake(page);
    const after = await readPlan(page);
    expect(missedDates(after)).toHaveLength(1);
    expect(after.unmet.every(({ rule }) => rule === 'key-date')).toBe(true);
    await page.getByRole('button', { name: 'One thing can’t be met' }).waitFor();
  });

  it('tells of a stage why it begins when it does', async () => {
    const stageId = await movableStage(page, await readPlan(page));
    await tapeOf(page, stageId).click();
    const why = page.getByRole('region', { name: 'Why then' });
    await why.getByRole('listitem').first().waitFor();
    expect((await why.getByRole('listitem').allInnerTexts()).join(' ')).toMatch(/\p{L}{3,}/u);
    await why.getByText('No reason was found.').waitFor({ state: 'detached' });
    expect(page.url()).toContain(`stage=${stageId}`);
    await takePicture(page, 'story-3-why');
    await page.getByRole('button', { name: 'Close', exact: true }).click();
  });

  it('shows which date pays while a stage is held; Escape puts it back', async () => {
    const before = await readPlan(page);
    const box = await tapeOf(page, await movableStage(page, before)).boundingBox();
    if (!box) throw new Error('The stage is not on the wall.');
    await hold(page, box);
    await page.mouse.move(box.x + 300, box.y + box.height / 2, { steps: 12 });
    const ledger = page.getByRole('region', { name: 'What would follow' });
    await ledger.getByRole('listitem').first().waitFor();
    expect(await ledger.innerText()).toMatch(/No date pays for it|margin .* → /);
    await takePicture(page, 'story-4-held');
    await page.keyboard.press('Escape');
    await ledger.waitFor({ state: 'hidden' });
    await page.mouse.up();
    expect((await readPlan(page)).revision).toBe(before.revision);
  });

  it('puts a stage where it is dropped, holds it there, and takes that back', async () => {
    const before = await readPlan(page);
    const stageId = await movableStage(page, before);
    const box = await tapeOf(page, stageId).boundingBox();
    if (!box) throw new Error('The stage is not on the wall.');
    await hold(page, box);
    await page.mouse.move(box.x + 260, box.y + box.height / 2, { steps: 12 });
    await page.getByRole('region', { name: 'What would follow' }).waitFor();
    await page.mouse.up();
    await expectSoon(async () => (await readPlan(page)).revision > before.revision);
    const moved = await readPlan(page);
    const start = (view: typeof moved) =>
      view.plan.placements.find((placement) => placement.stageId === stageId)?.work[0].start ?? 0;
    expect(start(moved)).toBeGreaterThan(start(before));
    expect(moved.problem.stages.find((stage) => stage.id === stageId)?.pin?.start).toBe(start(moved));
    await page.getByRole('button', { name: 'Undo' }).click();
    await expectSoon(async () => start(await readPlan(page)) === start(before));
  });

  it('issues the plan, and a phone’s calendar has it', async () => {
    await page.getByRole('button', { name: 'Issue…' }).click();
    await page.getByRole('button', { name: 'Issue it' }).and(page.locator(':enabled')).click();
    await page.getByRole('dialog').waitFor({ state: 'hidden' });
    const view = await readPlan(page);
    expect(view.issued).toMatchObject({ number: 1, differs: false });
    await page.goto(`${studio.url}/settings`);
    await page.getByRole('button', { name: 'Make an address' }).click();
    await page.getByRole('button', { name: 'Make a calendar address' }).click();
    const code = page.getByAltText('QR code of the calendar address');
    await code.waitFor();
    await takePicture(page, 'story-5-calendar');
    const address = (await page.locator('body').innerText()).match(/https?:\/\/\S+\.ics/)?.[0];
    if (address === undefined) throw new Error('The page shows no address of a calendar.');
    const text = await (await fetch(address)).text();
    const events = new ICAL.Component(ICAL.parse(text) as unknown[]).getAllSubcomponents('vevent');
    expect(events.length).toBeGreaterThan(view.plan.placements.length / 2);
  });

  it('went without an error on the way', () => {
    expect(faults).toEqual([]);
  });
});

/** Presses on a tape and moves far enough that it is taken in hand. */
async function hold(
  page: Page,
  box: { readonly x: number; readonly y: number; readonly height: number },
): Promise<void> {
  await page.mouse.move(box.x + 8, box.y + box.height / 2);
  await page.mouse.down();
  await page.mouse.move(box.x + 20, box.y + box.height / 2, { steps: 3 });
}
