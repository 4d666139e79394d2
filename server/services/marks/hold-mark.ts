import type { Knex } from 'knex';
import { Mark } from '#db/models/mark.ts';
import { Part } from '#db/models/part.ts';
import { requireMayReadMark } from '#server/policies/marks.ts';
import { requireHolder } from '#server/policies/parts.ts';
import type { Viewer } from '#server/policies/viewer.ts';
import { ProblemError } from '#server/services/problem-error.ts';

/**
 * The row of a mark the viewer may see, with its part or machine, and nobody else's to change until the transaction ends. The part is held first, as
 * everybody does who changes either.
 *
 * @throws ProblemError `not-found`.
 */
export async function holdMark(viewer: Viewer, id: string, trx: Knex.Transaction): Promise<Mark> {
  const found = await Mark.query(trx).findById(id).select('partId');
  if (found?.partId) await Part.query(trx).findById(found.partId).forNoKeyUpdate();
  const mark = await Mark.query(trx).findById(id).forNoKeyUpdate();
  await mark?.$fetchGraph('[part.partType, machine]', { transaction: trx });
  return requireMayReadMark(viewer, mark);
}

/**
 * The same of a part the viewer holds.
 *
 * @throws ProblemError `not-found`; `not-allowed` for whoever may see it and does not hold its part.
 */
export async function holdOwnMark(viewer: Viewer, id: string, trx: Knex.Transaction): Promise<Mark & { readonly partId: string }> {
  const mark = await holdMark(viewer, id, trx);
  if (mark.partId === null) throw new ProblemError('not-allowed', 'What stands on a machine is changed with the machine.');
  requireHolder(viewer, mark.part ?? undefined);
  return Object.assign(mark, { partId: mark.partId });
}
