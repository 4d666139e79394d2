import { describe, expect, it } from 'vitest';
import { inFours } from '#client/features/people/authenticator-part.tsx';
import { sayDeviceFailure } from '#client/features/people/passkey-calls.ts';
import { sayRole } from '#client/features/people/say-role.ts';
import { problemOfKind, UnreachableError } from '#client/lib/problem-error.ts';

const SKERRY = { slug: 'skerry-foundry', name: 'Skerry Foundry' };
const HESPER = { slug: 'hesper-lathe-company', name: 'Hesper Lathe Company' };

describe('sayRole', () => {
  it.each([
    ['member', [], 'Member'],
    ['registrar', [], 'Registrar'],
    ['moderator', null, 'Moderator of all makers'],
    ['moderator', [], 'Moderator of no maker yet'],
    ['moderator', [SKERRY], 'Moderator of Skerry Foundry'],
    ['moderator', [SKERRY, HESPER], 'Moderator of Skerry Foundry and Hesper Lathe Company'],
  ] as const)('%s of %j', (role, moderates, said) => {
    expect(sayRole({ role, moderates: moderates === null ? null : [...moderates] })).toBe(said);
  });
});

describe('sayDeviceFailure', () => {
  it('tells a passkey that is there already from one that was not used', () => {
    const named = (name: string) => Object.assign(new Error('as the browser says it'), { name });
    expect(sayDeviceFailure(named('InvalidStateError'))).toMatch(/already/);
    expect(sayDeviceFailure(named('NotAllowedError'))).toMatch(/not used/);
  });
  it('leaves the register’s own failures to others', () => {
    expect(sayDeviceFailure(problemOfKind('not-signed-in'))).toBeNull();
    expect(sayDeviceFailure(new UnreachableError('timeout', null))).toBeNull();
  });
});

it('writes a secret in fours, with no space at its end', () => {
  expect(inFours('ABCDEFGHIJ')).toBe('ABCD EFGH IJ');
  expect(inFours('ABCDEFGH')).toBe('ABCD EFGH');
});
