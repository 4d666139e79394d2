import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest';
import { axeFindings, openBrowser, overflows, pageStands, SCREENS, visit } from '#tests/support/browser.ts';

/** Every page of the catalogue, and some of its states. */
const PAGES = [
  '/catalogue',
  '/makers',
  '/makers/brackwater-tractor-works',
  '/models',
  '/models/brackwater-30-crawler?serial=3C1207',
  '/part-types',
  '/part-types/flywheel',
  '/castings',
  '/castings?number=ZZ9',
  '/castings?number=B[4',
  '/castings/brackwater-b4406',
  '/castings/brackwater-b4406/history',
  '/ciphers',
  '/ciphers/brackwater-ten-letter?day=1941-01-13',
  '/ciphers/fensholt-year-letter',
  '/ciphers/skerry-key-with-repeater',
  '/ciphers/hesper-early-quarters',
  '/serial-ranges',
  '/sources',
  '/sources/brackwater-parts-book-14',
  '/developers',
] as const;

let browser: Browser;
beforeAll(async () => {
  browser = await openBrowser();
});
afterAll(() => browser.close());

describe.each([
  ['by day on a desk', { ...SCREENS.desk, colorScheme: 'light' }],
  ['by night on a phone', { ...SCREENS.phone, colorScheme: 'dark' }],
] as const)('%s', (_, screen) => {
  it.each(PAGES)('axe finds nothing on %s, and it is no wider than the screen', async (address) => {
    const { page, end } = await visit(browser, inject('baseUrl'), screen);
    await page.goto(address);
    await pageStands(page);
    expect(await axeFindings(page)).toEqual([]);
    expect(await overflows(page)).toBe(false);
    await end();
  });
});

describe('without a mouse', () => {
  it('finds a casting and its decoder by keyboard alone', async () => {
    const { page, end } = await visit(browser, inject('baseUrl'));
    await page.goto('/catalogue');
    await page.getByLabel('Casting number').focus();
    await page.keyboard.type('B4406');
    await page.keyboard.press('Enter');
    const casting = page.getByRole('link', { name: 'B4406' });
    await casting.waitFor();
    for (let step = 0; step < 40 && !(await casting.evaluate((link) => link === document.activeElement)); step += 1)
      await page.keyboard.press('Tab');
    await page.keyboard.press('Enter');
    await page.getByRole('heading', { level: 1, name: /first pattern/ }).waitFor();
    await expect.poll(() => page.evaluate(() => document.activeElement?.tagName)).toBe('H1');
    const decode = page.getByRole('link', { name: 'Decode a date on this casting' });
    for (let step = 0; step < 40 && !(await decode.evaluate((link) => link === document.activeElement)); step += 1)
      await page.keyboard.press('Tab');
    await page.keyboard.press('Enter');
    await page.waitForURL(/\/decode/);
    await end();
  });

  it('finds when a serial was built by keyboard alone', async () => {
    const { page, end } = await visit(browser, inject('baseUrl'));
    await page.goto('/models/brackwater-30-crawler');
    await page.getByLabel('Serial as stamped').focus();
    await page.keyboard.type('3C1207');
    await page.keyboard.press('Enter');
    await page.getByText('10 Feb – 10 Mar 1941').first().waitFor();
    await end();
  });
});

describe('with a thumb', () => {
  it('gives the one thing to do on a casting 44 px', async () => {
    const { page, end } = await visit(browser, inject('baseUrl'), SCREENS.phone);
    await page.goto('/castings/brackwater-b4406');
    await pageStands(page);
    const button = await page.getByRole('link', { name: 'Decode a date on this casting' }).boundingBox();
    expect(button?.height).toBeGreaterThanOrEqual(44);
    await end();
  });
});

describe('on paper', () => {
  it.each(['/castings/brackwater-b4406', '/models/brackwater-30-crawler'])(
    '%s leaves the controls out and keeps the sources',
    async (address) => {
      const { page, end } = await visit(browser, inject('baseUrl'));
      await page.goto(address);
      await pageStands(page);
      await page.emulateMedia({ media: 'print' });
      expect(await page.getByRole('link', { name: 'What changed' }).isVisible()).toBe(false);
      expect(await page.getByRole('navigation').isVisible()).toBe(false);
      expect(
        await page
          .getByText(/^Entered by/)
          .first()
          .isVisible(),
      ).toBe(true);
      await end();
    },
  );
});
