import { act, renderHook } from '@testing-library/react';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { useDraft } from '#client/lib/use-draft.ts';

beforeEach(() => vi.useFakeTimers());
afterEach(() => vi.useRealTimers());

function draftOf(settled: string) {
  const settle = vi.fn<(text: string) => void>();
  const hook = renderHook(({ value }) => useDraft(value, settle), { initialProps: { value: settled } });
  return { settle, type: (text: string) => {
      act(() => hook.result.current[1](text));
    }, text: () => hook.result.current[0], arrive: (value: string) => hook.rerender({ value }) };
}
const pause = () => {
  act(() => {
    vi.advanceTimersByTime(1000);
  });
};

describe('useDraft', () => {
  it('shows what is typed at once and hands it on after a pause, once', () => {
    const { settle, type, text } = draftOf('');
    type('B');
    type('BB');
    expect(text()).toBe('BB');
    expect(settle).not.toHaveBeenCalled();
    pause();
    expect(settle.mock.calls).toEqual([['BB']]);
  });
  it('is not set back by the echo of what it handed on', () => {
    const { type, text, arrive } = draftOf('');
    type('BB');
    pause();
    type('BBO');
    arrive('BB');
    expect(text()).toBe('BBO');
  });
  it('follows a change from outside, and drops what was waiting', () => {
    const { settle, type, text, arrive } = draftOf('RLKON');
    type('RLKONX');
    arrive('KPOI');
    expect(text()).toBe('KPOI');
    pause();
    expect(settle).not.toHaveBeenCalled();
  });
  it('goes back to where it was when Back is pressed after an echo', () => {
    const { type, text, arrive } = draftOf('');
    type('B');
    pause();
    arrive('B');
    arrive('');
    expect(text()).toBe('');
  });
});
