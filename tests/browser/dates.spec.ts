import { DateRisk, ForecastView } from '@common/contract';
import { formatDayAndTime } from '@common/time/format-instant';
import type { Locator, Page } from 'playwright-core';
import { axeFindings, sidewaysOverflow, takePicture, withBrowser } from '../support/browser';
import { withRunningStudio } from '../support/running-studio';
import { signIn, tapes } from './desk';

jest.setTimeout(180_000);

describe('the page of dates', () => {
  const studio = withRunningStudio();
  const browser = withBrowser();

  async function read<T>(page: Page, path: string, schema: { parse(answer: unknown): T }): Promise<T> {
    return schema.parse(await (await page.request.get(`${studio.url}${path}`)).json());
  }

  /** The page with its forecast, made for a plan that is levelled neither by us nor by anybody. */
  async function openDates(page: Page): Promise<Locator> {
    await page.goto(`${studio.url}/dates`);
    await page.getByText(/Chances are from living the plan through: [\d,]+ draws\./).waitFor({ timeout: 60_000 });
    return page.getByRole('article');
  }

  it.each(['light', 'dark'] as const)('tells of each date how likely it is missed, in the %s', async (theme) => {
    const { page, faults } = await browser.open({ viewport: { width: 1440, height: 900 }, colorScheme: theme });
    await signIn(page, studio.url, 'owner', '/plan');
    await tapes(page).first().waitFor();
    const cards = await openDates(page);
    const forecast = await read(page, '/api/forecast', ForecastView);
    const risks = await read(page, '/api/dates', DateRisk.array());
    expect(await cards.count()).toBe(risks.length);
    expect(forecast.keyDates.length).toBeGreaterThan(0);
    const zone = 'Europe/London';
    const known = new Map(forecast.keyDates.map((one) => [one.keyDateId, one]));
    for (const { keyDateId } of risks) {
      const one = known.get(keyDateId);
      if (!one) continue;
      const card = page.locator(`article[aria-labelledby="date-${keyDateId}"]`);
      const words = await card.innerText();
      expect(words).toMatch(/Chance of missing it\s+(?:under 1 in [\d,]+|over [\d,]+ in [\d,]+|[\d.]+ %)/);
      for (const at of [one.p50, one.p80, one.p90]) expect(words).toContain(formatDayAndTime(at, zone));
    }
    await page.getByText('How sure that is, and what moves it').first().click();
    const plot = page.getByRole('img', { name: /The chance of being ready by each time/ });
    await plot.locator('canvas').waitFor();
    const shares = await page.getByRole('table').first().getByRole('cell', { name: /%$/ }).allInnerTexts();
    expect(shares.map((share) => Number.parseFloat(share))).toEqual([0, 12.5, 25, 37.5, 50, 62.5, 75, 87.5, 100]);
    await page.getByRole('table', { name: 'What it hangs on' }).getByRole('link').first().waitFor();
    for (const width of [1440, 390, 320]) {
      await page.setViewportSize({ width, height: 900 });
      if (width !== 320) await takePicture(page, `dates-open-${theme}-${String(width)}`);
      expect(await sidewaysOverflow(page)).toBe(0);
    }
    expect(await axeFindings(page)).toEqual([]);
    expect(faults).toEqual([]);
  });

  it('draws as often as the settings say, once they are saved', async () => {
    const { page } = await browser.open({ viewport: { width: 1440, height: 900 } });
    await signIn(page, studio.url, 'owner', '/plan');
    await page.goto(`${studio.url}/settings`);
    const board = page.getByRole('form', { name: 'Forecast' });
    await board.getByLabel('Shortest dwell').fill('130');
    await board.getByRole('button', { name: 'Save' }).click();
    await board.getByText('The shortest dwell can’t be longer than the likely one, 100 %.').waitFor();
    await takePicture(page, 'settings-forecast-refused');
    await board.getByLabel('Shortest dwell').fill('85');
    await board.getByLabel('Draws').fill('250');
    await board.getByRole('button', { name: 'Save' }).click();
    await page.getByText('The forecast’s settings are saved.').waitFor();
    await takePicture(page, 'settings-forecast');
    await openDates(page);
    expect((await read(page, '/api/forecast', ForecastView)).draws).toBe(250);
    await page.getByText(/living the plan through: 250 draws/).waitFor();
  });

  it('lays a fan against the flags of each production on the wall, in words as well', async () => {
    const { page } = await browser.open({ viewport: { width: 1440, height: 900 } });
    await signIn(page, studio.url, 'manager', '/plan');
    await tapes(page).first().waitFor();
    const { productions } = await read(page, '/api/forecast', ForecastView);
    const fans = page.getByRole('img', { name: /^Forecast of the finish: half of all draws by / });
    await fans.first().waitFor({ timeout: 60_000 });
    expect(await fans.count()).toBeGreaterThan(0);
    expect(await fans.count()).toBeLessThanOrEqual(productions.length);
    await page.getByRole('radio', { name: 'Months' }).click();
    await takePicture(page, 'plan-fans-light');
    await page.emulateMedia({ colorScheme: 'dark' });
    await takePicture(page, 'plan-fans-dark');
  });
});
