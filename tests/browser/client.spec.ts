import type { Page } from 'playwright-core';
import { ClientProduction, ProductionSummary } from '@common/contract';
import { axeFindings, sidewaysOverflow, takePicture, withBrowser } from '../support/browser';
import { withRunningStudio } from '../support/running-studio';
import { signIn, signInByApi, type DeskApi } from './desk';

jest.setTimeout(120_000);

describe('a client’s page', () => {
  const studio = withRunningStudio();
  const browser = withBrowser();
  let office: DeskApi;
  let page: Page;
  let faults: readonly string[];
  let decision: ClientProduction['decisions'][number];

  beforeAll(async () => {
    office = await signInByApi(studio.url, 'manager');
    await office.levelAndIssue();
    const client = await signInByApi(studio.url, 'pellwick');
    const own = async () => ClientProduction.array().parse(await client.get('/api/client-page'));
    const asked = (await own()).flatMap(({ decisions }) => decisions).find(({ state }) => state !== 'approved');
    if (!asked) throw new Error('The demo asks nothing of this client.');
    // The makers have done all that comes before the decision.
    await studio.database.dataSource.query(
      `update stage set state = 'finished', started_at = coalesce(stage.started_at, now() - interval '2 hours'), finished_at = now()
       from stage as asked
       where asked.id = $1 and stage.piece_id = asked.piece_id and stage.position < asked.position
         and stage.state <> 'finished'`,
      [asked.stageId],
    );
    decision = asked;
    ({ page, faults } = await browser.open({ viewport: { width: 390, height: 844 }, colorScheme: 'dark' }));
    await signIn(page, studio.url, 'pellwick', '/client');
    await page.getByRole('heading', { name: 'Key dates' }).first().waitFor();
  });

  it('has their own productions with dates and the next decision, and nothing of anybody else’s', async () => {
    const productions = ProductionSummary.array().parse(await office.get('/api/productions'));
    const text = await page.locator('body').innerText();
    const [own, others] = [
      productions.filter(({ clientName }) => clientName.startsWith('Pellwick')),
      productions.filter(({ clientName }) => !clientName.startsWith('Pellwick')),
    ];
    expect(own.length).toBeGreaterThan(0);
    for (const { name } of own) expect(text).toContain(name);
    expect(others.length).toBeGreaterThan(0);
    for (const { name, clientName } of others) {
      expect(text).not.toContain(name);
      expect(text).not.toContain(clientName);
    }
    expect(text).toContain('Everything is ready by');
    expect(text).not.toContain('£');
    expect(await sidewaysOverflow(page)).toBe(0);
    expect(await axeFindings(page)).toEqual([]);
    await takePicture(page, 'client-page');
  });

  it('takes their approval, and the office knows', async () => {
    const row = page.getByRole('listitem').filter({ hasText: decision.pieceName }).filter({ hasText: decision.name });
    await row
      .getByRole('button', { name: /^Approve/ })
      .first()
      .click();
    const dialog = page.getByRole('dialog');
    await dialog.getByLabel('A word to the makers').fill('Just as we hoped.');
    await dialog.getByRole('button', { name: 'Approve it' }).click();
    await dialog.waitFor({ state: 'hidden' });
    await row
      .getByRole('button', { name: /^Approve/ })
      .first()
      .waitFor({ state: 'detached' });
    const [{ state, decision: kept }] = await studio.database.dataSource.query<
      { readonly state: string; readonly decision: string }[]
    >(`select state, decision from stage where id = $1`, [decision.stageId]);
    expect({ state, kept }).toEqual({ state: 'finished', kept: 'approved' });
  });

  it.each(['/plan', '/dates', '/load', '/crew', '/settings', '/productions'])(
    'leads nowhere from %s but home',
    async (path) => {
      await page.goto(`${studio.url}${path}`);
      await page.waitForURL('**/client**');
    },
  );

  it('is refused by the server what the pages do not show', async () => {
    for (const path of ['/api/plan', '/api/makers', '/api/load', '/api/dates', '/api/forecast', '/api/productions']) {
      expect([path, (await page.request.get(`${studio.url}${path}`)).status()]).toEqual([path, 403]);
    }
  });

  it('went without an error on the way', () => {
    // What the server refused above was asked for on purpose, not by a page.
    expect(faults).toEqual([]);
  });
});
