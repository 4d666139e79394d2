import type { Knex } from 'knex';
import { Part } from '#db/models/part.ts';
import { partRights, requireMayReadPart } from '#server/policies/parts.ts';
import type { PartRights } from '#server/policies/parts.ts';
import type { Viewer } from '#server/policies/viewer.ts';
import { PART_GRAPH, viewOfParts } from './load-parts.ts';
import type { PartInView } from './load-parts.ts';

export type PartOnRecord = PartInView & { readonly can: PartRights };

/**
 * A part, as far as the viewer may see it.
 *
 * @throws ProblemError `not-found`.
 */
export async function readPart(viewer: Viewer, id: string, knex: Knex): Promise<PartOnRecord> {
  const part = requireMayReadPart(viewer, await Part.query(knex).findById(id).withGraphFetched(PART_GRAPH));
  return { ...(await viewOfParts([part], viewer, knex))(part), can: partRights(viewer, part) };
}
