import type { Browser, Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, inject, it } from 'vitest';
import { openBrowser, visit } from '#tests/support/browser.ts';
import type { Visit } from '#tests/support/browser.ts';

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

const heading = (page: Page, name: string | RegExp) => page.getByRole('heading', { level: 1, name }).waitFor();
const castings = (page: Page) => page.getByRole('table', { name: 'Castings' });
const searchOf = (page: Page) => new URL(page.url()).searchParams;

describe('finding a casting', () => {
  it('goes from a half-read number to the casting and on to the decoder', async () => {
    const { page, complaints } = here;
    await page.goto('/catalogue');
    await page.getByLabel('Casting number').fill('b44?6');
    await page.getByRole('img', { name: 'Mark B, 4, 4, one that can’t be read, 6' }).waitFor();
    await page.getByRole('button', { name: 'Find the casting' }).click();
    await castings(page).getByRole('link', { name: 'B4406' }).click();

    await heading(page, /first pattern/);
    expect(await page.title()).toBe('B4406, first pattern, cylinder block · Pourbook');
    await page.getByText('July 1938 – March 1944').first().waitFor();
    await page.getByText('Three ribs, the middle one short.').first().waitFor();
    const belongs = page.getByRole('table', { name: 'Where it belongs' });
    expect(await belongs.getByRole('row', { name: /30 Crawler.*3C.1001–4120.*As built/ }).count()).toBe(1);
    expect(await belongs.getByRole('row', { name: /35 Crawler.*5C.1 on.*Earlier type, fits/ }).count()).toBe(1);
    await page.getByRole('complementary', { name: 'Before you work on it' }).waitFor();

    await page.getByRole('link', { name: 'Decode a date on this casting' }).click();
    await page.waitForURL(/\/decode/);
    expect(Object.fromEntries(searchOf(page))).toEqual({ maker: 'brackwater-tractor-works', casting: 'brackwater-b4406' });
    expect(complaints).toEqual([]);
  });

  it('narrows the decoder to the casting’s own years only for those who ask', async () => {
    const { page } = here;
    await page.goto('/castings/brackwater-b4406');
    await page.getByRole('link', { name: 'Only dates within 1938–1944' }).click();
    await page.waitForURL(/\/decode/);
    expect([searchOf(page).get('from'), searchOf(page).get('to')]).toEqual(['1938', '1944']);
  });

  it('says beside the box what can’t be read, and asks nothing', async () => {
    const { page } = here;
    await page.goto('/catalogue');
    await page.getByLabel('Casting number').fill('B[4');
    await page.getByRole('button', { name: 'Find the casting' }).click();
    await page.getByText('This bracket is never closed (character 2)').waitFor();
    expect(new URL(page.url()).pathname).toBe('/catalogue');
    await page.goto('/castings?number=B[4');
    await page.getByText('Not asked yet').waitFor();
    expect(await page.getByLabel('Casting number').getAttribute('aria-invalid')).toBe('true');
  });

  it('shows the sources beside the facts, with who entered them', async () => {
    const { page } = here;
    await page.goto('/castings/brackwater-b4406');
    await page.getByRole('link', { name: 'Brackwater parts book 14, 30 Crawler' }).first().waitFor();
    expect(await page.getByText(/Entered by Harrow Lane, 4 Mar 2026/).count()).toBeGreaterThan(0);
    const note = page.getByRole('link', { name: /^Note \d+$/ }).first();
    const number = (await note.textContent())?.trim() ?? '';
    await note.click();
    expect(new URL(page.url()).hash).toBe(`#note-${number}`);
    expect(await page.locator(`#note-${number}`).count()).toBe(1);
  });
});

describe('a list', () => {
  it('keeps its filters in the address, and Back undoes them', async () => {
    const { page, complaints } = here;
    await page.goto('/castings');
    await castings(page).getByRole('rowheader').first().waitFor();
    await page.getByLabel('Maker').selectOption({ label: 'Hesper Lathe Company' });
    await page
      .getByText(/^38 castings match$/)
      .first()
      .waitFor();
    await page.getByLabel('Part type').selectOption({ label: 'Headstock' });
    await page.waitForURL(/partType=headstock/);
    await page
      .getByText(/castings? match(es)?$/)
      .first()
      .waitFor();
    await page.goBack();
    expect(await page.getByLabel('Part type').inputValue()).toBe('');
    expect(await page.getByLabel('Maker').inputValue()).toBe('hesper-lathe-company');
    await page
      .getByText(/^38 castings match$/)
      .first()
      .waitFor();
    await page.goBack();
    expect(await page.getByLabel('Maker').inputValue()).toBe('');
    expect(complaints).toEqual([]);
  });

  it('goes on page by page, and a filter starts it from its beginning', async () => {
    const { page } = here;
    await page.goto('/castings');
    const first = await castings(page).getByRole('rowheader').first().textContent();
    await page.getByRole('link', { name: 'Next page' }).click();
    await page.waitForURL(/after=/);
    await page.getByRole('link', { name: 'First page' }).waitFor();
    await expect.poll(() => castings(page).getByRole('rowheader').first().textContent()).not.toBe(first);
    await expect.poll(() => page.evaluate(() => document.activeElement?.getAttribute('aria-label'))).toBe('Castings');
    await page.getByLabel('Maker').selectOption({ label: 'Skerry Foundry' });
    await page.waitForURL((url) => url.searchParams.get('maker') === 'skerry-foundry' && !url.searchParams.has('after'));
  });

  it('says when nothing matches and offers the way out', async () => {
    const { page } = here;
    await page.goto('/castings?number=ZZ9&maker=hesper-lathe-company');
    await page.getByText('No casting matches').first().waitFor();
    await page.getByRole('link', { name: 'Take all filters away' }).last().click();
    await castings(page).getByRole('rowheader').first().waitFor();
    expect([...searchOf(page)]).toEqual([]);
  });

  it('says when the place in the address is none of this list', async () => {
    const { page } = here;
    await page.goto('/castings?after=cut-short&maker=skerry-foundry');
    await page.getByRole('link', { name: 'First page' }).click();
    await castings(page).getByRole('rowheader').first().waitFor();
    expect(searchOf(page).get('maker')).toBe('skerry-foundry');
  });

  it.each([
    ['/makers', 'Makers and foundries', 'Skerry Foundry'],
    ['/models?maker=brackwater-tractor-works', 'Models', '30 Crawler'],
    ['/part-types?q=fly', 'Part types', 'Flywheel'],
    ['/ciphers?q=ten', 'Ciphers', 'Brackwater ten-letter key'],
    ['/serial-ranges?model=brackwater-30-crawler', 'Serial ranges', '3C\u00A01001–1390'],
    ['/sources?kind=drawing&q=4406', 'Sources', 'Works drawing 4406, sheet 2'],
  ])('%s', async (address, table, row) => {
    const { page, complaints } = here;
    await page.goto(address);
    await page.getByRole('table', { name: table, exact: true }).getByRole('link', { name: row, exact: true }).first().click();
    await page.getByRole('heading', { level: 1 }).waitFor();
    await page.waitForURL((url) => url.pathname.split('/').length === 3);
    expect(complaints).toEqual([]);
  });
});

describe('a model', () => {
  it('says when a serial was built, by every account, in place', async () => {
    const { page, complaints } = here;
    await page.goto('/models/brackwater-30-crawler');
    await page.getByLabel('Serial as stamped').fill('3c 12O7');
    await page.getByRole('button', { name: 'Find when it was built' }).click();
    await page.getByText('10 Feb – 10 Mar 1941').first().waitFor();
    expect(searchOf(page).get('serial')).toBe('3c 12O7');
    await page.getByText('Dated machines on either side narrow it.').waitFor();
    await page.getByText('Another account says:').waitFor();
    await page.getByText('Read O as 0.').waitFor();
    await page.getByRole('link', { name: 'Hold a mark against it' }).click();
    await page.waitForURL(/\/decode/);
    expect(Object.fromEntries(searchOf(page))).toEqual({
      maker: 'brackwater-tractor-works',
      model: 'brackwater-30-crawler',
      serial: '3c 12O7',
    });
    expect(complaints).toEqual([]);
  });

  it.each([
    ['3C 9999', /comes after the last number on record/],
    ['Q 12', /No series of this model has the prefix Q/],
    ['3C 3190', /stands in a gap/],
  ])('says what %s is, when no range holds it', async (serial, said) => {
    const { page } = here;
    await page.goto(`/models/brackwater-30-crawler?serial=${encodeURIComponent(serial)}`);
    await page.getByText(said).first().waitFor();
    expect(await page.getByRole('link', { name: 'Hold a mark against it' }).count()).toBe(0);
  });

  it('says beside the box that a serial is none', async () => {
    const { page } = here;
    await page.goto('/models/brackwater-30-crawler');
    await page.getByRole('button', { name: 'Find when it was built' }).click();
    await page.getByText('Type the serial as stamped').waitFor();
    await page.goto('/models/brackwater-30-crawler?serial=%F0%9F%94%A7');
    await expect.poll(() => page.getByLabel('Serial as stamped').getAttribute('aria-invalid')).toBe('true');
  });

  it('sets rival accounts side by side, marks the register’s own, and shows the gap', async () => {
    const { page } = here;
    await page.goto('/models/brackwater-30-crawler');
    const serials = page.getByRole('table', { name: 'Numbers of 3C' });
    await serials.getByRole('columnheader', { name: /the register’s reading/ }).waitFor();
    expect(
      await serials.getByRole('row', { name: /3C.1196–1228.*August 1938 – August 1941.*April 1941.*conjectural/ }).count(),
    ).toBe(1);
    expect(await serials.getByRole('row', { name: /a gap: nothing on record/ }).count()).toBe(1);
  });

  it('says which leads are on record and which are not', async () => {
    const { page } = here;
    await page.goto('/models/brackwater-30-crawler');
    const checklist = page.getByRole('table', { name: 'Checklist' });
    await checklist.getByRole('row', { name: /Cylinder block.*0–365 days/ }).waitFor();
    expect(await checklist.getByRole('row', { name: /Manifold.*no lead on record/ }).count()).toBe(1);
    await checklist.getByText('Caution').first().click();
    await checklist.getByText('Local codes and competent persons decide.').first().waitFor();
  });
});

describe('a cipher', () => {
  it('works another day when the reader takes one, and keeps it in the address', async () => {
    const { page, complaints } = here;
    await page.goto('/ciphers/brackwater-ten-letter');
    await page.getByText('Today’s choice; take any other').waitFor();
    await page.getByLabel('A day it was in use').fill('1939-07-25');
    await page.getByRole('img', { name: 'Mark R, L, K, O, N' }).waitFor();
    await page.getByText('25 Jul 1939', { exact: true }).first().waitFor();
    expect(searchOf(page).get('day')).toBe('1939-07-25');
    await page.goto('/ciphers/brackwater-ten-letter?day=1941-01-13');
    await page.getByRole('img', { name: 'Mark B, B, O, C, B' }).waitFor();
    await page.getByText('3 Nov 1941', { exact: true }).waitFor();
    await page.getByRole('link', { name: 'Take this mark to the decoder' }).click();
    await page.waitForURL(/\/decode/);
    expect(searchOf(page).get('mark')).toBe('BBOCB');
    expect(complaints).toEqual([]);
  });

  it('says when a day is outside its use, and works today’s choice', async () => {
    const { page } = here;
    await page.goto('/ciphers/brackwater-ten-letter?day=1960-01-01');
    await page.getByText('It was in use from 1 Jan 1928 to 31 Dec 1954').waitFor();
    expect(await page.getByRole('img', { name: /^Mark / }).count()).toBe(1);
  });

  it('spreads its key over the figures', async () => {
    const { page } = here;
    await page.goto('/ciphers/brackwater-ten-letter');
    const key = page.getByRole('table', { name: 'Symbols of key and the figures they stand for' });
    await key.waitFor();
    expect((await key.getByRole('columnheader').allTextContents()).join('')).toBe('BLOCKPRINT');
    expect((await key.getByRole('cell').allTextContents()).join('')).toBe('1234567890');
  });
});

describe('history and sources', () => {
  it('shows every version, newest first, and what each changed', async () => {
    const { page, complaints } = here;
    await page.goto('/ciphers/brackwater-ten-letter');
    await page.getByRole('link', { name: 'What changed' }).click();
    await heading(page, 'What changed');
    expect(await page.getByRole('heading', { level: 2 }).allTextContents()).toEqual(['Version 3', 'Version 2', 'Version 1']);
    expect(await page.getByText('In force').count()).toBe(1);
    await page
      .getByRole('table', { name: 'What version 3 changed' })
      .getByRole('row', { name: 'In use to 31 Dec 1950 31 Dec 1954' })
      .waitFor();
    expect(complaints).toEqual([]);
  });

  it.each([
    '/makers/skerry-foundry/history',
    '/models/brackwater-30-crawler/history',
    '/part-types/flywheel/history',
    '/castings/brackwater-b4406/history',
    '/sources/brackwater-parts-book-14/history',
  ])('%s', async (address) => {
    const { page, complaints } = here;
    await page.goto(address);
    await heading(page, 'What changed');
    await page.getByText('In force').waitFor();
    expect(complaints).toEqual([]);
  });

  it('shows what a source stands behind', async () => {
    const { page } = here;
    await page.goto('/sources/brackwater-drawing-4406-2');
    await heading(page, 'Works drawing 4406, sheet 2');
    await page
      .getByRole('region', { name: /^Castings?$/ })
      .getByRole('link', { name: /B4406/ })
      .first()
      .click();
    await heading(page, /first pattern/);
  });
});

describe('when it goes wrong', () => {
  it.each(['/castings/no-such-casting', '/makers/Not%20A%20Slug', '/ciphers/no-such/history'])(
    '%s is nothing, and says so',
    async (address) => {
      const { page } = here;
      await page.goto(address);
      await heading(page, 'Nothing stands at this address');
      await page.getByRole('link', { name: 'Open the catalogue' }).click();
      await heading(page, 'The catalogue');
    },
  );

  it('keeps a list’s page when the register is away, and asks again', async () => {
    const { page } = here;
    await page.route('**/api/castings?*', (route) => route.abort());
    await page.goto('/castings?q=gear');
    await page.getByRole('alert').getByText('The register could not be reached').waitFor();
    expect(await page.getByLabel('Words').inputValue()).toBe('gear');
    await page.unroute('**/api/castings?*');
    await page.getByRole('button', { name: 'Ask again' }).click();
    await castings(page).getByRole('rowheader').first().waitFor();
  });

  it('keeps a casting’s facts when only its cipher fails', async () => {
    const { page } = here;
    await page.route('**/api/ciphers/brackwater-ten-letter', (route) => route.abort());
    await page.goto('/castings/brackwater-b4406');
    await heading(page, /first pattern/);
    await page.getByRole('alert').getByText('The register could not be reached').waitFor();
    expect(await page.getByRole('table', { name: 'Where it belongs' }).count()).toBe(1);
  });

  it('keeps a model’s page when only the serial can’t be asked', async () => {
    const { page } = here;
    await page.route('**/build?*', (route) => route.abort());
    await page.goto('/models/brackwater-30-crawler?serial=3C1207');
    await page.getByRole('alert').getByText('The register could not be reached').waitFor();
    expect(await page.getByRole('table', { name: 'Checklist' }).count()).toBe(1);
  });

  it('holds the rows’ places while they are on their way', async () => {
    const { page } = here;
    await page.route('**/api/castings?*', () => undefined);
    await page.goto('/castings');
    await page.locator('table[aria-busy="true"]').waitFor();
    expect(await castings(page).locator('.skeleton-bar').count()).toBeGreaterThan(0);
  });
});

describe('for developers', () => {
  it('describes every operation from the description itself, and sends the examples', async () => {
    const { page, complaints } = here;
    await page.goto('/developers');
    await heading(page, 'For developers');
    const operation = page.locator('#readBuild');
    await operation.locator('summary').click();
    await operation
      .getByRole('table', { name: 'Parameters' })
      .getByRole('row', { name: /serial/ })
      .waitFor();
    await operation.getByRole('list', { name: 'readBuild, answer' }).getByText('standing').first().waitFor();
    await page
      .getByRole('region', { name: 'Whether the one fits the other', exact: true })
      .getByRole('button', { name: 'Send it' })
      .click();
    await page
      .getByRole('region', { name: 'Answer: Whether the one fits the other' })
      .getByText('"verdict": "unsettled"')
      .waitFor();
    await page.getByRole('link', { name: 'not-found', exact: true }).click();
    await heading(page, 'Nothing here');
    expect(complaints).toEqual([]);
  });
});
