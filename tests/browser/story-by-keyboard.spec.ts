import type { Page } from 'playwright-core';
import { takePicture, withBrowser } from '../support/browser';
import { withRunningStudio } from '../support/running-studio';
import { expectSoon, missedDates, movableStage, readPlan, tapeOf, tapes } from './desk';
import { DEMO_PASSWORD } from '@database/demo/seed-accounts';

jest.setTimeout(120_000);

/** So many Tabs reach anything on these pages; more means that it can not be reached. */
const MOST_TABS = 60;

describe('the same story by keyboard alone', () => {
  const studio = withRunningStudio();
  const browser = withBrowser();
  let page: Page;
  let faults: readonly string[];

  beforeAll(async () => {
    ({ page, faults } = await browser.open({ viewport: { width: 1440, height: 900 }, colorScheme: 'dark' }));
    await page.goto(studio.url);
    await page.getByLabel('E-mail').waitFor();
  });

  /** Presses Tab until what has the focus answers to a name. */
  async function tabTo(name: RegExp): Promise<void> {
    for (let tabs = 0; tabs < MOST_TABS; tabs += 1) {
      const focused = await page.evaluate(() => {
        const element = document.activeElement;
        if (element === null || element === document.body) return '';
        const label = element.getAttribute('aria-label') ?? '';
        const own =
          element instanceof HTMLInputElement ? (element.labels?.[0]?.textContent ?? '') : element.textContent;
        return `${label} ${own}`.trim();
      });
      if (name.test(focused)) return;
      await page.keyboard.press('Tab');
    }
    throw new Error(`Tab does not lead to ${String(name)}.`);
  }

  /** The plan at the line of now, as when it is opened anew. */
  async function openWall(): Promise<void> {
    await page.goto(`${studio.url}/plan`);
    await tapes(page).first().waitFor();
  }

  async function startOf(stageId: string): Promise<number> {
    const { plan } = await readPlan(page);
    return plan.placements.find((placement) => placement.stageId === stageId)?.work[0].start ?? 0;
  }

  it('signs in', async () => {
    await tabTo(/E-mail/);
    await page.keyboard.type('manager@example.test');
    await page.keyboard.press('Tab');
    await page.keyboard.type(DEMO_PASSWORD);
    await page.keyboard.press('Enter');
    await page.waitForURL('**/plan**');
    await tapes(page).first().waitFor();
  });

  it('levels and takes what was found', async () => {
    await tabTo(/^Level$/);
    await page.keyboard.press('Enter');
    await page.getByRole('heading', { name: 'Which dates gain, which lose' }).waitFor({ timeout: 30_000 });
    await tabTo(/^Take it$/);
    await page.keyboard.press('Enter');
    await page.getByRole('dialog').waitFor({ state: 'hidden' });
    await page.getByRole('button', { name: 'Undo' }).and(page.locator(':enabled')).waitFor();
    expect(missedDates(await readPlan(page))).toHaveLength(1);
  });

  it('walks from stage to stage with the arrows, one stop for Tab', async () => {
    expect(await page.locator('button[data-tape][tabindex="0"]').count()).toBe(1);
    await page.locator('button[data-tape][tabindex="0"]').focus();
    const first = await focusedTape();
    await page.keyboard.press('ArrowRight');
    await page.waitForFunction((was) => document.activeElement?.getAttribute('data-tape') !== was, first);
    const second = await focusedTape();
    expect(second).toMatch(/\|/);
    await page.keyboard.press('ArrowLeft');
    await page.waitForFunction((was) => document.activeElement?.getAttribute('data-tape') !== was, second);
  });

  it('takes a stage in hand with M, tells what follows, and puts it back with Escape', async () => {
    await openWall();
    const before = await readPlan(page);
    const stageId = await movableStage(page, before);
    await tapeOf(page, stageId).focus();
    await page.keyboard.press('m');
    await page.keyboard.press('Shift+ArrowRight');
    const ledger = page.getByRole('region', { name: 'What would follow' });
    await ledger.getByRole('listitem').first().waitFor();
    expect(await ledger.innerText()).toMatch(/No date pays for it|margin .* → /);
    await page
      .locator('[aria-live=polite]')
      .filter({ hasText: /\p{L}{4,}/u })
      .first()
      .waitFor({ state: 'attached' });
    await takePicture(page, 'story-keys-held');
    await page.keyboard.press('Escape');
    await ledger.waitFor({ state: 'hidden' });
    expect((await readPlan(page)).revision).toBe(before.revision);
  });

  it('puts it a day later with Enter, and takes that back with Ctrl+Z', async () => {
    await openWall();
    const stageId = await movableStage(page, await readPlan(page));
    const before = await startOf(stageId);
    await tapeOf(page, stageId).focus();
    await page.keyboard.press('m');
    await page.keyboard.press('Shift+ArrowRight');
    await page.getByRole('region', { name: 'What would follow' }).waitFor();
    await page.keyboard.press('Enter');
    await expectSoon(async () => (await startOf(stageId)) > before);
    await page.keyboard.press('Control+z');
    await expectSoon(async () => (await startOf(stageId)) === before);
  });

  it('moves a stage by a form that does what a drag does', async () => {
    await openWall();
    const stageId = await movableStage(page, await readPlan(page));
    const before = await startOf(stageId);
    await tapeOf(page, stageId).focus();
    await page.keyboard.press('Enter');
    await page.getByRole('region', { name: 'Why then' }).waitFor();
    await tabTo(/^Move…$/);
    await page.keyboard.press('Enter');
    await page.getByRole('textbox', { name: 'Day' }).waitFor();
    const later = new Date((before + 2 * 1440) * 60_000).toISOString().slice(0, 10);
    await page.getByRole('textbox', { name: 'Day' }).fill(later);
    await page.getByRole('heading', { name: 'What would follow' }).waitFor();
    await tabTo(/^Move it$/);
    await page.keyboard.press('Enter');
    await page.getByRole('dialog').waitFor({ state: 'hidden' });
    await expectSoon(async () => (await startOf(stageId)) > before);
  });

  it('went without an error on the way', () => {
    expect(faults).toEqual([]);
  });

  async function focusedTape(): Promise<string> {
    return page.evaluate(() => document.activeElement?.getAttribute('data-tape') ?? '');
  }
});
