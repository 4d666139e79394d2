import { QueryClient } from '@tanstack/react-query';
import { beforeEach, expect, it } from 'vitest';
import type { Me } from '#contract/people.ts';
import { changeViewer, leaveViewer, noticeSignedOut } from '#client/features/people/change-viewer.ts';
import { me } from '#client/features/people/people-queries.ts';
import { problemOfKind } from '#client/lib/problem-error.ts';

const WREN: Me = {
  id: '018f0000-0000-7000-8000-000000000001',
  displayName: 'Wren Tollgate',
  email: 'wren@bench.example',
  role: 'member',
  moderates: [],
  secondFactors: { authenticator: false, passkeys: 0, recoveryCodesLeft: 0 },
  secondFactorOwed: false,
  unreadNotices: 0,
  can: { decideContributions: false, seeMembers: false, seeAudit: false },
};

function cacheOf(viewer: Me | null): QueryClient {
  const cache = new QueryClient();
  cache.setQueryData(me().queryKey, viewer);
  cache.setQueryData(['mine', 'sessions'], { items: ['private'] });
  cache.setQueryData(['registrar', 'members'], { items: ['more private'] });
  return cache;
}
const TYPED = 'pourbook:typed:reading';
beforeEach(() => sessionStorage.setItem(TYPED, '"LL?"'));
const keysIn = (cache: QueryClient) => cache.getQueryCache().getAll().map(({ queryKey }) => queryKey[0]);

it.each([null, WREN])('forgets what was shown to whoever was here before', (next) => {
  const cache = cacheOf(WREN);
  changeViewer(cache, next);
  expect(keysIn(cache)).toEqual(['me']);
  expect(cache.getQueryData(me().queryKey)).toEqual(next);
});

it('takes an answer that one must sign in first for the end of the session', () => {
  const cache = cacheOf(WREN);
  noticeSignedOut(problemOfKind('not-signed-in'), cache);
  expect(cache.getQueryData(me().queryKey)).toBeNull();
  expect(keysIn(cache)).toEqual(['me']);
});

it('takes no other failure for it, nor that answer where nobody was signed in', () => {
  const signedIn = cacheOf(WREN);
  noticeSignedOut(problemOfKind('not-allowed'), signedIn);
  noticeSignedOut(new Error('anything else'), signedIn);
  expect(signedIn.getQueryData(me().queryKey)).toEqual(WREN);
  const visiting = cacheOf(null);
  noticeSignedOut(problemOfKind('not-signed-in'), visiting);
  expect(keysIn(visiting)).toHaveLength(3);
});

it('drops what was typed when somebody signs out, and keeps it where the session ended by itself', () => {
  noticeSignedOut(problemOfKind('not-signed-in'), cacheOf(WREN));
  expect(sessionStorage.getItem(TYPED)).not.toBeNull();
  const cache = cacheOf(WREN);
  leaveViewer(cache);
  expect(sessionStorage.getItem(TYPED)).toBeNull();
  expect(cache.getQueryData(me().queryKey)).toBeNull();
});
