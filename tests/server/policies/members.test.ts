import { describe, expect, test } from 'vitest';
import { MEMBER_DEEDS, mayDoToMember, requireMayDoToMember } from '#server/policies/members.ts';
import type { MemberStanding } from '#server/policies/members.ts';

const REGISTRAR = { id: 'r', role: 'registrar' } as const;
const AT = '2026-01-01T00:00:00.000Z';
const ACTIVE: MemberStanding = { id: 'm', emailVerifiedAt: AT, suspendedAt: null, closedAt: null, lastRegistrar: false };

describe('what a registrar may do to a member', () => {
  test.each<[string, MemberStanding, string[]]>([
    ['active', ACTIVE, ['changeRole', 'suspend', 'endSessions']],
    ['unconfirmed', { ...ACTIVE, emailVerifiedAt: null }, ['suspend', 'endSessions']],
    ['suspended', { ...ACTIVE, suspendedAt: AT }, ['changeRole', 'unsuspend', 'endSessions']],
    ['closed', { ...ACTIVE, emailVerifiedAt: null, closedAt: AT }, []],
    ['themselves', { ...ACTIVE, id: 'r' }, ['changeRole']],
    ['themselves, the last one', { ...ACTIVE, id: 'r', lastRegistrar: true }, []],
  ])('who is %s', (_who, member, deeds) => {
    expect(MEMBER_DEEDS.filter((deed) => mayDoToMember(deed, REGISTRAR, member))).toEqual(deeds);
    for (const deed of MEMBER_DEEDS) {
      const demand = () => requireMayDoToMember(deed, REGISTRAR, member);
      if (deeds.includes(deed)) expect(demand).not.toThrow();
      else expect(demand).toThrow();
    }
  });

  test('is nothing once they are none any more', () => {
    expect(MEMBER_DEEDS.filter((deed) => mayDoToMember(deed, { id: 'r', role: 'member' }, ACTIVE))).toEqual([]);
  });
});
