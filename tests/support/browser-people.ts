import type { Knex } from 'knex';
import { Secret, TOTP } from 'otpauth';
import type { Page } from 'playwright-core';
import { afterAll, beforeAll, expect, inject } from 'vitest';
import { z } from 'zod';
import { connect } from '#db/connection.ts';
import { MailMessage } from '#db/models/mail-message.ts';
import type { Member } from '#db/models/member.ts';
import { hashPassword } from '#server/services/people/passwords.ts';
import { insertMember, PASSWORD, TOTP_SECRET } from './people.ts';
import type { NewMember } from './people.ts';

export type SitePeople = {
  /** The database of the site that browser tests visit; what is written stays. */
  readonly knex: Knex;
  readonly addMember: (member?: NewMember) => Promise<Member & { email: string }>;
  /** The secret of the link in the last letter to an address, which waits to be sent. */
  readonly linkTo: (email: string) => Promise<string>;
};

/** People of the site that browser tests visit. */
export function useSitePeople(): SitePeople {
  let knex: Knex | undefined;
  let passwordHash = '';
  beforeAll(async () => {
    knex = connect(inject('siteDatabase'), { poolSize: 2 });
    passwordHash = await hashPassword(PASSWORD);
  });
  afterAll(() => knex?.destroy());
  const inHand = (): Knex => {
    if (knex === undefined) throw new Error('The people are there only while a test runs');
    return knex;
  };
  return {
    get knex() {
      return inHand();
    },
    addMember: (member) => insertMember(inHand(), passwordHash, member),
    linkTo: async (email) => {
      const letter = await MailMessage.query(inHand()).where({ toAddress: email }).orderBy('id', 'desc').first();
      return z.object({ token: z.string() }).parse(letter?.data).token;
    },
  };
}

/** What an authenticator with this secret shows now. */
export function codeOfNow(secret = TOTP_SECRET): string {
  return new TOTP({ secret: Secret.fromBase32(secret.replaceAll(' ', '')) }).generate();
}

/** Signs in on the page, with a code where the member has an authenticator, and waits until it is done. */
export async function signInOn(page: Page, email: string, { password = PASSWORD, secret }: { readonly password?: string; readonly secret?: string } = {}): Promise<void> {
  await page.goto('/sign-in');
  await fillSignIn(page, email, password);
  if (secret !== undefined) {
    await page.getByLabel('Six digits from your authenticator').fill(codeOfNow(secret));
    await page.getByRole('button', { name: 'Sign in', exact: true }).click();
  }
  await page.getByRole('button', { name: 'Sign out' }).waitFor();
}

export async function fillSignIn(page: Page, email: string, password = PASSWORD): Promise<void> {
  await page.getByRole('textbox', { name: 'E-mail address' }).fill(email);
  await page.getByLabel('Password', { exact: true }).fill(password);
  await page.getByRole('button', { name: 'Sign in', exact: true }).click();
}

/** Browsers write a line to the console for each answer that is a refusal; what else they write is a fault of the page. */
export function expectOnlyRefusals(complaints: readonly string[]): void {
  expect(complaints.filter((line) => !/^Failed to load resource: the server responded with a status of 4\d\d/.test(line))).toEqual([]);
}
