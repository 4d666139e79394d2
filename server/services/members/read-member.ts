import type { Knex } from 'knex';
import { Member } from '#db/models/member.ts';
import { mayDoToMember } from '#server/policies/members.ts';
import type { MemberDeed } from '#server/policies/members.ts';
import { requireRegistrar } from '#server/policies/staff.ts';
import type { MemberViewer, Viewer } from '#server/policies/viewer.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { loadMembers } from './load-members.ts';
import type { MemberOnRecord } from './load-members.ts';

export type MemberPageOnRecord = MemberOnRecord & { readonly can: Readonly<Record<MemberDeed, boolean>> };

/**
 * One member, with what the registrar who asks may do.
 *
 * @throws ProblemError `not-found`, `second-factor-owed`.
 */
export async function readMember(viewer: Viewer, id: string, knex: Knex): Promise<MemberPageOnRecord> {
  return memberPage(requireRegistrar(viewer), id, knex);
}

/** The same after a deed, which may have been the registrar's last as one. */
export async function memberPage({ id: viewerId, role }: MemberViewer, id: string, knex: Knex): Promise<MemberPageOnRecord> {
  const [found] = await loadMembers([id], knex);
  if (!found || (found.member.email === null && found.member.closedAt === null)) {
    throw new ProblemError('not-found', 'Nobody of this id has an account.');
  }
  const { member } = found;
  const registrar = { id: viewerId, role: viewerId === id ? member.role : role };
  const standing = {
    id,
    emailVerifiedAt: member.emailVerifiedAt,
    suspendedAt: member.suspendedAt,
    closedAt: member.closedAt,
    lastRegistrar: member.role === 'registrar' && member.suspendedAt === null && (await countOtherRegistrars(id, knex)) === 0,
  };
  const can = (deed: MemberDeed): boolean => mayDoToMember(deed, registrar, standing);
  return { ...found, can: { changeRole: can('changeRole'), suspend: can('suspend'), unsuspend: can('unsuspend'), endSessions: can('endSessions') } };
}

function countOtherRegistrars(id: string, knex: Knex): Promise<number> {
  return Member.query(knex).where({ role: 'registrar' }).whereNull('suspendedAt').whereNot({ id }).resultSize();
}
