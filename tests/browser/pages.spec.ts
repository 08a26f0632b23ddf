import type { Page } from 'playwright-core';
import { MaterialView, ProductionView, ProductionSummary, RecipeView } from '@common/contract';
import { axeFindings, sidewaysOverflow, takePicture, withBrowser, type WatchedPage } from '../support/browser';
import { withRunningStudio } from '../support/running-studio';
import { signIn, signInByApi } from './desk';

jest.setTimeout(240_000);

/** Widths in CSS pixels: the narrowest that WCAG 2.2 asks for (1.4.10), a phone, a desk. */
const WIDTHS = [320, 390, 1440];
const HEIGHT = 900;

/** Pages by who sees them; those of single records are added once their ids are known. */
const OFFICE_PAGES = [
  '/plan',
  '/plan?rows=maker',
  '/plan?rows=bay',
  '/dates',
  '/load',
  '/productions',
  '/crew',
  '/crew/new',
  '/bays',
  '/bays/climate',
  '/enquiries',
  '/library',
  '/library/calculator',
  '/library/materials/new',
  '/settings',
  '/day-sheet',
  '/nowhere',
];
const MAKER_PAGES = ['/day-sheet', '/productions', '/crew', '/bays', '/library', '/library/calculator'];
const CLIENT_PAGES = ['/client'];

describe('every page', () => {
  const studio = withRunningStudio();
  const browser = withBrowser();

  /** Pages of single records: a production, one of its pieces, a material and a recipe. */
  async function recordPages(): Promise<readonly string[]> {
    const office = await signInByApi(studio.url, 'owner');
    const [production] = ProductionSummary.array().parse(await office.get('/api/productions'));
    const { piecesInOrder } = ProductionView.parse(await office.get(`/api/productions/${production.id}`));
    const [material] = MaterialView.array().parse(await office.get('/api/materials'));
    const [recipe] = RecipeView.array().parse(await office.get('/api/recipes'));
    return [
      `/productions/${production.id}`,
      `/productions/${production.id}/pieces/${piecesInOrder[0].id}`,
      `/library/materials/${material.id}`,
      `/library/recipes/${recipe.id}`,
    ];
  }

  /** Opens a page by its address, as a link from elsewhere does, and waits until it is at rest. */
  async function open(page: Page, path: string): Promise<void> {
    await page.goto(`${studio.url}${path}`);
    await page.locator('h1, [role="group"][aria-label="The plan on the wall"]').first().waitFor();
    await page.waitForLoadState('networkidle');
    await page.locator('[aria-busy="true"]').first().waitFor({ state: 'detached' });
  }

  async function findings({ page, faults }: WatchedPage, path: string, theme: 'light' | 'dark'): Promise<string[]> {
    const found: string[] = [];
    const before = faults.length;
    for (const width of WIDTHS) {
      await page.setViewportSize({ width, height: HEIGHT });
      if (width === WIDTHS[0]) await open(page, path);
      const over = await sidewaysOverflow(page);
      if (over > 0) found.push(`${path} at ${String(width)}: ${String(over)} px too wide`);
      if (width !== 320) await takePicture(page, `page-${path.replaceAll(/[^a-z]+/g, '-')}-${theme}-${String(width)}`);
    }
    found.push(...(await axeFindings(page)).map((finding) => `${path} in the ${theme}: ${finding}`));
    found.push(...faults.slice(before).map((fault) => `${path}: ${fault}`));
    return found;
  }

  it.each(['light', 'dark'] as const)('of the office can be read, in the %s', async (theme) => {
    const watched = await browser.open({ colorScheme: theme, viewport: { width: 1440, height: HEIGHT } });
    await signIn(watched.page, studio.url, 'owner', '/plan');
    const found: string[] = [];
    for (const path of [...OFFICE_PAGES, ...(await recordPages())])
      found.push(...(await findings(watched, path, theme)));
    expect(found).toEqual([]);
  });

  it.each([
    ['ines', '/day-sheet', MAKER_PAGES],
    ['pellwick', '/client', CLIENT_PAGES],
  ])('that %s sees can be read', async (person, landing, paths) => {
    const watched = await browser.open({ colorScheme: 'light', viewport: { width: 390, height: HEIGHT } });
    await signIn(watched.page, studio.url, person, landing);
    const found: string[] = [];
    for (const path of paths) found.push(...(await findings(watched, path, 'light')));
    expect(found).toEqual([]);
  });

  it('that tells of the API can be read', async () => {
    const { page, faults } = await browser.open();
    await page.goto(`${studio.url}/api/docs`);
    await page.getByRole('heading').first().waitFor();
    expect(await axeFindings(page)).toEqual([]);
    expect(await sidewaysOverflow(page)).toBe(0);
    expect(faults).toEqual([]);
    await takePicture(page, 'page-api-docs');
  });

  it('says in plain words that the studio can’t be reached', async () => {
    const { page } = await browser.open({ viewport: { width: 390, height: HEIGHT } });
    await signIn(page, studio.url, 'manager', '/plan');
    await page.context().setOffline(true);
    await page.getByRole('link', { name: 'Dates' }).first().click();
    await page
      .getByText(/can’t be reached/)
      .first()
      .waitFor();
    await takePicture(page, 'page-unreachable');
  });

  it('says what to do first in a studio without productions', async () => {
    // Nothing is left but the library, the crew and the bays.
    for (const statement of [
      'truncate production, level_run, issued_plan cascade',
      'update studio set head_revision_id = null',
      'delete from working_revision',
    ]) {
      await studio.database.dataSource.query(statement);
    }
    const { page, faults } = await browser.open({ viewport: { width: 1440, height: HEIGHT } });
    await signIn(page, studio.url, 'manager', '/plan');
    for (const path of ['/plan', '/dates', '/load', '/productions', '/day-sheet']) {
      await open(page, path);
      expect(await page.locator('main').innerText()).toMatch(/yet|first|Nothing|No /);
      expect(await axeFindings(page)).toEqual([]);
      await takePicture(page, `page-empty-${path.slice(1)}`);
    }
    expect(faults).toEqual([]);
  });
});
