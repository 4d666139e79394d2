import type { Part } from '#db/models/part.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import type { Viewer } from './viewer.ts';

/** Of a part, what rights about it hang on. */
export type PartStanding = Pick<Part, 'holderId' | 'visibility'>;

/** What a viewer may do with a part. */
export type PartRights = { readonly change: boolean; readonly remove: boolean; readonly addMark: boolean };

/** Whether the part is theirs. */
export function isHolder(viewer: Viewer, { holderId }: Pick<PartStanding, 'holderId'>): boolean {
  return viewer.kind === 'member' && viewer.id === holderId;
}

/** A public part everybody sees; any other, its holder alone. */
export function mayReadPart(viewer: Viewer, part: PartStanding): boolean {
  return part.visibility === 'public' || isHolder(viewer, part);
}

/** @throws ProblemError `not-found`, the same for a part that is not there and for one the viewer may not know of. */
export function requireMayReadPart<Row extends PartStanding>(viewer: Viewer, part: Row | undefined): Row {
  if (part === undefined || !mayReadPart(viewer, part)) throw new ProblemError('not-found', 'No part of this id is for you to see.');
  return part;
}

/** @throws ProblemError `not-found`; `not-allowed` for whoever may see it and does not hold it. */
export function requireHolder<Row extends PartStanding>(viewer: Viewer, part: Row | undefined): Row {
  const seen = requireMayReadPart(viewer, part);
  if (!isHolder(viewer, seen)) throw new ProblemError('not-allowed', 'Only whoever holds the part does that.');
  return seen;
}

export function partRights(viewer: Viewer, part: PartStanding): PartRights {
  const own = isHolder(viewer, part);
  return { change: own, remove: own, addMark: own };
}
