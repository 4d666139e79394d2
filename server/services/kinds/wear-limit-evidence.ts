import type { Knex } from 'knex';
import { z } from 'zod';
import type { Findings } from '#contract/evidence.ts';
import { countReferring } from '#server/services/evidence/count-referring.ts';
import { groupOf } from '#server/services/evidence/evidence-group.ts';
import { factSubjects } from '#server/services/evidence/name-facts.ts';
import type { Proposal } from './kind-module.ts';

const Limits = z.array(z.object({ id: z.string(), unit: z.string(), direction: z.string(), wearsTo: z.number() }));

/** Other limits of the part type, and how many such parts are on record. */
export async function wearLimitEvidence({ factId, payload }: Proposal<'wear-limit'>, knex: Knex): Promise<Findings> {
  const query = knex('wear_limits').where({ partTypeId: payload.partTypeId }).orderBy(['measure', 'id']).select('id', 'unit', 'direction', 'wearsTo');
  if (factId !== null) void query.whereNot({ id: factId });
  const others = Limits.parse(await query);
  const subjectOf = await factSubjects(others.map(({ id }) => id), knex);
  return {
    groups: [
      groupOf(
        'other-limits',
        'Other limits of the part type',
        others.map(({ id, unit, direction, wearsTo }) => ({ subject: subjectOf(id), mark: null, text: `at ${direction} ${wearsTo} ${unit}` })),
      ),
      ...(await countReferring(payload.partTypeId, [{ code: 'parts', title: 'Parts of the type on record', table: 'parts', column: 'partTypeId' }], knex)),
    ],
    figures: [],
  };
}
