import type { FactRef, Person } from '#contract/contributions.ts';
import type { FactHistory } from '#contract/facts.ts';
import type { QueueItem, Rework } from '#contract/moderation.ts';
import type { Me } from '#contract/people.ts';

/** An id of its own for each number. */
export function id(number: number): string {
  return `018d5bbd-2920-72c2-a4c4-26dc${String(number).padStart(8, '0')}`;
}

const person = (number: number, displayName: string): Person => ({ id: id(number), displayName });
const HARROW = person(1, 'Harrow Lane');
export const UNA = person(2, 'Una Kettlemere');

export const CIPHER: FactRef = { id: id(20), kind: 'cipher', slug: 'brackwater-ten-letter', title: 'Brackwater ten-letter key' };

export const MODERATOR: Me = {
  id: UNA.id,
  displayName: UNA.displayName,
  email: 'una@example.org',
  role: 'moderator',
  moderates: [{ slug: 'brackwater-tractor-works', name: 'Brackwater Tractor Works' }],
  secondFactors: { authenticator: true, passkeys: 0, recoveryCodesLeft: 8 },
  secondFactorOwed: false,
  unreadNotices: 0,
  can: { decideContributions: true, seeMembers: false, seeAudit: false },
};

export function waiting(number: number, over: Partial<Extract<QueueItem, { type: 'contribution' }>> = {}): QueueItem {
  return {
    type: 'contribution',
    id: id(number),
    at: '2026-11-28T09:00:00Z',
    openWith: [],
    own: false,
    contribution: {
      id: id(number),
      kind: 'cipher',
      title: 'Brackwater ten-letter key',
      state: 'put-forward',
      subject: CIPHER,
      maker: { slug: 'brackwater-tractor-works', name: 'Brackwater Tractor Works' },
      author: HARROW,
      startedAt: '2026-11-20T09:00:00Z',
      changedAt: '2026-11-28T09:00:00Z',
      putForwardAt: '2026-11-28T09:00:00Z',
    },
    ...over,
  };
}

export function flag(number: number): QueueItem {
  const at = '2026-11-29T10:00:00Z';
  return { type: 'flag', id: id(number), at, flag: { id: id(number), fact: CIPHER, by: HARROW, at, reason: 'Two <b>ribs</b>, not three.', settled: null } };
}

export const RUN: Rework = {
  id: id(40),
  fact: CIPHER,
  version: 4,
  startedAt: '2026-12-01T10:00:00Z',
  finishedAt: null,
  state: 'running',
  done: 1200,
  total: 4300,
  changed: 31,
  machinesChanged: 4,
};

type Step = FactHistory['steps'][number];

export function step(version: number, over: Partial<Step> = {}): Step {
  return {
    step: 'version',
    version,
    inForce: false,
    by: HARROW,
    decidedBy: null,
    at: '2024-02-01T10:00:00Z',
    reason: `Reason of version ${version}.`,
    contributionId: null,
    broughtBack: null,
    payload: { title: `Title ${version}` },
    citations: [{ sourceId: id(60), newSource: null, field: 'definition', locator: 'page 14', note: null }],
    differences: [{ path: ['title'], label: 'Title', before: `Title ${version - 1}`, after: `Title ${version}` }],
    ...over,
  };
}

export function history(over: Partial<FactHistory> = {}): FactHistory {
  return {
    fact: CIPHER,
    inForce: 2,
    workingOut: false,
    names: [],
    sources: [{ id: id(60), slug: 'drawing-2210', title: 'Works drawing 2210' }],
    can: { edit: false, bringBack: false, retire: false, flag: false },
    steps: [step(2, { inForce: true, decidedBy: UNA, contributionId: id(30) }), step(1)],
    ...over,
  };
}
