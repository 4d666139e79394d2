import type { Knex } from 'knex';
import type { Difference } from '#contract/contributions.ts';
import { formOf } from '#contract/kinds.ts';
import { FactRetirement } from '#db/models/fact-retirement.ts';
import { Fact } from '#db/models/fact.ts';
import { Rework } from '#db/models/rework.ts';
import { moderatesMaker } from '#server/policies/contributions.ts';
import type { Viewer } from '#server/policies/viewer.ts';
import { differencesOf } from './differences.ts';
import { namesWithin } from './names-within.ts';
import type { NamesWithin } from './names-within.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { versionsOf } from './fact-versions.ts';
import type { VersionOnRecord } from './fact-versions.ts';
import { nameFact } from './name-facts.ts';
import type { NamedFact } from './name-facts.ts';

/** A version, or that the one before was retired. */
export type StepOnRecord =
  | { readonly step: 'version'; readonly version: VersionOnRecord; readonly differences: readonly Difference[] }
  | { readonly step: 'retired'; readonly version: VersionOnRecord; readonly retirement: FactRetirement };

export type FactHistoryOnRecord = {
  readonly fact: NamedFact;
  readonly inForce: number | null;
  /** Newest first. */
  readonly steps: readonly StepOnRecord[];
  readonly names: NamesWithin;
  readonly workingOut: boolean;
  readonly can: { readonly edit: boolean; readonly bringBack: boolean; readonly retire: boolean; readonly flag: boolean };
};

/**
 * Everything that was ever in force of a fact, whatever its kind, retired or not.
 *
 * @throws ProblemError `not-found`.
 */
export async function readFactHistory(viewer: Viewer, id: string, knex: Knex): Promise<FactHistoryOnRecord> {
  const fact = await Fact.query(knex).findById(id);
  const name = await nameFact(id, knex);
  if (!fact || !name) throw new ProblemError('not-found', 'No fact of this id is on record.');
  const versions = await versionsOf(fact, knex);
  const retirements = await FactRetirement.query(knex).where({ factId: id }).withGraphFetched('retiredBy');
  const names = await namesWithin(fact.kind, versions, knex);
  const form = formOf(fact.kind);
  const inForce = versions.find((version) => version.inForce) ?? null;
  return {
    fact: name,
    inForce: inForce?.number ?? null,
    steps: versions.flatMap((version, place): StepOnRecord[] => {
      const retirement = retirements.find((one) => one.version === version.number);
      const differences = differencesOf(form, versions[place + 1]?.payload ?? null, version.payload, names.nameOf);
      const entered: StepOnRecord = { step: 'version', version, differences };
      return retirement ? [{ step: 'retired', version, retirement }, entered] : [entered];
    }),
    names,
    workingOut: (await Rework.query(knex).where({ factId: id }).whereNull('finishedAt').resultSize()) > 0,
    can: rightsOver(viewer, name.makerId, inForce),
  };
}

function rightsOver(viewer: Viewer, makerId: string | null, inForce: VersionOnRecord | null): FactHistoryOnRecord['can'] {
  const isMember = viewer.kind === 'member';
  const moderates = moderatesMaker(viewer, makerId);
  return {
    edit: isMember && inForce !== null,
    bringBack: moderates,
    retire: isMember && moderates && inForce !== null && inForce.enteredById !== viewer.id,
    flag: isMember && inForce !== null,
  };
}
