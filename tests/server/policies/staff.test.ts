import { describe, expect, test } from 'vitest';
import { requireRecentProof } from '#server/policies/identity.ts';
import { mayDecide, maySeeAudit, maySeeMembers, requireRegistrar, requireSecondFactor } from '#server/policies/staff.ts';
import { signedIn, VISITOR } from '#server/policies/viewer.ts';
import type { MemberViewer } from '#server/policies/viewer.ts';

const MEMBER: MemberViewer = {
  kind: 'member',
  id: 'm',
  displayName: 'Somebody',
  role: 'member',
  moderates: [],
  sessionId: 's',
  strength: 'second-factor',
  confirmedAt: '2026-12-01T00:00:00.000Z',
  confirmedRecently: true,
  hasSecondFactor: true,
  secondFactorOwed: false,
};
const OF_ONE: MemberViewer = { ...MEMBER, role: 'moderator', moderates: ['a'] };
const OF_ALL: MemberViewer = { ...MEMBER, role: 'moderator', moderates: 'all' };
const OF_NONE: MemberViewer = { ...MEMBER, role: 'moderator', moderates: [] };
const REGISTRAR: MemberViewer = { ...MEMBER, role: 'registrar' };
const owing = (viewer: MemberViewer): MemberViewer => ({ ...viewer, secondFactorOwed: true });

describe('who decides contributions', () => {
  test.each([
    ['a visitor', VISITOR, false, false, false],
    ['a member', MEMBER, false, false, false],
    ['a registrar', REGISTRAR, false, false, false],
    ['a moderator of one maker', OF_ONE, true, true, false],
    ['a moderator of all', OF_ALL, true, true, true],
    ['a moderator of none', OF_NONE, false, false, false],
    ['a moderator of all who owes a second factor', owing(OF_ALL), false, false, false],
  ])('%s', (_who, viewer, any, own, other) => {
    expect(mayDecide(viewer)).toBe(any);
    expect(mayDecide(viewer, 'a')).toBe(own);
    expect(mayDecide(viewer, 'b')).toBe(other);
  });
});

describe('who sees members and the audit trail', () => {
  test.each([
    ['a visitor', VISITOR, false],
    ['a member', MEMBER, false],
    ['a moderator of all', OF_ALL, false],
    ['a registrar', REGISTRAR, true],
    ['a registrar who owes a second factor', owing(REGISTRAR), false],
  ])('%s', (_who, viewer, may) => {
    expect(maySeeMembers(viewer)).toBe(may);
    expect(maySeeAudit(viewer)).toBe(may);
  });

  test('is a registrar in full; to others there is nothing', () => {
    expect(requireRegistrar(REGISTRAR)).toBe(REGISTRAR);
    for (const viewer of [VISITOR, MEMBER, OF_ALL, owing(OF_ALL)]) {
      expect(() => requireRegistrar(viewer)).toThrow(expect.objectContaining({ kind: 'not-found' }));
    }
    expect(() => requireRegistrar(owing(REGISTRAR))).toThrow(expect.objectContaining({ kind: 'second-factor-owed' }));
  });
});

test('a second factor that is owed is asked for by what is missing: the factor, or a session begun with it', () => {
  expect(() => requireSecondFactor(MEMBER)).not.toThrow();
  expect(() => requireSecondFactor({ ...owing(OF_ALL), hasSecondFactor: false })).toThrow(/Add a second factor/);
  expect(() => requireSecondFactor(owing(OF_ALL))).toThrow(/Sign in again/);
});

test('a sensitive act needs a proof of these ten minutes', () => {
  expect(() => requireRecentProof(MEMBER)).not.toThrow();
  expect(() => requireRecentProof({ ...MEMBER, confirmedRecently: false })).toThrow(expect.objectContaining({ kind: 'identity-not-confirmed' }));
});

test('a visitor is asked to sign in', () => {
  expect(signedIn(MEMBER)).toBe(MEMBER);
  expect(() => signedIn(VISITOR)).toThrow(expect.objectContaining({ kind: 'not-signed-in' }));
});
