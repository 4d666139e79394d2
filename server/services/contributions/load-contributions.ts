import type { Knex } from 'knex';
import type { ShownState } from '#contract/contributions.ts';
import { Contribution } from '#db/models/contribution.ts';
import { latestVersions } from '#server/services/facts/latest-versions.ts';
import { nameFacts } from '#server/services/facts/name-facts.ts';
import type { NamedFact } from '#server/services/facts/name-facts.ts';

export type ContributionOnRecord = {
  readonly id: string;
  /** With its author and maker. */
  readonly contribution: Contribution;
  readonly state: ShownState;
  readonly subject: NamedFact | null;
};

/** Contributions as lists and pages show them, in any order. */
export async function loadContributions(ids: readonly string[], knex: Knex): Promise<readonly ContributionOnRecord[]> {
  const contributions = await Contribution.query(knex).findByIds([...ids]).withGraphFetched('[author, maker]');
  const subjectIds = contributions.flatMap(({ subjectId }) => subjectId ?? []);
  const subjects = await nameFacts(subjectIds, knex);
  const latest = await latestVersions(subjectIds, knex);
  return contributions.map((contribution) => ({
    id: contribution.id,
    contribution,
    state: shownState(contribution, latest.get(contribution.subjectId ?? '')),
    subject: subjects.get(contribution.subjectId ?? '') ?? null,
  }));
}

/** An entered one is superseded once a later version of the fact was entered. */
function shownState({ state, enteredVersion }: Contribution, latest: number | undefined): ShownState {
  return state === 'entered' && latest !== undefined && latest > (enteredVersion ?? latest) ? 'superseded' : state;
}
