import type { Express } from 'express';
import type { Knex } from 'knex';
import supertest from 'supertest';
import { v7 as uuidV7 } from 'uuid';
import { afterAll, afterEach, beforeAll, beforeEach, expect, inject } from 'vitest';
import { z } from 'zod';
import { connect } from '#db/connection.ts';
import { AuditRow } from '#db/models/audit-row.ts';
import { Authenticator } from '#db/models/authenticator.ts';
import { MailMessage } from '#db/models/mail-message.ts';
import { Member } from '#db/models/member.ts';
import type { MemberRole } from '#domain/vocabulary.ts';
import { hashPassword } from '#server/services/people/passwords.ts';
import { appOver } from './app.ts';
import { keptLog } from './log.ts';
import type { KeptLog } from './log.ts';
import { cloneDatabase, dropDatabases, urlOf } from './test-databases.ts';

/** Where the tests' app is reached. */
export const ORIGIN = 'http://127.0.0.1:5080';
/** What members made by a test sign in with. */
export const PASSWORD = 'rivet, boss and draft angle';
/** A secret of an authenticator (RFC 4648 base32). */
export const TOTP_SECRET = 'GEZDGNBVGY3TQOJQGEZDGNBVGY3TQOJQ';

type AppSettings = NonNullable<Parameters<typeof appOver>[2]>;

export type NewMember = {
  readonly displayName?: string;
  readonly email?: string;
  readonly role?: MemberRole;
  readonly verified?: boolean;
  readonly authenticator?: boolean;
  readonly demo?: boolean;
};

export type TestPeople = {
  /** Commits: what a test writes stays until its file ends, so each test makes members of its own. */
  readonly knex: Knex;
  /** The database's address. */
  readonly url: string;
  readonly app: Express;
  readonly log: KeptLog;
  /** Another server over the same database. */
  readonly anotherApp: (settings: AppSettings) => Express;
  /** A browser of its own: cookies kept, same origin, a network address nobody else has unless one is given. */
  readonly browser: (options?: { readonly app?: Express; readonly network?: string; readonly userAgent?: string }) => supertest.Agent;
  readonly addMember: (member?: NewMember) => Promise<Member & { email: string }>;
  /** A browser in which the member is signed in. */
  readonly signedIn: (member: { readonly email: string }) => Promise<supertest.Agent>;
  /** Letters waiting to be sent to an address, the last first. */
  readonly lettersTo: (email: string) => Promise<readonly MailMessage[]>;
  /** The secret of the link in the last letter to an address. */
  readonly linkTo: (email: string) => Promise<string>;
  /** What the trail says of a member, in order. */
  readonly actsOf: (memberId: string) => Promise<readonly AuditRow[]>;
};

/**
 * A database of the test file's own, which requests commit to, and an app over it. A request that fails on our side fails the test.
 *
 * @param settings of the app, asked for before each test
 */
export function usePeople(settings: () => AppSettings = () => ({})): TestPeople {
  let knex: Knex | undefined;
  let name: string | undefined;
  let passwordHash = '';
  let current: { readonly app: Express; readonly log: KeptLog } | undefined;
  let browsers = 0;

  beforeAll(async () => {
    name = await cloneDatabase(inject('testRun'), inject('templateDatabase'));
    knex = connect(urlOf(inject('testRun').adminUrl, name));
    passwordHash = await hashPassword(PASSWORD);
  });
  beforeEach(() => {
    const log = keptLog();
    current = { app: appOver(inHand(knex), log, { trustProxy: ['loopback'], ...settings() }), log };
  });
  afterEach(() => {
    expect(inHand(current).log.takeErrors()).toEqual([]);
  });
  afterAll(async () => {
    await knex?.destroy();
    if (name !== undefined) await dropDatabases(inject('testRun').adminUrl, [name]);
  });

  const people: TestPeople = {
    get knex() {
      return inHand(knex);
    },
    get url() {
      return urlOf(inject('testRun').adminUrl, inHand(name));
    },
    get app() {
      return inHand(current).app;
    },
    get log() {
      return inHand(current).log;
    },
    anotherApp: (others) => appOver(inHand(knex), inHand(current).log, { trustProxy: ['loopback'], ...others }),
    browser: ({ app, network, userAgent } = {}) => {
      browsers += 1;
      const agent = supertest.agent(app ?? inHand(current).app).set('Origin', ORIGIN);
      void agent.set('X-Forwarded-For', network ?? `10.${browsers >> 16}.${(browsers >> 8) & 255}.${browsers & 255}`);
      watchSession(agent);
      if (userAgent !== undefined) void agent.set('User-Agent', userAgent);
      return agent;
    },
    addMember: (member) => insertMember(inHand(knex), passwordHash, member),
    signedIn: async ({ email }) => {
      const browser = people.browser();
      await browser.post('/api/sign-in').send({ email, password: PASSWORD }).expect(200);
      return browser;
    },
    lettersTo: async (email) => MailMessage.query(inHand(knex)).where({ toAddress: email }).orderBy('id', 'desc'),
    linkTo: async (email) => {
      const [letter] = await people.lettersTo(email);
      return z.object({ token: z.string() }).parse(letter?.data).token;
    },
    actsOf: async (memberId) => AuditRow.query(inHand(knex)).where({ subjectId: memberId }).orderBy(['at', 'id']),
  };
  return people;
}

/** Writes a member who signs in with the password behind `passwordHash`. */
export async function insertMember(
  knex: Knex,
  passwordHash: string,
  { displayName, email, role = 'member', verified = true, authenticator = false, demo = false }: NewMember = {},
): Promise<Member & { email: string }> {
  const id = uuidV7();
  const member = await Member.query(knex).insertAndFetch({
    id,
    displayName: displayName ?? `Member ${id.slice(-6)}`,
    email: email ?? `m${id.slice(-12)}@bench.example`,
    emailVerifiedAt: verified ? '2026-01-01T00:00:00Z' : null,
    passwordHash,
    role,
    scope: role === 'moderator' ? 'all' : 'none',
    demo,
  });
  if (authenticator) {
    await Authenticator.query(knex).insert({ memberId: id, secret: TOTP_SECRET, confirmedAt: '2026-01-01T00:00:00Z', lastStep: '0' });
  }
  return withEmail(member);
}

const sessions = new WeakMap<supertest.Agent, string>();

/** The value of the session cookie a browser holds; none when it holds none. */
export function sessionOf(browser: supertest.Agent): string | undefined {
  return sessions.get(browser);
}

/** Takes note of what answers tell the browser to keep or to forget. */
function watchSession(browser: supertest.Agent): void {
  void browser.use((request: supertest.Test) => {
    request.on('response', ({ headers }: supertest.Response) => {
      const values = [headers['set-cookie'] ?? []].flat().map((cookie) => /^(?:__Host-)?session=([^;]*)/.exec(cookie)?.[1]);
      for (const value of values) {
        if (value) sessions.set(browser, value);
        else if (value === '') sessions.delete(browser);
      }
    });
  });
}

function withEmail(member: Member): Member & { email: string } {
  const { email } = member;
  if (email === null) throw new Error('A member made by a test has an address');
  return Object.assign(member, { email });
}

function inHand<Value>(value: Value | undefined): Value {
  if (value === undefined) throw new Error('The people are there only while a test runs');
  return value;
}
