import type { MEMBER_STATES, MemberItem, MemberPage } from '#contract/admin.ts';
import type { Member } from '#db/models/member.ts';
import type { MemberOnRecord } from '#server/services/members/load-members.ts';
import type { MemberPageOnRecord } from '#server/services/members/read-member.ts';
import { presentNamed } from './common.ts';
import { loaded } from './loaded.ts';

export function presentMemberItem({ member, makers, secondFactor, lastSeenAt }: MemberOnRecord): MemberItem {
  return {
    id: member.id,
    displayName: member.displayName,
    email: member.email,
    role: member.role,
    moderates: member.scope === 'all' ? null : makers.map(presentNamed),
    state: stateOf(member),
    secondFactor,
    joinedAt: member.joinedAt,
    lastSeenAt,
  };
}

export function presentMember(found: MemberPageOnRecord): MemberPage {
  return {
    ...presentMemberItem(found),
    suspension: presentSuspension(found.member),
    version: found.member.version,
    can: { ...found.can },
  };
}

function stateOf({ closedAt, suspendedAt, emailVerifiedAt }: Member): (typeof MEMBER_STATES)[number] {
  if (closedAt !== null) return 'closed';
  if (suspendedAt !== null) return 'suspended';
  return emailVerifiedAt === null ? 'unverified' : 'active';
}

function presentSuspension({ suspendedAt, suspensionReason, suspendedBy }: Member): MemberPage['suspension'] {
  if (suspendedAt === null) return null;
  return { reason: loaded(suspensionReason), at: suspendedAt, by: loaded(suspendedBy).displayName };
}
