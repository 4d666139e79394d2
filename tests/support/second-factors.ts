import { Secret, TOTP } from 'otpauth';
import type { Knex } from 'knex';
import type supertest from 'supertest';
import { z } from 'zod';
import { Session } from '#db/models/session.ts';
import { PASSWORD, TOTP_SECRET } from './people.ts';
import type { TestPeople } from './people.ts';

const STEP = 30;
const Step = z.object({ step: z.number() });

/** The time step it is, by the database's clock. */
async function stepNow(knex: Knex): Promise<number> {
  const row: unknown = await knex.first(knex.raw('floor(extract(epoch from clock_timestamp()) / ?)::integer as step', [STEP]));
  return Step.parse(row).step;
}

/** Code of an authenticator for a time step. */
export function codeOfStep(step: number, secret = TOTP_SECRET): string {
  return new TOTP({ algorithm: 'SHA1', digits: 6, period: STEP, secret: Secret.fromBase32(secret) }).generate({ timestamp: step * STEP * 1_000 });
}

/** The code of now or, where that is used up, of so many steps later. */
export async function codeOfNow(knex: Knex, { secret = TOTP_SECRET, ahead = 0 }: { readonly secret?: string; readonly ahead?: number } = {}): Promise<string> {
  return codeOfStep((await stepNow(knex)) + ahead, secret);
}

/** Six digits that are the code of no step near now. */
export async function wrongCode(knex: Knex, secret = TOTP_SECRET): Promise<string> {
  const step = await stepNow(knex);
  const near = new Set([-2, -1, 0, 1, 2].map((offset) => codeOfStep(step + offset, secret)));
  return ['000000', '111111', '222222', '333333', '444444', '555555'].find((code) => !near.has(code)) ?? '666666';
}

/** Has the work, which is done with the step it is, done within that step: again where the clock moved on meanwhile. */
export async function inOneStep<Answer>(knex: Knex, work: (step: number) => Promise<Answer>): Promise<Answer> {
  for (;;) {
    const step = await stepNow(knex);
    const answer = await work(step);
    if ((await stepNow(knex)) === step) return answer;
  }
}

/** A browser in which a member with the tests' authenticator is signed in with it. */
export async function signedInFully(people: TestPeople, { email }: { readonly email: string }): Promise<supertest.Agent> {
  const browser = people.browser();
  await browser.post('/api/sign-in').send({ email, password: PASSWORD }).expect(200);
  const code = await codeOfNow(people.knex);
  await browser.post('/api/sign-in/second-factor').send({ way: 'authenticator', code }).expect(200);
  return browser;
}

/** Makes a member's last proof of identity eleven minutes old. */
export async function ageProof(memberId: string, knex: Knex): Promise<void> {
  await Session.query(knex)
    .where({ memberId })
    .patch({ startedAt: knex.raw(`now() - interval '20 minutes'`), confirmedAt: knex.raw(`now() - interval '11 minutes'`) });
}
