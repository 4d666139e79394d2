import type { Role } from '#contract/people.ts';
import type { SignInStrength } from '#db/vocabulary.ts';
import { ProblemError } from '#server/services/problem-error.ts';

/** Somebody who is not signed in. */
export type Visitor = { readonly kind: 'visitor' };

/** Somebody who is, as the database has it at this request: a role taken away is gone with the next one. */
export type MemberViewer = {
  readonly kind: 'member';
  readonly id: string;
  readonly displayName: string;
  readonly role: Role;
  /** Ids of the makers a moderator decides for; empty for everybody else. */
  readonly moderates: readonly string[] | 'all';
  /** The session's public id. */
  readonly sessionId: string;
  readonly strength: SignInStrength;
  /** When they last proved who they are. */
  readonly confirmedAt: string;
  /** Whether that was within the last ten minutes, by the database's clock. */
  readonly confirmedRecently: boolean;
  readonly hasSecondFactor: boolean;
  /** A moderator or registrar whose session was not begun with a second factor: they may not act as one yet. */
  readonly secondFactorOwed: boolean;
};

export type Viewer = Visitor | MemberViewer;

export const VISITOR: Visitor = { kind: 'visitor' };

/** @throws ProblemError `not-signed-in` for a visitor. */
export function signedIn(viewer: Viewer): MemberViewer {
  if (viewer.kind === 'visitor') throw new ProblemError('not-signed-in', 'Sign in, then try again.');
  return viewer;
}
