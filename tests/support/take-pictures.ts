import { mkdirSync } from 'node:fs';
import { join } from 'node:path';
import { chromium, type Page } from 'playwright-core';
import { DEMO_PASSWORD } from '@database/demo/seed-accounts';
import { ROOT } from '../../server/launch/places';
import { chromiumPath } from '../../server/launch/system-packages';

/**
 * The pictures of the README, from the demo studio as `npm start` serves it: `npm run pictures -- http://127.0.0.1:4300`. It levels
 * the demo's working plan and takes it.
 */
const FOLDER = join(ROOT, 'docs', 'pictures');

async function main(url: string): Promise<void> {
  mkdirSync(FOLDER, { recursive: true });
  const browser = await chromium.launch({ executablePath: chromiumPath(), args: ['--no-sandbox', '--disable-gpu'] });
  const open = async (person: string, theme: 'light' | 'dark', width: number, height: number): Promise<Page> => {
    const context = await browser.newContext({ viewport: { width, height }, colorScheme: theme, locale: 'en-GB' });
    const page = await context.newPage();
    await page.goto(url);
    await page.getByLabel('E-mail').fill(`${person}@example.test`);
    await page.getByLabel('Password').fill(DEMO_PASSWORD);
    await page.getByRole('button', { name: 'Sign in', exact: true }).click();
    await page.waitForURL((address) => !address.pathname.includes('sign-in'));
    return page;
  };
  const keep = async (page: Page, name: string): Promise<void> => {
    await page.waitForLoadState('networkidle');
    await page.screenshot({ path: join(FOLDER, `${name}.png`) });
  };

  const desk = await open('manager', 'light', 1280, 800);
  await desk.getByRole('button', { name: 'Level', exact: true }).click();
  await desk.getByRole('button', { name: 'Take it' }).click({ timeout: 60_000 });
  await desk.getByRole('dialog').waitFor({ state: 'hidden' });
  await desk.locator('fettle-date-fan .fan').first().waitFor({ state: 'attached' });
  await keep(desk, 'plan-light');
  await desk.goto(`${url}/dates`);
  await desk.getByText('Chance of missing it').first().waitFor();
  await keep(desk, 'dates-light');

  const night = await open('manager', 'dark', 1280, 800);
  await night.locator('button[data-tape]').nth(3).click();
  await night.getByRole('region', { name: 'Why then' }).getByRole('listitem').first().waitFor();
  await keep(night, 'inspector-dark');
  await browser.close();
}

void main(process.argv[2] ?? 'http://127.0.0.1:4300');
