import type { Browser, Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, inject, it } from 'vitest';
import { expectOnlyRefusals, signInOn, useSitePeople } from '#tests/support/browser-people.ts';
import { axeFindings, openBrowser, overflows, SCREENS, visit } from '#tests/support/browser.ts';
import type { Visit } from '#tests/support/browser.ts';
import { TOTP_SECRET } from '#tests/support/people.ts';

const people = useSitePeople();
let browser: Browser;
let author: Visit;
let moderator: Visit;

beforeAll(async () => {
  browser = await openBrowser();
});
afterAll(() => browser.close());
beforeEach(async () => {
  author = await visit(browser, inject('baseUrl'));
  moderator = await visit(browser, inject('baseUrl'));
});
afterEach(async () => {
  await author.end();
  await moderator.end();
});

const TITLE = 'Hesper bench key';
/** 25 July 1957 in the letters of WHITEFLOUR: L, HE, EL. */
const MARK = 'LHEEL';

const heading = (page: Page, name: string | RegExp) => page.getByRole('heading', { level: 1, name }).waitFor();
const press = (page: Page, name: string | RegExp) => page.getByRole('button', { name, exact: true }).click();
const faults = (page: Page) => page.getByRole('region', { name: 'Layout', exact: true }).getByRole('status').first();

async function choose(page: Page, label: string, text: string, name: string | RegExp): Promise<void> {
  await page.getByRole('combobox', { name: label, exact: true }).fill(text);
  await page.getByRole('option', { name }).first().click();
}

async function beginCipher(page: Page, displayName: string): Promise<void> {
  const { email } = await people.addMember({ displayName });
  await signInOn(page, email);
  await page.goto('/contribute/cipher');
  await page.waitForURL(/\/draft$/);
}

/** From the form over the preview to the moderators; answers the contribution's address. */
async function putForward(page: Page): Promise<string> {
  await press(page, 'Look it over');
  await press(page, 'Put forward');
  await page.getByText(/^Waits for a decision/).waitFor();
  return new URL(page.url()).pathname;
}

async function enter(page: Page, address: string, reason: string): Promise<void> {
  await page.goto(address);
  await page.getByRole('heading', { name: 'What the record says' }).waitFor();
  await page.getByLabel('Reason').fill(reason);
  await press(page, 'Enter it');
  await page.getByText('Entered it').first().waitFor();
}

/** What the decoder makes of the mark among the ciphers of the maker. */
async function decoded(page: Page, stands: string): Promise<void> {
  await page.goto(`/decode?mark=${MARK}&maker=hesper-lathe-company`);
  await page.getByText(stands, { exact: true }).first().waitFor();
}

describe('a cipher’s whole way', () => {
  it('is laid out, tried, put forward, entered, decoded with, changed and brought back', async () => {
    const { page } = author;
    await beginCipher(page, 'Bench Bracken');
    await choose(page, 'Maker', 'hesper', 'Hesper Lathe Company');
    await page.getByLabel('Title', { exact: true }).fill(TITLE);

    // A shape, a key word with a letter twice, and the same as it should be.
    await page.getByRole('button', { name: /^Ten-letter key/ }).click();
    await faults(page).getByText('Four faults to mend').waitFor();
    const keyWord = page.getByLabel('Key word of “key”');
    await keyWord.fill('WHITEFLOUW');
    await page.getByText('“W” comes twice, first and tenth: a letter can stand for one of them only').waitFor();
    await keyWord.fill('WHITEFLOUR');
    await page.getByLabel('First day').fill('1956-01-01');
    await page.getByLabel('Last day').fill('1959-12-31');
    await faults(page).getByText('No fault: the draft makes sense.').waitFor();
    await press(page, 'month');
    await page.getByRole('link', { name: 'Fourth field: Two fields claim the month' }).waitFor();
    await press(page, 'Take out: fourth field');

    // Tried while it is typed.
    await page.getByLabel('Day', { exact: true }).fill('1957-07-25');
    await page.getByRole('img', { name: `Mark ${[...MARK].join(', ')}` }).waitFor();
    await page.getByLabel('A mark', { exact: true }).click();
    await page.keyboard.type(MARK);
    await page.getByText('25 Jul 1957.', { exact: true }).first().waitFor();
    await page.getByText(/^\d+ marks of this maker on record$/).waitFor();
    expect(await axeFindings(page)).toEqual([]);

    await press(page, 'Describe a new source');
    await page.getByLabel('Kind of source').selectOption('sighting');
    await page.getByLabel('Title').last().fill('Bench of a Hesper');
    await page.getByLabel('What you saw').fill('The word cast along the edge of a pattern board');
    await page.getByLabel('Day', { exact: true }).last().fill('2026-02-11');
    const first = await putForward(page);

    // Found in the queue, its evidence seen, entered.
    const { email } = await people.addMember({ displayName: 'Deciding Dock', role: 'moderator', authenticator: true });
    await signInOn(moderator.page, email, { secret: TOTP_SECRET });
    await moderator.page.goto('/moderation?kind=cipher&maker=hesper-lathe-company');
    await moderator.page.getByRole('list', { name: 'The queue' }).getByRole('link', { name: TITLE }).click();
    await moderator.page.getByText(/As a moderator opened it/).waitFor();
    await decoded(page, 'No cipher of this maker can make this mark.');
    await enter(moderator.page, first, 'The board is in the museum’s store.');
    await decoded(page, '25 Jul 1957.');

    // Changed so that the mark falls outside its years, and brought back.
    await moderator.page.getByRole('link', { name: 'Every version of it' }).click();
    await heading(moderator.page, 'What changed');
    const history = new URL(moderator.page.url()).pathname;
    await page.goto(history);
    await page.getByRole('link', { name: 'Put a change forward' }).click();
    await page.getByLabel('Last day').fill('1956-12-31');
    await enter(moderator.page, await putForward(page), 'No mark of later years is known.');
    await decoded(page, 'No cipher of this maker can make this mark.');

    await moderator.page.goto(history);
    await moderator.page.getByRole('table', { name: 'What version 2 changed' }).getByRole('row', { name: /31 Dec 1959 31 Dec 1956/ }).waitFor();
    await press(moderator.page, 'Bring version 1 back');
    await moderator.page.getByLabel('Reason').fill('Three marks of 1957 have turned up.');
    await press(moderator.page, 'Enter it again');
    await moderator.page.getByText('Brought version 1 back.').waitFor();
    expect(await moderator.page.getByRole('heading', { level: 2 }).allTextContents()).toEqual(['Version 3', 'Version 2', 'Version 1']);
    expect(await axeFindings(moderator.page)).toEqual([]);
    await decoded(page, '25 Jul 1957.');
    await moderator.page.goto('/moderation/reworks');
    await moderator.page.getByRole('row').filter({ hasText: TITLE }).filter({ hasText: 'version 3' }).waitFor();
    expectOnlyRefusals([...author.complaints, ...moderator.complaints]);
  }, 120_000);
});

describe('the bench', () => {
  it('is worked by keyboard alone, on a phone, and keeps a draft that makes no sense', async () => {
    await author.end();
    author = await visit(browser, inject('baseUrl'), SCREENS.phone);
    const { page, complaints } = author;
    await beginCipher(page, 'Bench Burdock');
    await page.getByRole('button', { name: /^Year letters on a cycle/ }).press('Enter');
    await page.getByLabel('The first letter of “years” stands for').fill('1911');
    await page.getByLabel('Letters of “years” in order').fill('ABCD');
    await page.getByLabel('Symbol, second row of “years”').fill('A');
    await page.getByText('“A” is there twice', { exact: true }).waitFor();
    await page.getByRole('button', { name: 'Later: first field' }).press('Space');
    expect(await page.evaluate(() => document.activeElement?.getAttribute('aria-label'))).toBe('Later: second field');
    const widths = page.getByRole('group', { name: 'Glyphs in the first field' });
    await widths.getByRole('button', { name: 'At most: one more' }).press('Enter');
    expect(await widths.getByRole('status').allTextContents()).toEqual(['2', '3']);

    expect(await axeFindings(page)).toEqual([]);
    expect(await overflows(page)).toBe(false);
    const small = await page
      .getByRole('region', { name: 'Layout', exact: true })
      .locator('button, select, input:not([type=checkbox]), summary')
      .evaluateAll((elements) => elements.filter((element) => element.getBoundingClientRect().height < 44).map((element) => element.outerHTML.slice(0, 90)));
    expect(small).toEqual([]);

    await page.getByText(/^Saved \d\d:\d\d$/).waitFor();
    await page.reload();
    expect(await page.getByLabel('Symbol, second row of “years”').inputValue()).toBe('A');
    expect(await page.getByLabel('First field', { exact: true }).inputValue()).toBe('month');
    await page.getByText('“A” is there twice', { exact: true }).waitFor();
    expectOnlyRefusals(complaints);
  });
});
