import { describe, expect, test } from 'vitest';
import { CONTRIBUTION_STATES } from '#domain/vocabulary.ts';
import { contributionRights, mayReadComments, mayReadContribution, moderatesMaker, requireMayReadContribution, requireModerator, requireNotOwn } from '#server/policies/contributions.ts';
import type { ContributionRights } from '#server/policies/contributions.ts';
import { requireQueueReader } from '#server/policies/moderation.ts';
import { VISITOR } from '#server/policies/viewer.ts';
import type { MemberViewer } from '#server/policies/viewer.ts';

const MAKER = 'maker-1';

function viewer(given: Partial<MemberViewer>): MemberViewer {
  return {
    kind: 'member',
    id: 'someone',
    displayName: 'Someone',
    role: 'member',
    moderates: [],
    sessionId: 's',
    strength: 'password',
    confirmedAt: '2026-01-01T00:00:00Z',
    confirmedRecently: true,
    hasSecondFactor: false,
    secondFactorOwed: false,
    ...given,
  };
}

const VIEWERS = {
  visitor: VISITOR,
  author: viewer({ id: 'author' }),
  member: viewer({}),
  moderator: viewer({ role: 'moderator', moderates: [MAKER] }),
  'moderator of all': viewer({ role: 'moderator', moderates: 'all' }),
  'moderator elsewhere': viewer({ role: 'moderator', moderates: ['maker-2'] }),
  'moderator without a second factor': viewer({ role: 'moderator', moderates: [MAKER], secondFactorOwed: true }),
  'author who moderates': viewer({ id: 'author', role: 'moderator', moderates: 'all' }),
  registrar: viewer({ role: 'registrar' }),
} as const;
type Who = keyof typeof VIEWERS;
const EVERYBODY = Object.keys(VIEWERS) as Who[];

function contribution(state: (typeof CONTRIBUTION_STATES)[number], makerId: string | null = MAKER) {
  return { authorId: 'author', makerId, state };
}

describe('who may know of a contribution', () => {
  test.each<[(typeof CONTRIBUTION_STATES)[number], Who[]]>([
    ['drafted', ['author', 'author who moderates']],
    ['put-forward', ['author', 'moderator', 'moderator of all', 'author who moderates', 'registrar']],
    ['sent-back', ['author', 'moderator', 'moderator of all', 'author who moderates', 'registrar']],
    ['turned-down', ['author', 'moderator', 'moderator of all', 'author who moderates', 'registrar']],
    ['withdrawn', ['author', 'moderator', 'moderator of all', 'author who moderates', 'registrar']],
    ['entered', EVERYBODY],
  ])('that is %s', (state, who) => {
    expect(EVERYBODY.filter((one) => mayReadContribution(VIEWERS[one], contribution(state)))).toEqual(who);
    for (const one of EVERYBODY) {
      const demand = () => requireMayReadContribution(VIEWERS[one], contribution(state));
      if (who.includes(one)) expect(demand).not.toThrow();
      else expect(demand).toThrow(one === 'moderator without a second factor' && state !== 'drafted' ? /second factor/ : /No contribution/);
    }
  });

  test('that belongs to no maker: moderators of all makers', () => {
    expect(EVERYBODY.filter((one) => mayReadContribution(VIEWERS[one], contribution('put-forward', null)))).toEqual(['author', 'moderator of all', 'author who moderates', 'registrar']);
    expect(EVERYBODY.filter((one) => moderatesMaker(VIEWERS[one], null))).toEqual(['moderator of all', 'author who moderates']);
  });

  test('and read what is said about it, even when it is everybody’s', () => {
    expect(EVERYBODY.filter((one) => mayReadComments(VIEWERS[one], contribution('entered')))).toEqual(['author', 'moderator', 'moderator of all', 'author who moderates', 'registrar']);
  });
});

describe('what may be done with it', () => {
  test.each<[keyof ContributionRights, Who, readonly string[]]>([
    ['edit', 'author', ['drafted', 'sent-back']],
    ['putForward', 'author', ['drafted', 'sent-back']],
    ['withdraw', 'author', ['put-forward', 'sent-back']],
    ['discard', 'author', ['drafted']],
    ['comment', 'author', ['put-forward', 'sent-back', 'entered', 'turned-down']],
    ['comment', 'moderator', ['put-forward', 'sent-back', 'entered', 'turned-down']],
    ['comment', 'registrar', []],
    ['decide', 'moderator', ['put-forward']],
    ['decide', 'author who moderates', []],
    ['decide', 'registrar', []],
    ['decide', 'moderator without a second factor', []],
    ['edit', 'moderator of all', []],
    ['seeEvidence', 'visitor', ['entered']],
    ['seeEvidence', 'author', ['put-forward', 'sent-back', 'entered', 'turned-down', 'withdrawn']],
  ])('%s, as %s', (right, who, states) => {
    expect(CONTRIBUTION_STATES.filter((state) => contributionRights(VIEWERS[who], contribution(state))[right])).toEqual(states);
  });
});

describe('acting as a moderator', () => {
  test.each<[Who, RegExp | null]>([
    ['visitor', /Sign in/],
    ['member', /Only a moderator/],
    ['registrar', /Only a moderator/],
    ['moderator elsewhere', /Only a moderator/],
    ['moderator without a second factor', /second factor/],
    ['moderator', null],
  ])('takes more than a %s', (who, refusal) => {
    const demand = () => requireModerator(VIEWERS[who], MAKER);
    if (refusal) expect(demand).toThrow(refusal);
    else expect(demand).not.toThrow();
  });

  test('is not for one’s own', () => {
    expect(() => requireNotOwn(VIEWERS.moderator, 'someone')).toThrow(/your own/);
    expect(() => requireNotOwn(VIEWERS.moderator, 'author')).not.toThrow();
  });
});

describe('the queue', () => {
  test('is of the makers in scope, all of it for a registrar', () => {
    expect(requireQueueReader(VIEWERS.moderator)).toEqual({ id: 'someone', makerIds: [MAKER] });
    expect(requireQueueReader(VIEWERS['moderator of all']).makerIds).toBe('all');
    expect(requireQueueReader(VIEWERS.registrar).makerIds).toBe('all');
    expect(() => requireQueueReader(VISITOR)).toThrow(/Sign in/);
    expect(() => requireQueueReader(VIEWERS.member)).toThrow(/nothing at this address/);
    expect(() => requireQueueReader(VIEWERS['moderator without a second factor'])).toThrow(/second factor/);
  });
});
