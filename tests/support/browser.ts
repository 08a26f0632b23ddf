import { mkdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { chromium, type Browser, type BrowserContextOptions, type Page } from 'playwright-core';
import { ROOT } from '../../server/launch/places';
import { chromiumPath } from '../../server/launch/system-packages';

/** A browser that one test file has to itself. */
export interface TestBrowser {
  /** Opens a page in a context of its own: no cookies, no storage, nothing of another page's. */
  open(options?: BrowserContextOptions): Promise<WatchedPage>;
}

/** A page, and what went wrong in it so far. */
export interface WatchedPage {
  readonly page: Page;
  /** Errors on the console, uncaught errors, and requests that left this machine. */
  readonly faults: readonly string[];
}

/** What axe-core tells of one broken rule, as far as it is used here. */
interface AxeViolation {
  readonly id: string;
  readonly help: string;
  readonly nodes: readonly { readonly html: string }[];
}

const SET_UP_MS = 60_000;
const SCREENSHOTS = join(ROOT, 'tests', 'browser', 'screenshots');

/** Starts Chromium for a file or a `describe`, without a way to any other machine. */
export function withBrowser(): TestBrowser {
  let browser: Browser | undefined;
  beforeAll(async () => {
    browser = await chromium.launch({
      executablePath: chromiumPath(),
      args: [
        ...['--no-sandbox', '--disable-gpu', '--disable-dev-shm-usage', '--disable-quic', '--no-first-run'],
        ...['--disable-background-networking', '--disable-component-update', '--disable-sync'],
        '--host-resolver-rules=MAP * ~NOTFOUND, EXCLUDE 127.0.0.1',
      ],
    });
  }, SET_UP_MS);
  afterAll(async () => {
    await browser?.close();
  });
  return {
    async open(options = {}) {
      if (browser === undefined) throw new Error('The browser runs only inside tests and hooks.');
      const context = await browser.newContext({ locale: 'en-GB', timezoneId: 'Europe/London', ...options });
      return watch(await context.newPage());
    },
  };
}

/** What axe-core finds wrong on a page, one line for each element. */
export async function axeFindings(page: Page): Promise<readonly string[]> {
  await page.evaluate(readFileSync(require.resolve('axe-core/axe.min.js'), 'utf8'));
  const { violations } = await page.evaluate<{ violations: readonly AxeViolation[] }>('axe.run()');
  return violations.flatMap(({ id, help, nodes }) => nodes.map(({ html }) => `${id}: ${help}: ${html}`));
}

/** How far the page can be scrolled sideways, in CSS pixels; 0 where it fits (WCAG 2.2, 1.4.10 Reflow). */
export async function sidewaysOverflow(page: Page): Promise<number> {
  return page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth);
}

/** Keeps a picture of the page for whoever wants to look; the folder is not committed. */
export async function takePicture(page: Page, name: string): Promise<void> {
  mkdirSync(SCREENSHOTS, { recursive: true });
  await page.screenshot({ path: join(SCREENSHOTS, `${name}.png`), fullPage: true });
}

function watch(page: Page): WatchedPage {
  const faults: string[] = [];
  page.on('console', (message) => {
    if (message.type() === 'error') faults.push(`console: ${message.text()}`);
  });
  page.on('pageerror', (error) => faults.push(`uncaught: ${error.message}`));
  page.on('request', (request) => {
    const { protocol, hostname } = new URL(request.url());
    if (protocol.startsWith('http') && hostname !== '127.0.0.1') faults.push(`left the machine: ${request.url()}`);
  });
  return { page, faults };
}
