import { keepPreviousData, queryOptions, skipToken } from '@tanstack/react-query';
import { listMyContributions, readContribution, readContributor, readEvidence } from '#contract/contributions.ts';
import type { CallInput } from '#contract/endpoint.ts';
import { listAccounts, listFacts, readFactHistory } from '#contract/facts.ts';
import { LIMITS } from '#contract/limits.ts';
import { listSources } from '#contract/sources.ts';
import type { FactKind } from '#domain/vocabulary.ts';
import { call } from '../../lib/call.ts';
import { listAll } from '../../lib/list-all.ts';

export const contributionKeys = {
  all: ['contributions'] as const,
  page: (id: string) => ['contributions', 'page', id] as const,
  evidence: (id: string) => ['contributions', 'evidence', id] as const,
  mine: ['contributions', 'mine'] as const,
  choices: ['contributions', 'choices'] as const,
};

/** Never shown from yesterday's cache alone: what became of it matters. */
export const contributionPage = (id: string) =>
  queryOptions({ queryKey: contributionKeys.page(id), queryFn: ({ signal }) => call(readContribution, { params: { id }, signal }), staleTime: 0 });

export const evidenceOf = (id: string) =>
  queryOptions({ queryKey: contributionKeys.evidence(id), queryFn: ({ signal }) => call(readEvidence, { params: { id }, signal }) });

export const myContributionsList = (query: CallInput<typeof listMyContributions>['query']) =>
  queryOptions({
    queryKey: [...contributionKeys.mine, query],
    queryFn: ({ signal }) => call(listMyContributions, { query, signal }),
    placeholderData: keepPreviousData,
    staleTime: 0,
  });

export const contributorPage = (id: string, query: CallInput<typeof readContributor>['query']) =>
  queryOptions({
    queryKey: [...contributionKeys.all, 'contributor', id, query],
    queryFn: ({ signal }) => call(readContributor, { params: { id }, query, signal }),
    placeholderData: keepPreviousData,
  });

/** How often a page looks whether the working out has ended. */
const WORKING_OUT_MS = 4_000;

/** A fact's whole history; looked at again and again while what rests on the fact is being worked out. */
export const historyOfFact = (id: string | null) =>
  queryOptions({
    queryKey: [...contributionKeys.all, 'history', id],
    queryFn: id === null ? skipToken : ({ signal }) => call(readFactHistory, { params: { id }, signal }),
    staleTime: 0,
    refetchInterval: ({ state }) => (state.data?.workingOut === true ? WORKING_OUT_MS : false),
  });

const CHOICES_SHOWN = 12;

/** Facts whose names hold a text, to choose one; `text` null: nobody asks yet. */
export const factChoices = (kind: FactKind, text: string | null, within: string | null) =>
  queryOptions({
    queryKey: [...contributionKeys.choices, 'facts', kind, text, within],
    queryFn:
      text === null
        ? skipToken
        : ({ signal }) =>
            call(listFacts, {
              query: { kind, limit: CHOICES_SHOWN, ...(text === '' ? {} : { q: text }), ...(within === null ? {} : { within }) },
              signal,
            }),
    placeholderData: keepPreviousData,
  });

export const sourceChoices = (text: string | null) =>
  queryOptions({
    queryKey: [...contributionKeys.choices, 'sources', text],
    queryFn: text === null ? skipToken : ({ signal }) => call(listSources, { query: { limit: CHOICES_SHOWN, ...(text === '' ? {} : { q: text }) }, signal }),
    placeholderData: keepPreviousData,
  });

export const accountChoices = (text: string | null) =>
  queryOptions({
    queryKey: [...contributionKeys.choices, 'accounts', text],
    queryFn: text === null ? skipToken : ({ signal }) => call(listAccounts, { query: { limit: CHOICES_SHOWN, ...(text === '' ? {} : { q: text }) }, signal }),
    placeholderData: keepPreviousData,
  });

/** What accounts are called, for those a draft names by id. */
export const accountNames = (isNeeded: boolean) =>
  queryOptions({
    queryKey: [...contributionKeys.choices, 'account names'],
    queryFn: isNeeded
      ? ({ signal }) => listAll((after) => call(listAccounts, { query: { limit: LIMITS.page.most, ...(after === undefined ? {} : { after }) }, signal }))
      : skipToken,
  });
