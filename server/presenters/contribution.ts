import { z } from 'zod';
import { LooseCitation, LoosePayload } from '#contract/contributions.ts';
import type { ContributionItem, ContributionPage, readContributor } from '#contract/contributions.ts';
import type { AnswerOf } from '#contract/endpoint.ts';
import type { Evidence } from '#contract/evidence.ts';
import type { ContributionPageOnRecord } from '#server/services/contributions/contribution-page.ts';
import type { KeptEvidence } from '#server/services/contributions/kept-evidence.ts';
import type { ContributionOnRecord } from '#server/services/contributions/load-contributions.ts';
import type { ContributorOnRecord, GivenVersion } from '#server/services/contributions/read-contributor.ts';
import type { VersionOnRecord } from '#server/services/facts/fact-versions.ts';
import { presentNamed, presentPage } from './common.ts';
import { presentCitation, presentCitedSource, presentFactRef, presentPerson } from './fact.ts';
import { loaded } from './loaded.ts';

type ContributorPage = AnswerOf<typeof readContributor>;

export function presentContributionItem({ contribution, state, subject }: ContributionOnRecord): ContributionItem {
  const { id, kind, title, author, maker, startedAt, changedAt, putForwardAt } = contribution;
  return {
    id,
    kind,
    title,
    state,
    subject: subject && presentFactRef(subject),
    maker: maker ? presentNamed(maker) : null,
    author: presentPerson(loaded(author)),
    startedAt,
    changedAt,
    putForwardAt,
  };
}

export function presentContribution(onRecord: ContributionPageOnRecord): ContributionPage {
  const { contribution, base, inForce, differences, faults, names, note, comments, decisions, openWith, can } = onRecord;
  return {
    ...presentContributionItem(onRecord),
    payload: LoosePayload.parse(contribution.payload),
    citations: z.array(LooseCitation).parse(contribution.citations),
    note,
    revision: contribution.revision,
    base: base && presentVersion(base),
    inForce: inForce && presentVersion(inForce),
    differences: [...differences],
    faults: [...faults],
    names: names.facts.map(presentFactRef),
    sources: names.sources.map(presentCitedSource),
    comments: comments.map(({ id, author, at, path, text }) => ({ id, author: presentPerson(loaded(author)), at, path, text })),
    decisions: decisions.map(({ decision, reason, by, at }) => ({ decision, reason, by: presentPerson(loaded(by)), at })),
    enteredVersion: contribution.enteredVersion,
    openWith: openWith.map(presentPerson),
    can,
  };
}

function presentVersion({ number, payload, citations }: VersionOnRecord): NonNullable<ContributionPage['base']> {
  return { version: number, payload: LoosePayload.parse(payload), citations: citations.map(presentCitation) };
}

export function presentEvidence({ evidence: { id, gatheredAt, occasion, revision }, findings }: KeptEvidence): Evidence {
  return { ...findings, id, gatheredAt, occasion, revision };
}

export function presentContributor({ member, given, kinds }: ContributorOnRecord): ContributorPage {
  return { ...presentPage(given, presentGiven), contributor: { ...presentPerson(member), since: member.joinedAt }, kinds: [...kinds] };
}

function presentGiven({ id, version, fact }: GivenVersion): ContributorPage['items'][number] {
  const { number, enteredAt, reason, inForce } = version;
  return { id, fact: presentFactRef(fact), version: number, enteredAt, reason, inForce };
}
