import type { Knex } from 'knex';
import type { Findings } from '#contract/evidence.ts';
import { countReferring } from '#server/services/evidence/count-referring.ts';
import { namesakes } from '#server/services/evidence/namesakes.ts';
import type { Proposal } from './kind-module.ts';

/** Works of the maker that read alike, and the series that were numbered there. */
export async function worksEvidence({ factId, payload }: Proposal<'works'>, knex: Knex): Promise<Findings> {
  return {
    groups: [
      await namesakes({ table: 'works', name: payload.name, factId, among: { makerId: payload.makerId } }, knex),
      ...(await countReferring(factId, [{ code: 'series', title: 'Series numbered there', table: 'series', column: 'worksId' }], knex)),
    ],
    figures: [],
  };
}
