import { axeFindings, sidewaysOverflow, takePicture, withBrowser } from '../support/browser';
import { withRunningStudio } from '../support/running-studio';

// A cold client, a cold server and a cold browser on two cores.
jest.setTimeout(90_000);

describe('the front door of the built application', () => {
  const studio = withRunningStudio();
  const browser = withBrowser();

  it.each(['light', 'dark'] as const)(
    'shows a stranger where to sign in, without a fault, in the %s',
    async (theme) => {
      const { page, faults } = await browser.open({ colorScheme: theme, viewport: { width: 1440, height: 900 } });
      await page.goto(studio.url);
      await page.getByRole('button', { name: 'Sign in' }).waitFor();
      expect(await axeFindings(page)).toEqual([]);
      expect(faults).toEqual([]);
      await takePicture(page, `front-door-${theme}`);
    },
  );

  it('fits the narrowest screen', async () => {
    // Source: WCAG 2.2, success criterion 1.4.10: 320 CSS pixels without scrolling in two dimensions.
    const { page } = await browser.open({ viewport: { width: 320, height: 640 } });
    await page.goto(studio.url);
    await page.getByRole('button', { name: 'Sign in' }).waitFor();
    expect(await sidewaysOverflow(page)).toBe(0);
    await takePicture(page, 'front-door-narrow');
  });

  it('brings its own letters', async () => {
    const { page } = await browser.open();
    await page.goto(studio.url);
    await page.getByRole('button', { name: 'Sign in' }).waitFor();
    const loaded = await page.evaluate(async () => {
      await document.fonts.ready;
      return [...document.fonts].filter(({ status }) => status === 'loaded').map(({ family }) => family);
    });
    expect(loaded.join()).toContain('Work Sans');
  });

  it('tells the browser to trust nothing but itself', async () => {
    // Source: OWASP Secure Headers Project, the headers and values it recommends.
    const { headers } = await fetch(studio.url);
    expect(headers.get('content-security-policy')).toMatch(/default-src 'self'/);
    expect(headers.get('content-security-policy')).toMatch(/frame-ancestors 'none'|frame-ancestors 'self'/);
    expect(headers.get('x-content-type-options')).toBe('nosniff');
    expect(headers.get('x-powered-by')).toBeNull();
  });
});
