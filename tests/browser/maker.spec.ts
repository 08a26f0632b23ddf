import type { Page } from 'playwright-core';
import { DaySheet, MakerView, WorkingPlanView } from '@common/contract';
import { axeFindings, sidewaysOverflow, takePicture, withBrowser } from '../support/browser';
import { withRunningStudio } from '../support/running-studio';
import { signIn, signInByApi, type DeskApi } from './desk';

jest.setTimeout(120_000);

/** At work at any hour, so that there is work today whichever day the test runs on. */
const ALWAYS = {
  firstDay: '2026-01-01',
  rule: 'FREQ=DAILY',
  startMinuteOfDay: 0,
  lengthMinutes: 1440,
  exceptDays: [],
  kind: 'ordinary',
};

describe('a maker’s day on a phone', () => {
  const studio = withRunningStudio();
  const browser = withBrowser();
  let office: DeskApi;
  let page: Page;
  let faults: readonly string[];
  let stageId = '';

  beforeAll(async () => {
    office = await signInByApi(studio.url, 'manager');
    const makers = MakerView.array().parse(await office.get('/api/makers'));
    const ines = makers.find(({ name }) => name === 'Ines Okereke');
    if (!ines) throw new Error('The demo has no Ines.');
    await office.send('PATCH', `/api/makers/${ines.id}`, { patterns: [ALWAYS], version: ines.version });
    await office.levelAndIssue();
    ({ page, faults } = await browser.open({
      viewport: { width: 390, height: 844 },
      hasTouch: true,
      isMobile: true,
      colorScheme: 'light',
    }));
    await signIn(page, studio.url, 'ines', '/day-sheet');
    await page.getByRole('button', { name: 'Today' }).click();
  });

  it('says what, where and in which order, and fits the screen', async () => {
    const sheet = DaySheet.parse(await (await page.request.get(`${studio.url}/api/day-sheet`)).json());
    expect(sheet.entries.length).toBeGreaterThan(0);
    const list = page.getByRole('list', { name: 'Work in order' });
    await list.getByRole('heading').first().waitFor();
    const told = await list.getByRole('heading').allInnerTexts();
    expect(told).toHaveLength(sheet.entries.length);
    sheet.entries.forEach(({ pieceName, name }, k) => {
      expect(told[k]).toContain(pieceName);
      expect(told[k]).toContain(name);
    });
    for (const caution of sheet.entries.flatMap(({ cautions }) => cautions)) {
      expect(await list.innerText()).toContain(caution);
    }
    expect(await sidewaysOverflow(page)).toBe(0);
    expect(await axeFindings(page)).toEqual([]);
    await takePicture(page, 'maker-today');
  });

  it('starts a stage with a thumb; the office’s plan has it begun', async () => {
    const start = page.getByRole('button', { name: /^Start/ }).first();
    const box = await start.boundingBox();
    // Source: WCAG 2.2, success criterion 2.5.8, asks for 24; gloves ask for more.
    expect(box?.height).toBeGreaterThanOrEqual(40);
    await start.click();
    await page
      .getByRole('button', { name: /^Finish/ })
      .first()
      .waitFor();
    const { problem } = WorkingPlanView.parse(await office.get('/api/plan'));
    const begun = problem.stages.filter(({ progress }) => progress.kind === 'started');
    const sheet = DaySheet.parse(await (await page.request.get(`${studio.url}/api/day-sheet`)).json());
    stageId = sheet.entries.find(({ state }) => state === 'started')?.stageId ?? '';
    expect(begun.map(({ id }) => id)).toContain(stageId);
  });

  it('finishes it with the hours that it took', async () => {
    await page
      .getByRole('button', { name: /^Finish/ })
      .first()
      .click();
    const dialog = page.getByRole('dialog');
    await dialog.getByLabel('Hands-on time in all').fill('1.5');
    await dialog.getByLabel('Anything to tell').fill('Went well.');
    await takePicture(page, 'maker-finish');
    await dialog.getByRole('button', { name: 'Finish', exact: true }).click();
    await dialog.waitFor({ state: 'hidden' });
    await page.getByText('done').or(page.getByText('finished')).first().waitFor();
    const { problem } = WorkingPlanView.parse(await office.get('/api/plan'));
    expect(problem.stages.find(({ id }) => id === stageId)?.progress.kind).toBe('finished');
  });

  it('shows no page of the office', async () => {
    await page.goto(`${studio.url}/plan`);
    await page.waitForURL('**/day-sheet**');
    expect(await page.getByRole('link', { name: 'Settings' }).count()).toBe(0);
  });

  it('prints on one sheet', async () => {
    await page.getByRole('list', { name: 'Work in order' }).waitFor();
    await page.emulateMedia({ media: 'print' });
    await takePicture(page, 'maker-print');
    const shown = await page.getByRole('button').filter({ visible: true }).count();
    expect(shown).toBe(0);
  });

  it('went without an error on the way', () => {
    expect(faults).toEqual([]);
  });
});
