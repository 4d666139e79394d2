import type { ContributionState } from '#domain/vocabulary.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { mayDecide, requireSecondFactor } from './staff.ts';
import { signedIn } from './viewer.ts';
import type { MemberViewer, Viewer } from './viewer.ts';

/** Of a contribution, what rights about it hang on. */
export type ContributionStanding = {
  readonly authorId: string;
  /** Whose moderators decide; `null`: only those of all makers. */
  readonly makerId: string | null;
  readonly state: ContributionState;
};

/** What a viewer may do with a contribution. */
export type ContributionRights = {
  readonly edit: boolean;
  readonly putForward: boolean;
  readonly withdraw: boolean;
  readonly discard: boolean;
  readonly comment: boolean;
  readonly decide: boolean;
  readonly seeEvidence: boolean;
};

/** Whether the viewer moderates for that maker; `null`: what belongs to none, or to several, is for moderators of all makers. */
export function moderatesMaker(viewer: Viewer, makerId: string | null): boolean {
  return makerId === null ? mayDecide(viewer) && viewer.kind === 'member' && viewer.moderates === 'all' : mayDecide(viewer, makerId);
}

/** A draft only its author sees; what was put forward, the author, moderators in scope and registrars; what was entered, everybody. */
export function mayReadContribution(viewer: Viewer, contribution: ContributionStanding): boolean {
  if (contribution.state === 'entered' || isAuthor(viewer, contribution)) return true;
  return contribution.state !== 'drafted' && looksAfter(viewer, contribution.makerId);
}

/**
 * @throws ProblemError `not-found` where the viewer may not know of it; `second-factor-owed` where they might with one.
 */
export function requireMayReadContribution(viewer: Viewer, contribution: ContributionStanding): void {
  if (mayReadContribution(viewer, contribution)) return;
  if (viewer.kind === 'member' && contribution.state !== 'drafted' && looksAfter({ ...viewer, secondFactorOwed: false }, contribution.makerId)) {
    requireSecondFactor(viewer);
  }
  throw new ProblemError('not-found', 'No contribution of this id is for you to see.');
}

/** Comments are between the author and whoever decides. */
export function mayReadComments(viewer: Viewer, contribution: ContributionStanding): boolean {
  return isAuthor(viewer, contribution) || looksAfter(viewer, contribution.makerId);
}

export function contributionRights(viewer: Viewer, contribution: ContributionStanding): ContributionRights {
  const { state } = contribution;
  const own = isAuthor(viewer, contribution);
  const moderates = moderatesMaker(viewer, contribution.makerId);
  const open = state === 'drafted' || state === 'sent-back';
  return {
    edit: own && open,
    putForward: own && open,
    withdraw: own && (state === 'put-forward' || state === 'sent-back'),
    discard: own && state === 'drafted',
    comment: (own || moderates) && state !== 'drafted' && state !== 'withdrawn',
    decide: !own && moderates && state === 'put-forward',
    seeEvidence: state !== 'drafted' && mayReadContribution(viewer, contribution),
  };
}

/**
 * Whoever decides about what belongs to that maker.
 *
 * @throws ProblemError `not-signed-in`, `second-factor-owed`, `not-allowed`.
 */
export function requireModerator(viewer: Viewer, makerId: string | null): MemberViewer {
  const member = signedIn(viewer);
  if (member.role === 'moderator') requireSecondFactor(member);
  if (!moderatesMaker(member, makerId)) throw new ProblemError('not-allowed', 'Only a moderator of this maker does that.');
  return member;
}

/**
 * Nobody decides about what they gave themselves.
 *
 * @throws ProblemError `not-allowed`.
 */
export function requireNotOwn(viewer: MemberViewer, giverId: string): void {
  if (viewer.id === giverId) throw new ProblemError('not-allowed', 'It is your own: another moderator decides about it.');
}

function isAuthor(viewer: Viewer, { authorId }: ContributionStanding): boolean {
  return viewer.kind === 'member' && viewer.id === authorId;
}

function looksAfter(viewer: Viewer, makerId: string | null): boolean {
  return moderatesMaker(viewer, makerId) || (viewer.kind === 'member' && viewer.role === 'registrar' && !viewer.secondFactorOwed);
}
