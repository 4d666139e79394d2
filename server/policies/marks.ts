import type { Machine } from '#db/models/machine.ts';
import type { MarkKind } from '#domain/vocabulary.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { mayReadPart } from './parts.ts';
import type { PartStanding } from './parts.ts';
import type { Viewer } from './viewer.ts';

/** Of a mark, what rights about it hang on: what it is, and the part or the machine it stands on. */
export type MarkStanding = {
  readonly kind: MarkKind;
  readonly part?: PartStanding | null;
  readonly machine?: Pick<Machine, 'ownerId' | 'visibility' | 'serialShown'> | null;
};

/** What a viewer had to do with a mark so far, and what others had. */
export type Acquaintance = {
  readonly isHolder: boolean;
  /** Another reading of it is wanted. */
  readonly wantsReading: boolean;
  /** Whether others ever read it, taken back or not. */
  readonly readByOthers: boolean;
  /** Whether the viewer ever read it, taken back or not. */
  readonly readByViewer: boolean;
  /** Whether the viewer asked to be shown what others read. */
  readonly hasLooked: boolean;
};

/** What a viewer may do with a mark. */
export type MarkRights = { readonly read: boolean; readonly change: boolean; readonly remove: boolean };

/** Marks that would give away a serial its owner doesn’t show. */
export const TELLS_SERIAL: readonly MarkKind[] = ['serial', 'plate'];

/** Whose mark it is: the holder of its part, the owner of its machine. */
export function holderOf({ part, machine }: MarkStanding): string | null {
  return part?.holderId ?? machine?.ownerId ?? null;
}

/** A mark is seen by whoever sees what it stands on; one that tells a serial, by others only where the owner shows that. */
export function mayReadMark(viewer: Viewer, mark: MarkStanding): boolean {
  const { kind, part, machine } = mark;
  if (viewer.kind === 'member' && viewer.id === holderOf(mark)) return true;
  if (part) return mayReadPart(viewer, part);
  return machine?.visibility === 'public' && (machine.serialShown || !TELLS_SERIAL.includes(kind));
}

/** @throws ProblemError `not-found`, the same for a mark that is not there and for one the viewer may not know of. */
export function requireMayReadMark<Row extends MarkStanding>(viewer: Viewer, mark: Row | undefined): Row {
  if (mark === undefined || !mayReadMark(viewer, mark)) throw new ProblemError('not-found', 'No mark of this id is for you to see.');
  return mark;
}

/**
 * Whether what others read is kept from the viewer: a member who could still read the mark without having seen it. Visitors can’t read, so they see
 * everything.
 */
export function isHidden(viewer: Viewer, { isHolder, wantsReading, readByOthers, readByViewer, hasLooked }: Acquaintance): boolean {
  return viewer.kind === 'member' && !isHolder && wantsReading && readByOthers && !readByViewer && !hasLooked;
}

/** Whether a reading the member makes now is made without having been shown what others read. */
export function readsIndependently({ isHolder, wantsReading, readByOthers, readByViewer, hasLooked }: Acquaintance): boolean {
  return !hasLooked && (!readByOthers || (!isHolder && wantsReading && !readByViewer));
}

/** Whoever reads another’s mark for the first time is kept from its holder’s claim too, though nobody may have read it yet. */
export function readsBlind(acquaintance: Acquaintance): boolean {
  return !acquaintance.isHolder && !acquaintance.readByViewer && readsIndependently(acquaintance);
}

export function markRights(viewer: Viewer, mark: MarkStanding): MarkRights {
  const own = viewer.kind === 'member' && mark.part?.holderId === viewer.id;
  return { read: viewer.kind === 'member', change: own, remove: own };
}
