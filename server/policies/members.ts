import type { ProblemKind } from '#contract/problem.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import type { Member } from '#db/models/member.ts';
import type { MemberViewer } from './viewer.ts';

export const MEMBER_DEEDS = ['changeRole', 'suspend', 'unsuspend', 'endSessions'] as const;
/** What a registrar does to a member. */
export type MemberDeed = (typeof MEMBER_DEEDS)[number];

/** Of a member, what hangs on it whether a deed can be done. */
export type MemberStanding = Pick<Member, 'id' | 'emailVerifiedAt' | 'suspendedAt' | 'closedAt'> & {
  /** Nobody else could act as a registrar. */
  readonly lastRegistrar: boolean;
};

type Refusal = { readonly kind: ProblemKind; readonly detail: string };

/** Whether a registrar may do it to a member who stands so. */
export function mayDoToMember(deed: MemberDeed, registrar: Pick<MemberViewer, 'id' | 'role'>, member: MemberStanding): boolean {
  return registrar.role === 'registrar' && whyNot(deed, registrar, member) === null;
}

/** @throws ProblemError `not-allowed` or `conflict`, saying why it can't be done. */
export function requireMayDoToMember(deed: MemberDeed, registrar: Pick<MemberViewer, 'id'>, member: MemberStanding): void {
  const refusal = whyNot(deed, registrar, member);
  if (refusal) throw new ProblemError(refusal.kind, refusal.detail);
}

function whyNot(deed: MemberDeed, registrar: Pick<MemberViewer, 'id'>, member: MemberStanding): Refusal | null {
  if (member.closedAt !== null) return conflict('The account is closed.');
  const isSelf = member.id === registrar.id;
  switch (deed) {
    case 'changeRole':
      if (member.emailVerifiedAt === null) return conflict('The address was never confirmed, so the account has no role to change.');
      return member.lastRegistrar ? conflict('The last registrar stays one. Make somebody else one first.') : null;
    case 'suspend':
      if (isSelf) return notAllowed('Nobody suspends themselves.');
      return member.suspendedAt === null ? null : conflict('The account is suspended already.');
    case 'unsuspend':
      return member.suspendedAt === null ? conflict('The account is not suspended.') : null;
    case 'endSessions':
      return isSelf ? notAllowed('Your own sessions are on the page of your account.') : null;
  }
}

function conflict(detail: string): Refusal {
  return { kind: 'conflict', detail };
}

function notAllowed(detail: string): Refusal {
  return { kind: 'not-allowed', detail };
}
