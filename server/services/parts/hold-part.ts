import type { Knex } from 'knex';
import { Part } from '#db/models/part.ts';
import { requireHolder } from '#server/policies/parts.ts';
import type { Viewer } from '#server/policies/viewer.ts';

/**
 * The row of a part of the viewer's own, theirs to change until the transaction ends.
 *
 * @throws ProblemError `not-found`, `not-allowed`.
 */
export async function holdOwnPart(viewer: Viewer, id: string, trx: Knex.Transaction): Promise<Part> {
  return requireHolder(viewer, await Part.query(trx).findById(id).forNoKeyUpdate());
}
