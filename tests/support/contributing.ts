import type supertest from 'supertest';
import { v7 as uuidV7 } from 'uuid';
import { z } from 'zod';
import { ContributionPage } from '#contract/contributions.ts';
import { FactHistory } from '#contract/facts.ts';
import { AuditRow } from '#db/models/audit-row.ts';
import { FactName } from '#db/models/fact-name.ts';
import { Maker } from '#db/models/maker.ts';
import { MemberScope } from '#db/models/member-scope.ts';
import { Member } from '#db/models/member.ts';
import { Session } from '#db/models/session.ts';
import type { SignInStrength } from '#db/vocabulary.ts';
import type { FactKind, MemberRole } from '#domain/vocabulary.ts';
import { hashOfSecret, newSecret } from '#server/services/people/secrets.ts';
import type { TestPeople } from './people.ts';

export type Browser = supertest.Agent;
export type SomeoneSignedIn = { readonly id: string; readonly displayName: string; readonly browser: Browser };

export type Someone = {
  readonly role?: MemberRole;
  /** Slugs of the makers a moderator decides for; left out: all. */
  readonly moderates?: readonly string[];
  readonly strength?: SignInStrength;
};

/** Somebody of their own with a session that is open already: what signing in takes is tested elsewhere. */
export async function someone(people: TestPeople, { role = 'member', moderates, strength }: Someone = {}): Promise<SomeoneSignedIn> {
  const member = await people.addMember({ role });
  if (moderates) {
    await Member.query(people.knex).findById(member.id).patch({ scope: 'some' });
    const makers = await Maker.query(people.knex).whereIn('slug', [...moderates]);
    await MemberScope.query(people.knex).insert(makers.map(({ id }) => ({ memberId: member.id, makerId: id })));
  }
  const secret = newSecret();
  await Session.query(people.knex).insert({
    id: hashOfSecret(secret),
    publicId: uuidV7(),
    memberId: member.id,
    stage: 'open',
    strength: strength ?? (role === 'member' ? 'password' : 'second-factor'),
    device: 'A browser',
  });
  return {
    id: member.id,
    displayName: member.displayName,
    // Each test has an app of its own, and so a browser.
    get browser() {
      return people.browser().set('Cookie', `session=${secret}`);
    },
  };
}

/** A source nobody has: what its contributor knows. */
export const OWN_KNOWLEDGE = {
  sourceId: null,
  newSource: { kind: 'own-knowledge', title: 'Forty years at the bench', note: 'Handled several.' },
  field: null,
  locator: null,
  note: null,
} as const;

export type Draft = {
  readonly kind: FactKind;
  readonly payload?: object;
  readonly sources?: readonly object[];
  readonly subjectId?: string;
  readonly baseVersion?: number;
  readonly note?: string;
};

export async function start({ browser }: SomeoneSignedIn, { sources, ...draft }: Draft): Promise<ContributionPage> {
  const body = { ...draft, ...(sources ? { sources } : draft.subjectId === undefined ? { sources: [OWN_KNOWLEDGE] } : {}) };
  return ContributionPage.parse((await browser.post('/api/contributions').send(body).expect(201)).body);
}

export async function putForward({ browser }: SomeoneSignedIn, { id, revision }: Pick<ContributionPage, 'id' | 'revision'>): Promise<ContributionPage> {
  const answer = await browser.post(`/api/contributions/${id}/put-forward`).send({ revision });
  if (answer.status !== 200) throw new Error(answer.text);
  return ContributionPage.parse(answer.body);
}

export function decide(
  { browser }: SomeoneSignedIn,
  { id, revision }: Pick<ContributionPage, 'id' | 'revision'>,
  decision: 'enter' | 'send-back' | 'turn-down',
  reason = 'As the source says',
): supertest.Test {
  return browser.post(`/api/contributions/${id}/decision`).send({ decision, reason, revision });
}

export async function enter(moderator: SomeoneSignedIn, contribution: Pick<ContributionPage, 'id' | 'revision'>): Promise<ContributionPage> {
  const answer = await decide(moderator, contribution, 'enter');
  if (answer.status !== 200) throw new Error(answer.text);
  return ContributionPage.parse(answer.body);
}

/** A contribution of a new fact or a change, entered. Answers the fact's id. */
export async function entered(author: SomeoneSignedIn, moderator: SomeoneSignedIn, draft: Draft): Promise<string> {
  const page = await enter(moderator, await putForward(author, await start(author, draft)));
  if (page.subject === null) throw new Error('What was entered is a fact');
  return page.subject.id;
}

export async function historyOf({ browser }: Pick<SomeoneSignedIn, 'browser'>, factId: string): Promise<FactHistory> {
  return FactHistory.parse((await browser.get(`/api/facts/${factId}/history`).expect(200)).body);
}

/** The id of a fact of the demo. */
export async function factCalled(people: TestPeople, kind: FactKind, title: string): Promise<string> {
  return (await FactName.query(people.knex).findOne({ kind, title }).throwIfNotFound()).id;
}

const Detail = z.looseObject({ factId: z.string(), version: z.number() });

/** Which version of each fact is in force, as the trail of acts has it; null: retired. */
export async function replayTrail(people: TestPeople): Promise<ReadonlyMap<string, number | null>> {
  const acts = ['contribution.entered', 'fact.brought-back', 'fact.retired'];
  const inForce = new Map<string, number | null>();
  for (const { act, detail } of await AuditRow.query(people.knex).whereIn('act', acts).orderBy(['at', 'id'])) {
    const { factId, version } = Detail.parse(detail);
    inForce.set(factId, act === 'fact.retired' ? null : version);
  }
  return inForce;
}
