import type { Browser, Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, inject, it } from 'vitest';
import { axeFindings, openBrowser, overflows, pageStands, SCREENS, visit } from '#tests/support/browser.ts';
import type { Visit } from '#tests/support/browser.ts';

const FULL = '/decode?mark=BBOCB&maker=brackwater-tractor-works&model=brackwater-30-crawler&serial=3C+1207&position=cylinder-block';

let browser: Browser;
let here: Visit;

beforeAll(async () => {
  browser = await openBrowser();
});
afterAll(() => browser.close());
beforeEach(async () => {
  here = await visit(browser, inject('baseUrl'));
});
afterEach(() => here.end());

const plate = (page: Page) => page.getByRole('textbox', { name: 'The mark on the casting' });
const candidates = (page: Page) => page.getByRole('table', { name: 'What the mark can mean' });
const settled = (page: Page) => page.getByText('In step if 13 Jan 1941 and cast after build if 3 Nov 1941.').first().waitFor();

describe('a first visitor', () => {
  it('gets from the front door to a verdict', async () => {
    const { page, complaints } = here;
    await page.goto('/');
    await plate(page).click();
    await page.keyboard.type('bbocb');
    await page.getByLabel('Maker').selectOption({ label: 'Brackwater Tractor Works' });
    await page.getByText('Two dates.').first().waitFor();
    expect(await candidates(page).getByRole('rowheader').allTextContents()).toEqual(['13 Jan 1941', '3 Nov 1941']);

    await page.getByLabel('Model').selectOption({ label: '30 Crawler' });
    await page.getByLabel('Serial as stamped').fill('3C 1207');
    await page.getByLabel('Where the part sits').selectOption({ label: 'Cylinder block' });
    await page.getByRole('button', { name: 'Check the fit' }).click();
    await settled(page);
    expect(await page.getByText('10 Feb – 10 Mar 1941, most likely').count()).toBe(1);
    expect(await candidates(page).getByText('28–56 days before it was built').count()).toBe(1);
    expect(complaints).toEqual([]);
  });

  it('can take the example and see the whole answer', async () => {
    const { page, complaints } = here;
    await page.goto('/decode');
    await page.getByRole('link', { name: 'BBOCB from a 30 Crawler' }).click();
    await settled(page);
    expect(complaints).toEqual([]);
  });

  it('can settle it with a gap', async () => {
    const { page } = here;
    await page.goto('/decode?mark=BBOCB&maker=brackwater-tractor-works');
    await page.getByText('Two dates.').first().waitFor();
    await plate(page).focus();
    await page.keyboard.press('Home');
    await page.keyboard.press('ArrowRight');
    await page.getByRole('button', { name: 'a gap' }).click();
    await candidates(page).getByRole('rowheader').first().waitFor();
    await page.getByText('13 Jan 1941.', { exact: true }).first().waitFor();
    expect(await plate(page).inputValue()).toBe('B-BOCB');
  });

  it('needs no maker', async () => {
    const { page, complaints } = here;
    await page.goto('/decode?mark=BBOCB');
    await page.getByText(/only the Brackwater ten-letter key can make this mark/).first().waitFor();
    expect(complaints).toEqual([]);
  });
});

describe('by keyboard alone', () => {
  it('reaches a verdict', async () => {
    const { page, complaints } = here;
    await page.goto('/decode');
    await page.getByRole('link', { name: 'BBOCB from a 30 Crawler' }).waitFor();
    await page.keyboard.press('Tab');
    expect(await page.evaluate(() => document.activeElement?.textContent)).toBe('Skip to the page');
    await page.keyboard.press('Enter');
    await tabTo(page, 'The mark on the casting');
    await page.keyboard.type('BB[OD');
    await page.keyboard.press('Enter');
    await page.keyboard.type('CB');
    expect(await plate(page).inputValue()).toBe('BB[OD]CB');
    await tabTo(page, 'Maker');
    await page.keyboard.type('Brack');
    await page.getByText('Two dates.').first().waitFor();
    await tabTo(page, 'Model');
    await page.keyboard.type('30 Crawler');
    await tabTo(page, 'Serial as stamped');
    await page.keyboard.type('3c1207');
    await page.keyboard.press('Enter');
    await settled(page);
    expect(complaints).toEqual([]);
  });

  it('is told what is missing, and led to it', async () => {
    const { page } = here;
    await page.goto('/decode');
    await page.getByRole('button', { name: 'Check the fit' }).focus();
    await page.keyboard.press('Enter');
    const summary = page.getByRole('alert').filter({ hasText: 'To hold the mark against a machine' });
    await summary.waitFor();
    expect(await summary.evaluate((element) => element === document.activeElement)).toBe(true);
    await summary.getByRole('link', { name: 'Type the serial as it is stamped' }).click();
    expect(await page.getByLabel('Serial as stamped').evaluate((element) => element === document.activeElement)).toBe(true);
  });

  it('edits a mark glyph by glyph', async () => {
    const { page } = here;
    await page.goto('/decode?mark=B%5BOD%5DCB');
    await plate(page).focus();
    await page.keyboard.press('End');
    await page.keyboard.press('ArrowLeft');
    await page.keyboard.press('ArrowLeft');
    await page.keyboard.press('Backspace');
    expect(await plate(page).inputValue()).toBe('BCB');
    await page.keyboard.press('Home');
    await page.keyboard.press('Delete');
    await page.keyboard.type('?');
    expect(await plate(page).inputValue()).toBe('?CB');
  });
});

describe('the address', () => {
  it('restores everything, and Back undoes the last choice', async () => {
    const { page, complaints } = here;
    await page.goto(FULL);
    await settled(page);
    expect(await plate(page).inputValue()).toBe('BBOCB');
    expect(await page.getByLabel('Serial as stamped').inputValue()).toBe('3C 1207');
    expect(await page.getByLabel('Where the part sits').inputValue()).toBe('cylinder-block');

    await page.getByLabel('Where the part sits').selectOption({ label: 'Manifold' });
    await page.getByText('No lead is on record for this position').waitFor();
    await page.goBack();
    await page.getByText('Accepted lead from casting to building, cylinder block').waitFor();
    expect(await page.getByLabel('Where the part sits').inputValue()).toBe('cylinder-block');
    expect(complaints).toEqual([]);
  });

  it('takes typing as one step, so that Back leaves the plate as it was before', async () => {
    const { page } = here;
    await page.goto('/decode?mark=RLKON&maker=brackwater-tractor-works');
    await page.getByText('25 Jul 1939.', { exact: true }).first().waitFor();
    await page.getByLabel('Maker').selectOption('');
    await page.waitForURL((url) => !url.searchParams.has('maker'));
    await plate(page).focus();
    await page.keyboard.press('End');
    await page.keyboard.type('N');
    await page.waitForURL((url) => url.searchParams.get('mark') === 'RLKONN');
    await page.goBack();
    await page.getByText('25 Jul 1939.', { exact: true }).first().waitFor();
    expect(await plate(page).inputValue()).toBe('RLKON');
  });

  it('holds what no register knows, and says so', async () => {
    const { page } = here;
    await page.goto('/decode?mark=BBOCB&maker=nobody-at-all');
    await page.getByText('No such maker is on record; choose another').waitFor();
    expect(await plate(page).inputValue()).toBe('BBOCB');
  });
});

describe('when the register fails', () => {
  const away = { status: 503, contentType: 'application/problem+json', headers: { 'Retry-After': '2' }, body: JSON.stringify({ type: '/problems/unavailable', title: 'The register is away for a moment', status: 503, detail: 'Away', requestId: 'drill-7' }) };

  it('says what happened, keeps what was typed, and goes on when asked again', async () => {
    const { page } = here;
    await page.route('**/api/decode', (route) => route.fulfill(away));
    await page.goto('/decode?mark=BBOCB');
    const alert = page.getByRole('alert').filter({ hasText: 'The register is away for a moment' });
    await alert.waitFor();
    expect(await alert.textContent()).toContain('drill-7');
    expect(await plate(page).inputValue()).toBe('BBOCB');
    expect(new URL(page.url()).searchParams.get('mark')).toBe('BBOCB');
    expect(await axeFindings(page)).toEqual([]);
    await page.unroute('**/api/decode');
    await alert.getByRole('button', { name: 'Ask again' }).click();
    await page.getByText('Two dates.').first().waitFor();
  });

  it('says beside the field that a list could not be loaded, and still decodes', async () => {
    const { page } = here;
    await page.route('**/api/makers*', (route) => route.abort());
    await page.goto('/decode?mark=BBOCB');
    await page.getByText('The register could not be reached').waitFor();
    await page.getByText('Two dates.').first().waitFor();
  });

  it('says that the device is offline', async () => {
    const { page } = here;
    await page.goto('/decode?mark=BBOCB');
    await page.getByText('Two dates.').first().waitFor();
    await page.context().setOffline(true);
    await plate(page).focus();
    await page.keyboard.press('End');
    await page.keyboard.type('B');
    await page.getByText('This device is offline').waitFor();
    expect(await plate(page).inputValue()).toBe('BBOCBB');
    await page.context().setOffline(false);
    await page.keyboard.press('Backspace');
    await page.getByText('Two dates.').first().waitFor();
  });
});

const STATES = {
  'an empty plate': { at: '/decode', shows: 'Nothing on the plate yet' },
  'a mark alone': { at: '/decode?mark=BBOCB&maker=brackwater-tractor-works', shows: 'Two dates.' },
  'a mark and a machine': { at: FULL, shows: 'In step if 13 Jan 1941' },
  'damage of every kind': { at: '/decode?mark=B%5BOD%5D%3F-*&maker=brackwater-tractor-works', shows: 'dates.' },
  'no date': { at: '/decode?mark=TKKOI&maker=brackwater-tractor-works&cipher=brackwater-ten-letter', shows: 'No date.' },
  'no cipher': { at: '/decode?mark=QQQQQQQQQQQQ', shows: 'No cipher on record can make this mark.' },
  'several ciphers': { at: '/decode?mark=A53', shows: 'ciphers can make this mark.' },
  'a character that is no glyph': { at: '/decode?mark=BB%C3%A9', shows: 'is no glyph' },
  'a serial no range holds': { at: FULL.replace('3C+1207', '9Z+77'), shows: 'has no build window.' },
  'a casting on the rule': { at: `${FULL}&casting=brackwater-b4406`, shows: 'Keep to those years' },
  'no such page': { at: '/nowhere', shows: 'Nothing stands at this address' },
  'a kind of problem': { at: '/problems/unavailable', shows: 'The register is away for a moment' },
} as const;

describe.each([
  ['by day on a phone', { ...SCREENS.phone, colorScheme: 'light' }],
  ['by night at a desk', { ...SCREENS.desk, colorScheme: 'dark' }],
] as const)('%s', (_, options) => {
  it.each(Object.entries(STATES))('%s has no axe finding, no complaint and no sideways scroll', async (_state, { at, shows }) => {
    const { page, complaints, end } = await visit(browser, inject('baseUrl'), options);
    await page.goto(at);
    await page.getByText(shows).first().waitFor();
    await pageStands(page);
    expect(await axeFindings(page)).toEqual([]);
    expect(await overflows(page)).toBe(false);
    expect(complaints).toEqual([]);
    await end();
  });
});

describe('a thumb in a glove', () => {
  it('finds every button, link of its own and field at least 44 px high', async () => {
    const { page, end } = await visit(browser, inject('baseUrl'), SCREENS.phone);
    await page.goto(FULL);
    await settled(page);
    const small = await page.locator('main button, main select, main input:not([type=checkbox]), main summary, nav a').evaluateAll((elements) =>
      elements.filter((element) => element.getBoundingClientRect().height < 44).map((element) => element.outerHTML.slice(0, 90)),
    );
    expect(small).toEqual([]);
    await end();
  });
});

/** Presses Tab until a control with this label has focus. */
async function tabTo(page: Page, label: string): Promise<void> {
  const wanted = page.getByLabel(label, { exact: true });
  for (let presses = 0; presses < 30; presses += 1) {
    await page.keyboard.press('Tab');
    if (await wanted.evaluate((element) => element === document.activeElement)) return;
  }
  throw new Error(`Tab never reached “${label}”`);
}
