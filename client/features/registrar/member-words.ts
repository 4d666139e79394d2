import type { MEMBER_STATES } from '#contract/admin.ts';
import type { Role } from '#contract/people.ts';

export const STATE_WORDS: Readonly<Record<(typeof MEMBER_STATES)[number], string>> = {
  active: 'active',
  unverified: 'address not confirmed',
  suspended: 'suspended',
  closed: 'closed',
};

export const ROLE_WORDS: Readonly<Record<Role, string>> = { member: 'member', moderator: 'moderator', registrar: 'registrar' };
