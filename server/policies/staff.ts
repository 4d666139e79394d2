import { ProblemError } from '#server/services/problem-error.ts';
import type { MemberViewer, Viewer, Visitor } from './viewer.ts';

/** Of a viewer, what their rights hang on. */
export type Standing = Visitor | Pick<MemberViewer, 'kind' | 'role' | 'moderates' | 'secondFactorOwed'>;

/** Whether the viewer decides contributions, of one maker or, where none is named, of any at all. */
export function mayDecide(viewer: Standing, makerId?: string): boolean {
  if (viewer.kind === 'visitor' || viewer.role !== 'moderator' || viewer.secondFactorOwed) return false;
  if (viewer.moderates === 'all') return true;
  return makerId === undefined ? viewer.moderates.length > 0 : viewer.moderates.includes(makerId);
}

export function maySeeMembers(viewer: Standing): boolean {
  return isActingRegistrar(viewer);
}

export function maySeeAudit(viewer: Standing): boolean {
  return isActingRegistrar(viewer);
}

/**
 * A registrar who may act as one.
 *
 * @throws ProblemError `not-found` for everybody who is none, as the registrars' pages are nobody else's to know of;
 *   `second-factor-owed` for a registrar who signed in with a password alone.
 */
export function requireRegistrar(viewer: Viewer): MemberViewer {
  if (viewer.kind === 'visitor' || viewer.role !== 'registrar') throw new ProblemError('not-found', 'There is nothing at this address.');
  requireSecondFactor(viewer);
  return viewer;
}

/** @throws ProblemError `second-factor-owed` for a moderator or registrar who signed in with a password alone. */
export function requireSecondFactor(viewer: MemberViewer): void {
  if (viewer.secondFactorOwed) {
    throw new ProblemError(
      'second-factor-owed',
      viewer.hasSecondFactor ? 'Sign in again with your second factor.' : 'Add a second factor to your account first.',
    );
  }
}

function isActingRegistrar(viewer: Standing): boolean {
  return viewer.kind === 'member' && viewer.role === 'registrar' && !viewer.secondFactorOwed;
}
