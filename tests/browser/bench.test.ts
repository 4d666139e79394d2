import type { Browser, Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, inject, it } from 'vitest';
import { expectOnlyRefusals, signInOn, useSitePeople } from '#tests/support/browser-people.ts';
import { axeFindings, openBrowser, overflows, SCREENS, visit } from '#tests/support/browser.ts';
import type { Visit } from '#tests/support/browser.ts';
import { jpeg } from '#tests/support/photo-files.ts';

const people = useSitePeople();
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

const PICTURE = { width: 900, height: 600 };

const heading = (page: Page, name: string | RegExp) => page.getByRole('heading', { level: 1, name }).waitFor();
const press = (page: Page, name: string) => page.getByRole('button', { name, exact: true }).click();
const file = async (name: string) => ({ name, mimeType: 'image/jpeg', buffer: await jpeg(PICTURE) });
const choose = async (page: Page, ...names: readonly string[]) => page.getByLabel('Photos from this device').setInputFiles(await Promise.all(names.map(file)));
const chosen = (page: Page) => page.getByRole('list', { name: 'Photos chosen' }).getByRole('listitem');

/** Drawing by the processor makes the browser write that reading the picture back takes time; that is no fault of the page. */
const faultsOf = (complaints: readonly string[]) => complaints.filter((line) => !/GL Driver Message.*ReadPixels/.test(line));

async function asMember(page: Page, displayName: string): Promise<void> {
  const { email } = await people.addMember({ displayName });
  await signInOn(page, email);
}

/** Puts a part on record that has one photo and is called something, on the page. Answers its address. */
async function recordPart(page: Page, called: string, isPublic: boolean): Promise<string> {
  await page.goto('/bench/new');
  await choose(page, 'part.jpg');
  await chosen(page).first().waitFor();
  await page.getByLabel('In your own words').fill(called);
  if (isPublic) await page.getByRole('radio', { name: 'Public' }).check();
  await press(page, 'Put it on record');
  await heading(page, called);
  return new URL(page.url()).pathname;
}

/** Adds a date mark with the part's photo. Answers the mark's address. */
async function recordMark(page: Page): Promise<string> {
  await page.getByRole('link', { name: 'Add a mark' }).click();
  await heading(page, 'A new mark');
  await page.getByLabel('Kind of mark').selectOption('date-code');
  await press(page, 'Put it on record and read it');
  await page.waitForURL(/\/marks\/[^/]+\/read$/);
  return new URL(page.url()).pathname.replace(/\/read$/, '');
}

const read = (page: Page, mark: string, text: string) =>
  page.evaluate(
    async ({ path, body }) => {
      const response = await fetch(path, { method: 'POST', headers: { 'Content-Type': 'application/json' }, body });
      return response.status;
    },
    { path: `/api${mark}/readings`, body: JSON.stringify({ text, photoId: null }) },
  );

describe('a part from photos to the record', () => {
  it('is kept over a reload, stands on the bench in both views, and its mark in the record', async () => {
    const { page, complaints } = here;
    await asMember(page, 'Bench Bertha');
    await page.getByRole('link', { name: 'Bench', exact: true }).click();
    await heading(page, 'Your bench');
    await page.getByText('No parts on record yet').waitFor();
    await page.getByRole('link', { name: 'Put a part on record' }).click();
    await heading(page, 'A new part');

    // One that is no picture keeps no other from arriving.
    await page.getByLabel('Photos from this device').setInputFiles([await file('case.jpg'), { name: 'list.jpg', mimeType: 'image/jpeg', buffer: Buffer.from('a,b') }, await file('mark.jpg')]);
    await chosen(page).nth(1).waitFor();
    await page.getByRole('button', { name: 'Off the list list.jpg' }).waitFor();
    await page.locator('img[alt="Photo 1"][src*="/thumb-"]').waitFor();
    await page.getByLabel('In your own words').fill('Gear case with one ear');
    await page.getByLabel('Condition').fill('Cracked at the ear');
    await page.getByRole('radio', { name: 'Public' }).check();
    await page.getByText('Kept in this tab as you type').waitFor();
    await page.reload();
    await chosen(page).nth(1).waitFor();
    expect(await page.getByLabel('In your own words').inputValue()).toBe('Gear case with one ear');
    expect(await page.getByRole('radio', { name: 'Public' }).isChecked()).toBe(true);
    expect(await axeFindings(page)).toEqual([]);

    await page.getByLabel('Casting number, as you read it on the iron').fill('B[');
    await press(page, 'Put it on record');
    await page.getByRole('link', { name: /^Casting number: / }).waitFor();
    await page.getByLabel('Casting number, as you read it on the iron').fill('B44?6');
    await press(page, 'Put it on record');
    await heading(page, 'Gear case with one ear');
    expect(await axeFindings(page)).toEqual([]);
    const part = new URL(page.url()).pathname;

    await page.getByRole('link', { name: 'Add a mark' }).click();
    await heading(page, 'A new mark');
    expect(await axeFindings(page)).toEqual([]);
    await page.getByRole('list', { name: 'Photos of the part' }).getByRole('button', { name: 'Use it mark.jpg' }).click();
    await press(page, 'Put it on record and read it');
    await page.waitForURL(/\/marks\/[^/]+\/read$/);
    const mark = new URL(page.url()).pathname.replace(/\/read$/, '');
    expect(await read(page, mark, 'B[OD]CB')).toBe(201);

    await page.goto('/bench');
    await page.getByRole('row', { name: /Gear case with one ear/ }).getByLabel('Mark B, O or D, C, B').waitFor();
    await page.getByRole('link', { name: 'Contact sheet' }).click();
    await page.getByRole('list', { name: 'Your parts' }).getByRole('link', { name: /^Gear case with one ear/ }).waitFor();
    expect(await axeFindings(page)).toEqual([]);

    await page.goto('/marks?hasPhoto=true&number=B%5BOD%5DCB');
    await page.locator(`a[href="${mark}"]`).waitFor();
    await page.goto(mark);
    await page.getByText('1 of 1 reads all of it so; between 21 and 100 in 100 would.').waitFor();
    await page.getByText('Evidence: photographed').waitFor();

    await press(page, 'Take it back');
    await page.getByText('Your reading is taken back.').waitFor();
    await page.goto(part);
    await page.getByRole('link', { name: 'Read this mark Date mark, cast when poured' }).waitFor();
    expectOnlyRefusals(faultsOf(complaints));
  });
});

describe('who sees what', () => {
  it('shows a visitor what is public and nothing of what is private, and a second member the mark without its reading', async () => {
    const { page, complaints } = here;
    await asMember(page, 'Open Otto');
    const closed = await recordPart(page, 'Private pulley', false);
    await page.locator('main img[src*="/photos/"]').first().waitFor();
    const photo = await page.locator('main img[src*="/photos/"]').first().getAttribute('src');
    const open = await recordPart(page, 'Public pulley', true);
    const mark = await recordMark(page);
    expect(await read(page, mark, 'QQXYZ')).toBe(201);

    const visitor = await visit(browser, inject('baseUrl'));
    await visitor.page.goto(open);
    await heading(visitor.page, 'Public pulley');
    await visitor.page.getByLabel('Mark Q, Q, X, Y, Z').waitFor();
    expect(await visitor.page.getByRole('link', { name: 'Change what is on record' }).count()).toBe(0);
    await visitor.page.goto(mark);
    await visitor.page.getByText('1 of 1 reads all of it so; between 21 and 100 in 100 would.').waitFor();
    expect(await axeFindings(visitor.page)).toEqual([]);
    await visitor.page.goto(closed);
    await heading(visitor.page, 'Nothing stands at this address');
    expect((await visitor.page.request.get(photo ?? '')).status()).toBe(404);
    for (const [path, name] of [['/bench', 'The bench'], ['/marks/to-read', 'Marks to read']] as const) {
      await visitor.page.goto(path);
      await heading(visitor.page, name);
      await visitor.page.getByRole('main').getByRole('link', { name: 'Sign in' }).waitFor();
    }
    expect(await axeFindings(visitor.page)).toEqual([]);
    expectOnlyRefusals(visitor.complaints);
    await visitor.end();

    const second = await visit(browser, inject('baseUrl'), SCREENS.phone);
    await asMember(second.page, 'Second Selma');
    await second.page.goto('/marks/to-read?kind=date-code&limit=100');
    // Those asked for longest come first: this one was asked for last.
    const link = second.page.locator(`a[href="${mark}/read"]`);
    const next = second.page.getByRole('link', { name: 'Next page' });
    await second.page.getByRole('list', { name: 'Marks to read' }).getByRole('listitem').first().waitFor();
    expect(await axeFindings(second.page)).toEqual([]);
    while ((await link.count()) === 0) {
      const address = second.page.url();
      await next.click();
      await second.page.waitForURL((url) => url.href !== address);
      await second.page.waitForFunction(() => document.querySelector('[aria-busy=true]') === null);
    }
    expect(await second.page.getByText('QQXYZ').count() + (await second.page.getByLabel('Mark Q, Q, X, Y, Z').count())).toBe(0);
    await second.page.goto(mark);
    await heading(second.page, 'A mark to read');
    expect(await overflows(second.page)).toBe(false);
    expect(await axeFindings(second.page)).toEqual([]);
    await press(second.page, 'Show me what others read');
    await second.page.getByRole('row', { name: /Open Otto/ }).waitFor();
    await second.page.getByLabel('Mark Q, Q, X, Y, Z').first().waitFor();
    expectOnlyRefusals(second.complaints);
    await second.end();
    expectOnlyRefusals(faultsOf(complaints));
  });
});

describe('on a phone', () => {
  it('fits the screen, sends from camera or files, and says what changed in another window', async () => {
    const { page, complaints, end } = await visit(browser, inject('baseUrl'), SCREENS.phone);
    await asMember(page, 'Pocket Pia');
    const part = await recordPart(page, 'Pocket part', false);
    await page.goto(`${part}/change`);
    await heading(page, 'Change what is on record');
    await page.getByLabel('Condition').fill('Welded');
    expect(await axeFindings(page)).toEqual([]);
    const other = await page.context().newPage();
    await other.goto(`${part}/change`);
    await other.getByLabel('Note for yourself').fill('Under the bench');
    await press(other, 'Save the change');
    await heading(other, 'Pocket part');
    await press(page, 'Save the change');
    await page.getByText('It was changed meanwhile, perhaps in another window').waitFor();
    await page.getByText('now Under the bench').waitFor();
    expect(await page.getByLabel('Condition').inputValue()).toBe('Welded');
    for (const path of ['/bench', '/bench?view=sheet', '/bench/new', part, `${part}/change`, `${part}/marks/new`, '/marks', '/marks/to-read']) {
      await page.goto(path);
      await page.getByRole('heading', { level: 1 }).waitFor();
      expect([path, await overflows(page)]).toEqual([path, false]);
    }
    await page.goto('/marks');
    await page.getByRole('row').nth(1).waitFor();
    expect(await axeFindings(page)).toEqual([]);
    await page.goto(part);
    await press(page, 'Take it off the record');
    await press(page, 'Take it off for good');
    await heading(page, 'Your bench');
    await page.getByText('No parts on record yet').waitFor();
    expectOnlyRefusals(faultsOf(complaints));
    await end();
  });
});
