import type { Browser, Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, inject, it } from 'vitest';
import { expectOnlyRefusals, fillSignIn, signInOn, useSitePeople } from '#tests/support/browser-people.ts';
import { axeFindings, openBrowser, overflows, pageStands, SCREENS, visit } from '#tests/support/browser.ts';
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

async function asRegistrar(page: Page): Promise<void> {
  const { email } = await people.addMember({ role: 'registrar', authenticator: true });
  await signInOn(page, email, { secret: TOTP_SECRET });
}

describe('the registrars’ pages', () => {
  it.each(['/registrar', '/registrar/members', '/registrar/audit'])('%s is not there for a visitor or a member', async (address) => {
    const { page } = here;
    await page.goto(address);
    await heading(page, 'Nothing stands at this address');
    const { email } = await people.addMember();
    await signInOn(page, email);
    expect(await page.getByRole('link', { name: 'Registrar' }).count()).toBe(0);
    await page.goto(address);
    await heading(page, 'Nothing stands at this address');
  });

  it('sends a registrar without a second factor to add one', async () => {
    const { page } = here;
    const { email } = await people.addMember({ role: 'registrar' });
    await signInOn(page, email);
    await page.waitForURL(/\/account#second-factors$/);
    await page.goto('/registrar/members');
    await heading(page, 'One step before this page');
    await page.getByRole('link', { name: 'Go to your second factors' }).click();
    await page.getByRole('button', { name: 'Add an authenticator' }).waitFor();
  });

  it('finds a member, suspends them for a reason, which ends their session at once, and lets them in again', async () => {
    const { page, complaints } = here;
    const { email, displayName } = await people.addMember({ displayName: 'Suspended Sedge' });
    const there = await visit(browser, inject('baseUrl'));
    try {
      await signInOn(there.page, email);
      await asRegistrar(page);
      await page.getByRole('link', { name: 'Registrar' }).click();
      await heading(page, 'Members');
      await page.getByLabel('Name or address').fill('ded sedge');
      await page.waitForURL(/q=ded\+sedge/);
      await page.getByRole('link', { name: displayName }).click();
      await heading(page, displayName);

      await press(page, 'Suspend');
      await press(page, 'Suspend the member');
      await page.getByRole('link', { name: 'Reason: Say why' }).waitFor();
      await page.getByLabel('Reason').fill('Entered serials of machines that were never made.');
      await press(page, 'Suspend the member');
      await page.getByRole('heading', { name: 'Suspended' }).waitFor();
      await page.getByText('Entered serials of machines that were never made.').waitFor();

      await there.page.goto('/account');
      await heading(there.page, 'Sign in first');
      await there.page.getByRole('main').getByRole('link', { name: 'Sign in' }).click();
      await fillSignIn(there.page, email);
      await there.page.getByRole('alert').waitFor();

      await page.getByRole('link', { name: 'What was done to them' }).click();
      await page.getByRole('table', { name: 'Audit trail' }).getByRole('row', { name: /suspended a member/ }).waitFor();
      await page.goBack();
      await press(page, 'Lift the suspension');
      await page.getByLabel('Reason').fill('A mistake of ours.');
      await page.getByRole('button', { name: 'Lift the suspension' }).last().click();
      await page.getByRole('button', { name: 'Suspend', exact: true }).waitFor();
      await fillSignIn(there.page, email);
      await there.page.getByRole('button', { name: 'Sign out' }).waitFor();
    } finally {
      await there.end();
    }
    expectOnlyRefusals(complaints);
  });

  it('makes a moderator of some makers, and asks which when none is named', async () => {
    const { page } = here;
    const { displayName } = await people.addMember({ displayName: 'Moderate Marl' });
    await asRegistrar(page);
    await page.goto('/registrar/members?q=Moderate');
    await page.getByRole('link', { name: displayName }).click();
    await press(page, 'Change the role');
    await page.getByLabel('Role', { exact: true }).selectOption('moderator');
    await press(page, 'Give this role');
    await page.getByRole('link', { name: 'Decides for: Name a maker, or choose all of them' }).waitFor();
    await page.getByRole('checkbox', { name: 'Skerry Foundry' }).check();
    await press(page, 'Give this role');
    await page.getByText('Moderator of Skerry Foundry').waitFor();
  });

  it('keeps the trail’s filters in the address', async () => {
    const { page, complaints } = here;
    await asRegistrar(page);
    await page.goto('/registrar/audit');
    const trail = page.getByRole('table', { name: 'Audit trail' });
    await page.getByLabel('Act', { exact: true }).selectOption('session.started');
    await page.waitForURL(/act=session.started/);
    await page.getByLabel('From day').fill('2020-01-02');
    await page.waitForURL(/since=2020-01-02T00/);
    await page.getByLabel('To day').fill('2020-01-03');
    await page.waitForURL(/until=2020-01-04T00/);
    await page.getByText('No act matches').first().waitFor();
    expect(await page.getByLabel('To day').inputValue()).toBe('2020-01-03');
    await page.getByLabel('To day').fill('');
    await trail.getByRole('row', { name: /signed in/ }).first().waitFor();
    await trail.getByRole('link').first().click();
    await page.getByText('Done by').waitFor();
    await page.getByRole('link', { name: 'Take away' }).click();
    await page.waitForURL((url) => !url.searchParams.has('actor'));
    expect(complaints).toEqual([]);
  });
});

const OPEN = ['/sign-up', '/sign-in', `/confirm?token=${'a'.repeat(43)}`, '/password/forgotten', `/password/new?token=${'a'.repeat(43)}`, `/unsubscribe/${'a'.repeat(43)}`, '/account', '/account/closed'];
const SIGNED_IN = ['/account', '/notices', '/registrar/members', '/registrar/audit'];

describe.each([
  ['a phone in the light', { ...SCREENS.phone, colorScheme: 'light' as const }],
  ['a phone in the dark', { ...SCREENS.phone, colorScheme: 'dark' as const }],
  ['a desk in the dark', { ...SCREENS.desk, colorScheme: 'dark' as const }],
  ['360 pixels', { viewport: { width: 360, height: 740 }, colorScheme: 'light' as const }],
])('on %s', (_name, screen) => {
  const expectClean = async (page: Page, address: string): Promise<void> => {
    await page.goto(address);
    await pageStands(page);
    expect([address, await axeFindings(page), await overflows(page), await smallTargets(page)]).toEqual([address, [], false, []]);
  };

  it('is clean to axe, no wider than the screen, and its targets are large enough for a thumb', async () => {
    const visitor = await visit(browser, inject('baseUrl'), screen);
    try {
      for (const address of OPEN) await expectClean(visitor.page, address);
      await visitor.page.goto('/sign-up');
      await press(visitor.page, 'Open the account');
      await visitor.page.getByRole('alert').waitFor();
      expect(await axeFindings(visitor.page)).toEqual([]);
      await asRegistrar(visitor.page);
      for (const address of SIGNED_IN) await expectClean(visitor.page, address);
      await visitor.page.goto('/account');
      for (const step of ['Change the address', 'Change the password', 'Close the account', 'Remove the authenticator']) await press(visitor.page, step);
      expect([await axeFindings(visitor.page), await overflows(visitor.page)]).toEqual([[], false]);
    } finally {
      await visitor.end();
    }
    // Axe goes through a dozen pages.
  }, 180_000);
});

/** Buttons, boxes and links of the header lower than 44 px. */
function smallTargets(page: Page): Promise<string[]> {
  return page.evaluate(() =>
    [...document.querySelectorAll<HTMLElement>('main button, main input:not([type=hidden], [type=checkbox]), main select, header a, header button')]
      .filter((element) => element.offsetParent !== null && element.getBoundingClientRect().height < 43.5)
      .map((element) => element.outerHTML.slice(0, 80)),
  );
}
