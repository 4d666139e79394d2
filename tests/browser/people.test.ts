import { readFile } from 'node:fs/promises';
import type { Knex } from 'knex';
import type { Browser, Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, inject, it } from 'vitest';
import { Session } from '#db/models/session.ts';
import { notify } from '#server/services/notices/notify.ts';
import { codeOfNow, expectOnlyRefusals, fillSignIn, signInOn, useSitePeople } from '#tests/support/browser-people.ts';
import { openBrowser, visit } from '#tests/support/browser.ts';
import type { Visit } from '#tests/support/browser.ts';
import { PASSWORD, TOTP_SECRET } from '#tests/support/people.ts';

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
const focusedText = (page: Page) => page.evaluate(() => document.activeElement?.textContent ?? '');

describe('opening an account', () => {
  it('goes from the form by the letter’s link to signing in and out again', async () => {
    const { page, complaints } = here;
    const email = 'new.member@bench.example';
    await page.goto('/decode');
    await page.getByRole('link', { name: 'Sign in' }).click();
    await page.getByRole('link', { name: 'Open one' }).click();
    await heading(page, 'Open an account');
    await page.getByLabel('Name').fill('Wren Tollgate');
    await page.getByLabel('E-mail address').fill(email);
    await page.getByLabel('Password', { exact: true }).fill(PASSWORD);
    await press(page, 'Open the account');
    await page.getByText('A letter is on its way').waitFor();
    expect(await focusedText(page)).toContain(email);

    const token = await people.linkTo(email);
    await page.goto(`/confirm?token=${token}`);
    await press(page, 'Confirm the address');
    await page.getByText('The address is confirmed').waitFor();

    await page.getByRole('main').getByRole('link', { name: 'Sign in' }).click();
    await fillSignIn(page, email);
    await page.waitForURL(/\/decode/);
    await page.getByRole('link', { name: /Wren Tollgate/ }).waitFor();
    await press(page, 'Sign out');
    await heading(page, 'Sign in');
    await page.goto(`/confirm?token=${token}`);
    await press(page, 'Confirm the address');
    await page.getByText('This link does not work, or no longer').waitFor();
    expectOnlyRefusals(complaints);
  });

  it('uses no link up by opening its page, so that a program that looks through letters takes nothing away', async () => {
    const { page } = here;
    const email = 'scanned@bench.example';
    await page.goto('/sign-up');
    await page.getByLabel('Name').fill('Scanned Letter');
    await page.getByLabel('E-mail address').fill(email);
    await page.getByLabel('Password', { exact: true }).fill(PASSWORD);
    await press(page, 'Open the account');
    await page.getByText('A letter is on its way').waitFor();
    const token = await people.linkTo(email);
    await page.goto(`/confirm?token=${token}`);
    await page.goto(`/confirm?token=${token}`);
    await press(page, 'Confirm the address');
    await page.getByText('The address is confirmed').waitFor();
  });

  it('says in a summary and beside each box what is wrong, and keeps what was typed', async () => {
    const { page, complaints } = here;
    await page.goto('/sign-up');
    await page.getByLabel('Name').fill('Wren');
    await page.getByLabel('E-mail address').fill('no address');
    await page.getByLabel('Password', { exact: true }).fill('tenletters');
    await press(page, 'Open the account');
    await page.getByRole('alert').getByRole('link', { name: /^E-mail address: / }).waitFor();
    expect(await focusedText(page)).toContain('The account is not open yet');
    expect(await page.getByLabel('E-mail address').getAttribute('aria-invalid')).toBe('true');

    await page.getByLabel('E-mail address').fill('wren@bench.example');
    await press(page, 'Open the account');
    // Only the register knows this rule; its word stands where the form's own did.
    await page.getByRole('link', { name: 'Password: At least 15 characters' }).click();
    await expect.poll(() => page.evaluate(() => document.activeElement?.getAttribute('name'))).toBe('password');
    expect(await page.getByLabel('Password', { exact: true }).inputValue()).toBe('tenletters');
    expect(await page.getByLabel('Name').inputValue()).toBe('Wren');
    expectOnlyRefusals(complaints);
  });

  it('shows a password to whoever asks, and hides it again', async () => {
    const { page } = here;
    await page.goto('/sign-up');
    const box = page.getByLabel('Password', { exact: true });
    await box.fill('as one types');
    const toggle = page.getByRole('button', { name: 'password' });
    expect(await box.getAttribute('type')).toBe('password');
    await toggle.click();
    expect(await box.getAttribute('type')).toBe('text');
    expect(await toggle.getAttribute('aria-pressed')).toBe('true');
    await toggle.click();
    expect(await box.getAttribute('type')).toBe('password');
    expect(await box.inputValue()).toBe('as one types');
  });

  it('tells password managers what each box is', async () => {
    const { page } = here;
    const completes = () => page.locator('main input:not([type=hidden])').evaluateAll((boxes) => boxes.map((box) => box.getAttribute('autocomplete')));
    await page.goto('/sign-up');
    await heading(page, 'Open an account');
    expect(await completes()).toEqual(['nickname', 'username', 'new-password']);
    await page.goto('/sign-in');
    await heading(page, 'Sign in');
    expect(await completes()).toEqual(['username', 'current-password']);
  });
});

describe('signing in', () => {
  it('says the same of a wrong password and of an address nobody has', async () => {
    const { page, complaints } = here;
    const { email } = await people.addMember();
    const said: string[] = [];
    for (const address of [email, 'nobody.at.all@bench.example']) {
      await page.goto('/sign-in');
      await fillSignIn(page, address, 'not the password of anybody');
      await page.getByRole('alert').waitFor();
      said.push((await page.getByRole('alert').textContent()) ?? '');
      expect(await page.getByLabel('E-mail address').inputValue()).toBe(address);
    }
    expect(said[0]).toContain('Address and password do not go together');
    expect(said[1]).toBe(said[0]);
    expectOnlyRefusals(complaints);
  });

  it('comes back to the page that asked for it, and never leads to another site', async () => {
    const { page } = here;
    const { email } = await people.addMember();
    await page.goto('/notices?unread=true');
    await page.getByRole('main').getByRole('link', { name: 'Sign in' }).click();
    await fillSignIn(page, email);
    await heading(page, 'Notices');
    expect(new URL(page.url()).search).toBe('?unread=true');
    await page.goto('/sign-in?next=//elsewhere.example/');
    await page.waitForURL(/\/decode/);
    expect(new URL(page.url()).origin).toBe(inject('baseUrl'));
  });

  it('sets a new password by the letter’s link', async () => {
    const { page } = here;
    const { email } = await people.addMember();
    await page.goto('/sign-in');
    await page.getByRole('link', { name: 'You forgot the password' }).click();
    await heading(page, 'Set a new password');
    await page.getByLabel('E-mail address').fill(email);
    await press(page, 'Send the link');
    await page.getByText('A letter is on its way').waitFor();
    const token = await people.linkTo(email);
    await page.goto(`/password/new?token=${token}`);
    await page.getByLabel('New password', { exact: true }).fill('a boss beside the third rib');
    await press(page, 'Set the password');
    await page.getByText('The new password is set').waitFor();
    await page.getByRole('main').getByRole('link', { name: 'Sign in' }).click();
    await fillSignIn(page, email, PASSWORD);
    await page.getByText('Address and password do not go together').waitFor();
    await fillSignIn(page, email, 'a boss beside the third rib');
    await page.getByRole('button', { name: 'Sign out' }).waitFor();
    await page.goto(`/password/new?token=${token}`);
    await page.getByLabel('New password', { exact: true }).fill('another boss beside the rib');
    await press(page, 'Set the password');
    await page.getByText('This link does not work, or no longer').waitFor();
  });

  it('keeps what was typed when the register is out of reach, and says so', async () => {
    const { page } = here;
    await page.goto('/sign-in');
    await page.route('**/api/sign-in', (route) => route.abort());
    await fillSignIn(page, 'far.away@bench.example');
    await page.getByRole('alert').getByText('The register could not be reached').waitFor();
    expect(await page.getByLabel('Password', { exact: true }).inputValue()).toBe(PASSWORD);
  });

  it('works without a mouse', async () => {
    const { page } = here;
    const { email } = await people.addMember();
    await page.goto('/sign-in');
    await heading(page, 'Sign in');
    await page.getByLabel('E-mail address').focus();
    await page.keyboard.type(email);
    await page.keyboard.press('Tab');
    await page.keyboard.type(PASSWORD);
    await page.keyboard.press('Enter');
    await page.getByRole('button', { name: 'Sign out' }).waitFor();
    await page.getByRole('link', { name: /^Your account/ }).focus();
    await page.keyboard.press('Enter');
    await page.getByRole('button', { name: 'Change the name' }).focus();
    await page.keyboard.press('Enter');
    await expect.poll(() => page.evaluate(() => document.activeElement?.getAttribute('name'))).toBe('displayName');
    await page.keyboard.press('Control+A');
    await page.keyboard.type('Keyed Only');
    await page.keyboard.press('Enter');
    await heading(page, 'Keyed Only');
    await expect.poll(() => focusedText(page)).toBe('Change the name');
  });
});

describe('second factors', () => {
  it('adds an authenticator, shows recovery codes once, and asks for it at the next sign-in', async () => {
    const { page, complaints } = here;
    const { email } = await people.addMember();
    await signInOn(page, email);
    await page.goto('/account');
    await press(page, 'Add an authenticator');
    await press(page, 'Show the square');
    await page.getByRole('img', { name: /^QR code/ }).waitFor();
    const secret = (await page.locator('code').first().textContent()) ?? '';
    await page.getByLabel('Six digits it shows now').fill('12345');
    await press(page, 'Add the authenticator');
    await page.getByRole('link', { name: 'Code: Six digits' }).waitFor();
    await page.getByLabel('Six digits it shows now').fill(codeOfNow(secret));
    await press(page, 'Add the authenticator');
    await heading(page, 'Recovery codes');
    const codes = await page.getByRole('list', { name: 'Recovery codes' }).getByRole('listitem').allTextContents();
    expect(new Set(codes).size).toBeGreaterThan(5);
    await press(page, 'I have kept them');
    await page.getByRole('button', { name: 'Remove the authenticator' }).waitFor();

    await press(page, 'Sign out');
    await fillSignIn(page, email);
    await page.getByText('One more step shows that it is you').waitFor();
    await press(page, 'Use a recovery code');
    await page.getByLabel('Recovery code').fill(codes[0] ?? '');
    await press(page, 'Sign in');
    await page.getByRole('button', { name: 'Sign out' }).waitFor();
    await press(page, 'Sign out');
    await fillSignIn(page, email);
    await press(page, 'Use a recovery code');
    await page.getByLabel('Recovery code').fill(codes[0] ?? '');
    await press(page, 'Sign in');
    await page.getByRole('alert').getByText(/does not work/).waitFor();
    expectOnlyRefusals(complaints);
  });

  it('signs in with the code of now', async () => {
    const { page } = here;
    const { email } = await people.addMember({ authenticator: true });
    await signInOn(page, email, { secret: TOTP_SECRET });
    await page.goto('/account');
    await page.getByRole('table', { name: 'Where you are signed in' }).getByText('second factor').waitFor();
  });

  it('begins at the first step again where one signs out before the next page is there', async () => {
    const { page } = here;
    const { email } = await people.addMember({ authenticator: true });
    let letThrough: () => void = () => undefined;
    const held = new Promise<void>((resolve) => {
      letThrough = resolve;
    });
    await page.route(/\/decode-page[^/]*\.js$/, async (route) => {
      await held;
      await route.continue();
    });
    await signInOn(page, email, { secret: TOTP_SECRET });
    await press(page, 'Sign out');
    await page.getByRole('textbox', { name: 'E-mail address' }).waitFor();
    letThrough();
    await page.unrouteAll({ behavior: 'wait' });
  });

  it('adds a passkey, signs in with it alone, and removes it', async () => {
    const { page, complaints } = here;
    const debuggerOf = await page.context().newCDPSession(page);
    await debuggerOf.send('WebAuthn.enable');
    await debuggerOf.send('WebAuthn.addVirtualAuthenticator', {
      options: { protocol: 'ctap2', transport: 'internal', hasResidentKey: true, hasUserVerification: true, isUserVerified: true, automaticPresenceSimulation: true },
    });
    const { email } = await people.addMember();
    await signInOn(page, email);
    await page.goto('/account');
    await press(page, 'Add a passkey');
    await page.getByLabel('A name for it').fill('The key on the ring');
    await press(page, 'Make the passkey');
    await heading(page, 'Recovery codes');
    await press(page, 'I have kept them');
    const passkeys = page.getByRole('table', { name: 'Passkeys' });
    await passkeys.getByRole('row', { name: /The key on the ring.*not yet/ }).waitFor();

    await press(page, 'Sign out');
    await press(page, 'Sign in with a passkey');
    await page.getByRole('button', { name: 'Sign out' }).waitFor();
    await press(page, 'Sign out');
    await fillSignIn(page, email);
    await press(page, 'Use the passkey');
    await page.getByRole('button', { name: 'Sign out' }).waitFor();

    await page.goto('/account');
    await press(page, 'Remove The key on the ring');
    await passkeys.waitFor({ state: 'detached' });
    await debuggerOf.detach();
    expect(complaints).toEqual([]);
  });

  it('says so when the device holds no passkey for this site', async () => {
    const { page } = here;
    const debuggerOf = await page.context().newCDPSession(page);
    await debuggerOf.send('WebAuthn.enable');
    await debuggerOf.send('WebAuthn.addVirtualAuthenticator', {
      options: { protocol: 'ctap2', transport: 'internal', hasResidentKey: true, hasUserVerification: true, isUserVerified: true, automaticPresenceSimulation: true },
    });
    await page.goto('/sign-in');
    await press(page, 'Sign in with a passkey');
    await page.getByRole('alert').getByText(/The passkey was not used/).waitFor();
    await debuggerOf.detach();
  });

  it('asks once more who is there when the last proof is old, in line, and goes on', async () => {
    const { page, complaints } = here;
    const { id, email } = await people.addMember();
    await signInOn(page, email);
    await page.goto('/account');
    await Session.query(people.knex).where({ memberId: id }).patch(elevenMinutesAgo(people.knex));
    const download = page.waitForEvent('download');
    await press(page, 'Save my data');
    const asked = page.getByRole('group', { name: 'Prove once more who you are' });
    await asked.getByLabel('Your password').fill('not the password of anybody');
    await asked.getByRole('button', { name: 'Go on' }).click();
    await asked.getByRole('link', { name: /Not your password/ }).waitFor();
    await asked.getByLabel('Your password').fill(PASSWORD);
    await asked.getByRole('button', { name: 'Go on' }).click();
    const file = await download;
    expect(file.suggestedFilename()).toMatch(/^pourbook-\d{4}-\d\d-\d\d\.json$/);
    expect(JSON.parse(await readFile(await file.path(), 'utf8'))).toMatchObject({ account: { id, email } });
    await asked.waitFor({ state: 'detached' });
    expectOnlyRefusals(complaints);
  });
});

describe('sessions', () => {
  it('ends one elsewhere, which is then asked to sign in', async () => {
    const { page } = here;
    const { email } = await people.addMember();
    await signInOn(page, email);
    const there = await visit(browser, inject('baseUrl'));
    try {
      await signInOn(there.page, email);
      await page.goto('/account');
      const table = page.getByRole('table', { name: 'Where you are signed in' });
      await table.getByRole('row').nth(2).waitFor();
      await table.getByRole('button').click();
      await expect.poll(() => table.getByRole('rowheader').count()).toBe(1);
      await there.page.goto('/account');
      await heading(there.page, 'Sign in first');
      await page.reload();
      await heading(page, /Member/);
    } finally {
      await there.end();
    }
  });

  it('signs out in one tab and so in the other, which shows nothing private any more', async () => {
    const { page } = here;
    const { email } = await people.addMember();
    await signInOn(page, email);
    const other = await page.context().newPage();
    await other.goto('/account');
    await other.getByText(email).first().waitFor();
    await page.bringToFront();
    await press(page, 'Sign out');
    await heading(page, 'Sign in');
    await heading(other, 'Sign in first');
    expect(await other.getByText(email).count()).toBe(0);
    await page.goBack();
    expect(await page.getByRole('button', { name: 'Sign out' }).count()).toBe(0);
  });

  it('offers to sign in when a session ended meanwhile, and comes back', async () => {
    const { page } = here;
    const { id, email } = await people.addMember();
    await signInOn(page, email);
    await page.goto('/account');
    await page.getByRole('checkbox', { name: 'Messages' }).waitFor();
    await Session.query(people.knex).where({ memberId: id }).delete();
    await page.getByRole('checkbox', { name: 'Messages' }).click();
    await heading(page, 'Sign in first');
    await page.getByRole('main').getByRole('link', { name: 'Sign in' }).click();
    await fillSignIn(page, email);
    await page.waitForURL(/\/account$/);
  });

  it('closes the account for good', async () => {
    const { page } = here;
    const { email } = await people.addMember();
    await signInOn(page, email);
    await page.goto('/account');
    await press(page, 'Close the account');
    await press(page, 'Close the account for good');
    await page.getByRole('link', { name: 'Password: Type your password' }).waitFor();
    await page.getByLabel('Your password').fill(PASSWORD);
    await press(page, 'Close the account for good');
    await heading(page, 'Your account is closed');
    await page.goto('/sign-in');
    await fillSignIn(page, email);
    await page.getByText('Address and password do not go together').waitFor();
  });
});

describe('notices', () => {
  it('counts them on the bell, lists them, and marks them read', async () => {
    const { page, complaints } = here;
    const { id, email } = await people.addMember();
    await people.knex.transaction(async (trx) => {
      for (let number = 1; number <= 60; number += 1) {
        await notify({ memberId: id, kind: 'account', title: `Notice ${number}`, body: 'Read me.', href: number === 60 ? '/catalogue' : null }, trx);
      }
    });
    await signInOn(page, email);
    await page.getByRole('link', { name: 'Notices 60 not read' }).click();
    await heading(page, 'Notices');
    const list = page.getByRole('list', { name: 'Notices' });
    await list.getByRole('link', { name: 'Notice 60' }).waitFor();
    const before = await list.getByRole('listitem').count();
    await press(page, 'Show more');
    await expect.poll(() => list.getByRole('listitem').count()).toBeGreaterThan(before);

    await page.getByRole('button', { name: 'Mark read Notice 59' }).click();
    await page.getByRole('link', { name: 'Notices 59 not read' }).waitFor();
    await list.getByRole('link', { name: 'Notice 60' }).click();
    await heading(page, 'The catalogue');
    await page.getByRole('link', { name: 'Notices 58 not read' }).click();
    await page.getByRole('link', { name: 'Only those not read' }).click();
    await expect.poll(() => list.getByText(/Notice (?:59|60)$/).count()).toBe(0);
    await press(page, 'Mark all read');
    await page.getByText('Nothing new').waitFor();
    await page.getByRole('link', { name: 'Notices', exact: true }).waitFor();
    expect(complaints).toEqual([]);
  });

  it('keeps which kinds also come by e-mail', async () => {
    const { page } = here;
    const { email } = await people.addMember();
    await signInOn(page, email);
    await page.goto('/account#notices');
    const box = page.getByRole('checkbox', { name: 'Messages' });
    await box.waitFor();
    expect(await box.isChecked()).toBe(true);
    await box.click();
    await page.getByText('Kept.').waitFor();
    await page.reload();
    await box.waitFor();
    expect(await box.isChecked()).toBe(false);
  });

  it('stops letters of a kind by a press, and says when the link is none', async () => {
    const { page, complaints } = here;
    await page.goto(`/unsubscribe/${'x'.repeat(43)}`);
    await press(page, 'Stop these letters');
    await page.getByText('This link is none of ours').waitFor();
    const { id, email } = await people.addMember();
    await people.knex.transaction((trx) => notify({ memberId: id, kind: 'reading', title: 'A reading', body: 'Of your mark.', href: null }, trx));
    const row: unknown = await people.knex('mail_messages').where({ toAddress: email }).first('data');
    const token = /"unsubscribeToken":"([\w-]{43})"/.exec(JSON.stringify(row))?.[1] ?? '';
    await page.goto(`/unsubscribe/${token}`);
    await press(page, 'Stop these letters');
    await page.getByText('No more letters come about readings of marks.').waitFor();
    expectOnlyRefusals(complaints);
  });
});

/** A session that began, and was last confirmed, longer ago than a proof lasts. */
function elevenMinutesAgo(knex: Knex) {
  const then = knex.raw(`now() - interval '11 minutes'`);
  return { startedAt: then, confirmedAt: then };
}

it('has no local post where letters are sent', async () => {
  const { page } = here;
  await page.goto('/post');
  await heading(page, 'Nothing stands at this address');
});
