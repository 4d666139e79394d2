import { QueryClient, QueryObserver } from '@tanstack/react-query';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { marksToRead } from '#client/features/marks/marks-queries.ts';
import { markPhoto, photo } from './samples.ts';

/** How often the register is asked in ten seconds for a list of one mark with such a photo. */
async function askedInTenSeconds(state: 'waiting' | 'ready'): Promise<number> {
  const one = { id: '018f0000-0000-7000-8000-000000000001', kind: 'date-code', technique: 'cast', askedAt: '2026-01-01T00:00:00.000Z' };
  const body = JSON.stringify({ items: [{ ...one, photo: markPhoto(1, { photo: photo(1, { state }) }) }], next: null });
  const asked = vi.fn(() => Promise.resolve(new Response(body)));
  vi.stubGlobal('fetch', asked);
  const client = new QueryClient();
  const leave = new QueryObserver(client, marksToRead({})).subscribe(() => undefined);
  await vi.advanceTimersByTimeAsync(10_000);
  leave();
  client.clear();
  return asked.mock.calls.length;
}

describe('a list of marks', () => {
  beforeEach(() => {
    vi.useFakeTimers();
  });
  afterEach(() => {
    vi.useRealTimers();
    vi.unstubAllGlobals();
  });

  it('looks again while a photo on it is being made ready', async () => {
    expect(await askedInTenSeconds('waiting')).toBeGreaterThan(1);
  });

  it('is asked for once where all are ready', async () => {
    expect(await askedInTenSeconds('ready')).toBe(1);
  });
});
