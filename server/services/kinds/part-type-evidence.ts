import type { Knex } from 'knex';
import type { Findings } from '#contract/evidence.ts';
import { countReferring } from '#server/services/evidence/count-referring.ts';
import { namesakes } from '#server/services/evidence/namesakes.ts';
import type { Proposal } from './kind-module.ts';

/** Part types that read alike, and what refers to it. */
export async function partTypeEvidence({ factId, payload }: Proposal<'part-type'>, knex: Knex): Promise<Findings> {
  return {
    groups: [
      await namesakes({ table: 'part_types', name: payload.name, factId }, knex),
      ...(await countReferring(
        factId,
        [
          { code: 'castings', title: 'Castings', table: 'castings', column: 'partTypeId' },
          { code: 'positions', title: 'Positions', table: 'positions', column: 'partTypeId' },
          { code: 'wear-limits', title: 'Wear limits', table: 'wear_limits', column: 'partTypeId' },
          { code: 'parts', title: 'Parts on record', table: 'parts', column: 'partTypeId' },
        ],
        knex,
      )),
    ],
    figures: [],
  };
}
