import type { Browser, Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, inject, it } from 'vitest';
import { expectOnlyRefusals, signInOn, useSitePeople } from '#tests/support/browser-people.ts';
import { axeFindings, openBrowser, overflows, SCREENS, visit } from '#tests/support/browser.ts';
import type { Visit } from '#tests/support/browser.ts';
import { TOTP_SECRET } from '#tests/support/people.ts';

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

const heading = (page: Page, name: string | RegExp) => page.getByRole('heading', { level: 1, name }).waitFor();
const press = (page: Page, name: string) => page.getByRole('button', { name, exact: true }).click();
const saved = (page: Page) => page.getByText(/^Saved \d\d:\d\d$/).waitFor();

async function choose(page: Page, label: string, text: string, name: string | RegExp): Promise<void> {
  await page.getByRole('combobox', { name: label, exact: true }).fill(text);
  await page.getByRole('option', { name }).first().click();
}

async function asMember(page: Page, displayName: string): Promise<void> {
  const { email } = await people.addMember({ displayName });
  await signInOn(page, email);
}

async function asModerator(page: Page, displayName: string): Promise<void> {
  const { email } = await people.addMember({ displayName, role: 'moderator', authenticator: true });
  await signInOn(page, email, { secret: TOTP_SECRET });
}

/** Drafts a casting of Brackwater with a sighting behind it, and looks it over. Answers the contribution's address. */
async function draftCasting(page: Page, number: string): Promise<string> {
  await page.goto('/contribute/casting');
  await page.waitForURL(/\/contributions\/[^/]+\/draft$/);
  await choose(page, 'Maker', 'brack', 'Brackwater Tractor Works');
  await choose(page, 'Part type', 'flyw', 'Flywheel');
  await page.getByLabel('Casting number').fill(number);
  await press(page, 'Describe a new source');
  await page.getByLabel('Kind of source').selectOption('sighting');
  await page.getByLabel('Title').fill(`Flywheel ${number}`);
  await page.getByLabel('What you saw').fill('A flywheel leaning on a barn');
  await page.getByLabel('Day', { exact: true }).fill('2026-02-11');
  await press(page, 'Look it over');
  await page.getByRole('heading', { name: 'The whole entry as it will stand' }).waitFor();
  return new URL(page.url()).pathname.replace(/\/draft$/, '');
}

describe('putting forward', () => {
  it('keeps a casting as it is typed, over a reload, says what is missing, and brings it to the queue', async () => {
    const { page, complaints } = here;
    await asMember(page, 'Forward Fern');
    await page.getByRole('link', { name: 'Contribute', exact: true }).click();
    await heading(page, 'Contribute');
    await page.getByRole('link', { name: 'Put a casting forward' }).click();
    await heading(page, 'A new casting');
    await choose(page, 'Maker', 'brack', 'Brackwater Tractor Works');
    await page.getByLabel('Casting number').fill('T 901');
    await saved(page);
    // Typed, and the page gone before it could be sent.
    await page.getByLabel('Note (optional)').fill('<b>Heavy</b>');
    await page.reload();
    await heading(page, 'A new casting');
    await saved(page);
    expect(await page.getByLabel('Casting number').inputValue()).toBe('T 901');
    expect(await page.getByLabel('Note (optional)').inputValue()).toBe('<b>Heavy</b>');
    expect(await page.getByRole('combobox', { name: 'Maker' }).inputValue()).toBe('Brackwater Tractor Works');

    await press(page, 'Look it over');
    await page.getByRole('link', { name: 'Sources: At least one source' }).waitFor();
    await page.getByRole('link', { name: 'Part type: Missing' }).click();
    expect(await page.evaluate(() => document.activeElement?.id)).toBe('draft-payload-partTypeId');
    await choose(page, 'Part type', 'flyw', 'Flywheel');
    await press(page, 'Add a tell');
    await page.getByLabel('Where', { exact: true }).fill('Rim');
    await page.getByLabel('What is seen there').fill('Two balance holes');
    await press(page, 'Cite a source on record');
    await choose(page, 'Source', 'parts book', /parts book/i);
    await page.getByLabel('Where in it').fill('page 12');
    await page.getByLabel('Stands behind').selectOption('tells.1');
    expect(await axeFindings(page)).toEqual([]);
    await press(page, 'Look it over');
    await page.getByRole('heading', { name: 'The whole entry as it will stand' }).waitFor();
    await page.getByText('<b>Heavy</b>').waitFor();
    expect(await axeFindings(page)).toEqual([]);
    await press(page, 'Put forward');
    await page.getByText(/^Waits for a decision/).waitFor();
    expect(await axeFindings(page)).toEqual([]);

    const desk = await visit(browser, inject('baseUrl'), SCREENS.phone);
    try {
      await asModerator(desk.page, 'Desk Quince');
      await desk.page.getByRole('link', { name: 'Queue', exact: true }).click();
      await desk.page.getByRole('link', { name: /T 901/ }).click();
      await desk.page.getByText('Two balance holes').waitFor();
      await desk.page.getByRole('heading', { name: 'What the record says' }).waitFor();
      expect(await overflows(desk.page)).toBe(false);
      expect(await axeFindings(desk.page)).toEqual([]);
    } finally {
      await desk.end();
    }
    expectOnlyRefusals(complaints);
  });
});

describe('deciding', () => {
  it('is done by one of two moderators; the other is told what the first did, and the author carries on', async () => {
    const { page, complaints } = here;
    await asMember(page, 'Author Ash');
    const address = await draftCasting(page, 'T 902');
    await press(page, 'Put forward');
    await page.getByText(/^Waits for a decision/).waitFor();

    const first = await visit(browser, inject('baseUrl'));
    const second = await visit(browser, inject('baseUrl'));
    try {
      await asModerator(first.page, 'First Flint');
      await asModerator(second.page, 'Second Slate');
      await second.page.goto(address);
      await second.page.getByRole('button', { name: 'Enter it' }).waitFor();
      await first.page.goto(address);
      await first.page.getByText('Second Slate has it open too').waitFor();
      await press(first.page, 'Send it back');
      await first.page.getByRole('link', { name: 'Reason: Say why' }).waitFor();
      await first.page.getByLabel('Reason').fill('Which side was the number on?');
      await press(first.page, 'Send it back');
      await first.page.getByText(/^Sent back/).waitFor();

      await second.page.getByLabel('Reason').fill('Agrees with the others.');
      await press(second.page, 'Enter it');
      await second.page.getByText(/First Flint sent it back .*Which side was the number on\?/).waitFor();
      await second.page.getByRole('heading', { name: 'What was decided' }).waitFor();
      expect(await second.page.getByRole('button', { name: 'Enter it' }).count()).toBe(0);

      await page.reload();
      await page.getByRole('link', { name: 'Go on with it' }).click();
      await page.getByText('First Flint sent it back').waitFor();
      await page.getByLabel('Pattern (optional)').fill('number on the left');
      await press(page, 'Look it over');
      await press(page, 'Put forward');
      await page.getByText(/^Waits for a decision/).waitFor();

      await second.page.reload();
      await second.page.getByLabel('Reason').fill('Agrees with the others.');
      await press(second.page, 'Enter it');
      await second.page.getByText(/^Entered\./).waitFor();
      await second.page.getByRole('link', { name: 'The entry in the catalogue' }).click();
      await heading(second.page, /number on the left/);
      await second.page.getByRole('link', { name: 'Put a change forward', exact: true }).click();
      await heading(second.page, /^A change to/);

      await page.goto('/contributions');
      await page.getByLabel('State', { exact: true }).selectOption('entered');
      await page.waitForURL(/state=entered/);
      await page.getByRole('row', { name: /T 902.*casting.*entered/ }).waitFor();
      await page.getByRole('link', { name: 'the page of what you gave' }).click();
      await heading(page, 'Author Ash');
      await page.getByRole('row', { name: /T 902.*in force/ }).waitFor();
      expect(await axeFindings(page)).toEqual([]);
    } finally {
      await first.end();
      await second.end();
    }
    expectOnlyRefusals(complaints);
  });
});

describe('a flag', () => {
  it('asks a visitor to sign in, and reaches the moderators with its reason', async () => {
    const { page, complaints } = here;
    await page.goto('/castings/brackwater-b4406');
    await page.getByText('Flag it', { exact: true }).click();
    await page.getByRole('main').getByRole('link', { name: 'Sign in' }).waitFor();
    await asModerator(page, 'Flag Fescue');
    await page.goto('/castings/brackwater-b4406');
    await page.getByText('Flag it', { exact: true }).click();
    await page.getByLabel('What is wrong').fill('The drawing shows a third rib.');
    await press(page, 'Tell the moderators');
    await page.getByText('The moderators have it in their queue.').waitFor();
    await page.getByRole('link', { name: 'Queue', exact: true }).click();
    await page.getByText('The drawing shows a third rib.').waitFor();
    expectOnlyRefusals(complaints);
  });
});
