import { act, renderHook } from '@testing-library/react';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import { z } from 'zod';
import { dropSessionDrafts, useSessionDraft } from '#client/lib/session-draft.ts';

const Shape = z.object({ text: z.string() });
const BARE = { text: '' };

beforeEach(() => sessionStorage.clear());

function draft(key = 'reading:one') {
  const { result, rerender } = renderHook(({ of }) => useSessionDraft(of, BARE, Shape), { initialProps: { of: key } });
  return {
    now: () => result.current,
    type: (text: string) => act(() => result.current.change((before) => ({ text: before.text + text }))),
    turnTo: (of: string) => rerender({ of }),
  };
}

describe('useSessionDraft', () => {
  it('begins bare and unkept, and keeps every change', () => {
    const { now, type } = draft();
    expect(now()).toMatchObject({ value: BARE, kept: false });
    type('LL');
    type('?');
    expect(now()).toMatchObject({ value: { text: 'LL?' }, kept: true });
    expect(draft().now()).toMatchObject({ value: { text: 'LL?' }, kept: true });
  });
  it('keeps one thing apart from another', () => {
    const { now, type, turnTo } = draft();
    type('LL');
    turnTo('reading:two');
    expect(now().value).toEqual(BARE);
    type('K');
    turnTo('reading:one');
    expect(now().value).toEqual({ text: 'LL' });
  });
  it('begins anew once it was saved', () => {
    const { now, type } = draft();
    type('LL');
    act(() => now().drop());
    expect(now()).toMatchObject({ value: BARE, kept: false });
    expect(draft().now().value).toEqual(BARE);
  });
  it('is gone after signing out, and nothing else of the tab is', () => {
    sessionStorage.setItem('another', 'kept');
    draft().type('LL');
    dropSessionDrafts();
    expect(draft().now().value).toEqual(BARE);
    expect(sessionStorage.getItem('another')).toBe('kept');
  });
  it.each(['no JSON', '{"text":5}', 'null'])('begins bare where the storage holds %s', (text) => {
    draft().type('LL');
    sessionStorage.setItem(sessionStorage.key(0) ?? '', text);
    expect(draft().now()).toMatchObject({ value: BARE, kept: false });
  });
  it('goes on without a storage, and says that nothing is kept', () => {
    vi.spyOn(Storage.prototype, 'setItem').mockImplementation(() => {
      throw new DOMException('full', 'QuotaExceededError');
    });
    const { now, type } = draft();
    type('LL');
    expect(now()).toMatchObject({ value: { text: 'LL' }, kept: false });
  });
});
