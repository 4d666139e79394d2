import { renderHook } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { useRequestKey } from '#client/lib/use-request-key.ts';

const part = { called: 'Gear case', photoIds: ['a'] };

describe('the key of a creating request', () => {
  it('is the same for as long as the same is asked for, over renderings too', () => {
    const { result, rerender } = renderHook(() => useRequestKey());
    const key = result.current(part);
    rerender();
    expect(result.current({ ...part })).toBe(key);
    expect(z.uuid().safeParse(key).success).toBe(true);
  });

  it('is another once something else is asked for, and on another page', () => {
    const { result } = renderHook(() => useRequestKey());
    const key = result.current(part);
    expect(result.current({ ...part, called: 'Gear case with one ear' })).not.toBe(key);
    expect(renderHook(() => useRequestKey()).result.current(part)).not.toBe(key);
  });
});
