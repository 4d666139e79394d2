import { z } from 'zod';
import { Id, listAnswer, listQuery, Named, Slug } from './common.ts';
import { endpoint } from './endpoint.ts';
import { PEOPLE_LIMITS, Role } from './people.ts';

export const MEMBER_STATES = ['active', 'unverified', 'suspended', 'closed'] as const;

export const MemberItem = z.object({
  id: Id,
  displayName: z.string(),
  /** Null once the account is closed. */
  email: z.string().nullable(),
  role: Role,
  moderates: z.array(Named).nullable(),
  state: z.enum(MEMBER_STATES),
  secondFactor: z.boolean(),
  joinedAt: z.iso.datetime({ offset: true }),
  lastSeenAt: z.iso.datetime({ offset: true }).nullable(),
});
export type MemberItem = z.infer<typeof MemberItem>;

export const MemberPage = MemberItem.extend({
  suspension: z.object({ reason: z.string(), at: z.iso.datetime({ offset: true }), by: z.string() }).nullable(),
  version: z.number().int(),
  can: z.object({ changeRole: z.boolean(), suspend: z.boolean(), unsuspend: z.boolean(), endSessions: z.boolean() }),
});
export type MemberPage = z.infer<typeof MemberPage>;

const ById = z.strictObject({ id: Id });

export const listMembers = endpoint({
  method: 'GET',
  path: '/admin/members',
  summary: 'Members, by name or address',
  query: listQuery(['name', '-joined'], { role: Role.optional(), state: z.enum(MEMBER_STATES).optional() }),
  answer: listAnswer(MemberItem),
});
export const readMember = endpoint({ method: 'GET', path: '/admin/members/:id', summary: 'One member', params: ById, answer: MemberPage });
export const changeRole = endpoint({
  method: 'PUT',
  path: '/admin/members/:id/role',
  summary: 'Give a member a role and a moderator a scope; the last registrar stays one',
  params: ById,
  body: z.strictObject({
    role: Role,
    /** Slugs of makers; null = all makers. Only for moderators. */
    moderates: z.array(Slug).max(200).nullable(),
    version: z.number().int(),
  }),
  answer: MemberPage,
});
export const suspendMember = endpoint({
  method: 'POST',
  path: '/admin/members/:id/suspend',
  summary: 'Suspend a member; their sessions end at once',
  params: ById,
  body: z.strictObject({ reason: z.string().trim().min(3, 'Say why').max(PEOPLE_LIMITS.suspensionReason), version: z.number().int() }),
  answer: MemberPage,
});
export const unsuspendMember = endpoint({
  method: 'POST',
  path: '/admin/members/:id/unsuspend',
  summary: 'Lift a suspension',
  params: ById,
  body: z.strictObject({ reason: z.string().trim().min(3, 'Say why').max(PEOPLE_LIMITS.suspensionReason), version: z.number().int() }),
  answer: MemberPage,
});
export const endMemberSessions = endpoint({
  method: 'POST',
  path: '/admin/members/:id/end-sessions',
  summary: 'End every session of a member',
  params: ById,
  answer: MemberPage,
});

/** Everything that is written down. An act is added here and named in the audit page's words. */
export const AUDIT_ACTS = [
  'account.opened',
  'account.refused',
  'account.verified',
  'account.closed',
  'account.renamed',
  'account.exported',
  'session.started',
  'session.refused',
  'session.ended',
  'password.changed',
  'password.reset-asked',
  'password.reset',
  'email.change-asked',
  'email.changed',
  'second-factor.added',
  'second-factor.removed',
  'recovery-codes.renewed',
  'recovery-code.used',
  'role.changed',
  'member.suspended',
  'member.unsuspended',
  'notices.chosen',
  'contribution.started',
  'contribution.discarded',
  'contribution.put-forward',
  'contribution.withdrawn',
  'contribution.commented',
  'contribution.entered',
  'contribution.sent-back',
  'contribution.turned-down',
  'fact.brought-back',
  'fact.retired',
  'fact.flagged',
  'flag.settled',
  'series.reading-marked',
  'photo.added',
  'photo.removed',
  'part.recorded',
  'part.changed',
  'part.removed',
  'mark.recorded',
  'mark.changed',
  'mark.placed',
  'mark.removed',
  'reading.made',
  'reading.taken-back',
] as const;
export const AuditAct = z.enum(AUDIT_ACTS);
export type AuditAct = z.infer<typeof AuditAct>;

export const AuditRow = z.object({
  id: Id,
  at: z.iso.datetime({ offset: true }),
  act: AuditAct,
  actor: z.object({ id: Id, displayName: z.string() }).nullable(),
  subject: z.object({ kind: z.string(), id: Id, name: z.string() }).nullable(),
  detail: z.record(z.string(), z.json()),
  requestId: z.string().nullable(),
});
export type AuditRow = z.infer<typeof AuditRow>;

const Moment = z.iso.datetime({ offset: true });

export const listAudit = endpoint({
  method: 'GET',
  path: '/admin/audit',
  summary: 'The audit trail, newest first',
  query: listQuery(['-at', 'at'], {
    actor: Id.optional(),
    subject: Id.optional(),
    act: AuditAct.optional(),
    since: Moment.optional(),
    until: Moment.optional(),
  }),
  answer: listAnswer(AuditRow),
});

