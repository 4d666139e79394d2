import type { Knex } from 'knex';
import { requireModerator } from '#server/policies/contributions.ts';
import type { MemberViewer, Viewer } from '#server/policies/viewer.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { versionsOf } from './fact-versions.ts';
import type { FactIdentity, VersionOnRecord } from './fact-versions.ts';
import { nameFact } from './name-facts.ts';
import type { NamedFact } from './name-facts.ts';
import { lockFact } from './write-version.ts';

export type FactInHand = {
  readonly fact: FactIdentity;
  readonly name: NamedFact;
  readonly moderator: MemberViewer;
  /** Newest first. */
  readonly versions: readonly VersionOnRecord[];
  readonly inForce: VersionOnRecord | null;
};

/**
 * A fact for a moderator of its maker to act on, theirs until the transaction ends. `lookedAt` is the version in force when they looked;
 * null: none was.
 *
 * @throws ProblemError `not-signed-in`, `not-found`, `not-allowed`, `second-factor-owed`; `conflict` where it moved on.
 */
export async function holdFact(viewer: Viewer, id: string, lookedAt: number | null, trx: Knex.Transaction): Promise<FactInHand> {
  const fact = await lockFact(id, trx);
  const name = await nameFact(id, trx);
  if (!fact || !name) throw new ProblemError('not-found', 'No fact of this id is on record.');
  const moderator = requireModerator(viewer, name.makerId);
  const versions = await versionsOf(fact, trx);
  const inForce = versions.find((version) => version.inForce) ?? null;
  if ((inForce?.number ?? null) !== lookedAt) {
    const [last] = versions;
    const did = inForce ? `version ${inForce.number} is in force by now, entered with the words: ${inForce.reason}` : 'it was retired meanwhile';
    throw new ProblemError('conflict', last ? `Look at its history again first: ${did}` : 'Look at its history again first.');
  }
  return { fact, name, moderator, versions, inForce };
}
