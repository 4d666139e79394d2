import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { sendPhoto } from '#client/features/photos/send-photo.ts';
import { ProblemError, UnreachableError } from '#client/lib/problem-error.ts';
import { photo } from '../marks/samples.ts';
import { StandInRequest } from './stand-in-request.ts';

beforeEach(() => {
  vi.useFakeTimers();
  vi.stubGlobal('XMLHttpRequest', StandInRequest);
});
afterEach(() => {
  vi.useRealTimers();
  vi.unstubAllGlobals();
});

const FILE = new File(['abc'], 'case.jpg', { type: 'image/jpeg' });

function send(keepDate = false) {
  const control = new AbortController();
  const bytes: number[] = [];
  const sent = sendPhoto(FILE, { keepDate, onProgress: (now) => bytes.push(now), signal: control.signal });
  // A refusal that comes before the test looks is still one it looks at.
  sent.catch(() => undefined);
  return { sent, bytes, control, request: StandInRequest.last };
}

describe('sendPhoto', () => {
  it('sends the choice, then the file, tells how far it is, and answers the photo', async () => {
    const { sent, bytes, request } = send(true);
    expect(request.opened).toEqual(['POST', '/api/photos']);
    expect([...request.body!.entries()].map(([name, value]) => [name, value instanceof File ? value.name : value])).toEqual([['keepDate', 'true'], ['photo', 'case.jpg']]);
    request.progress(2);
    request.progress(3);
    request.answer(201, photo(1));
    expect(await sent).toEqual(photo(1));
    expect(bytes).toEqual([2, 3]);
  });

  it('rejects with the register’s problem, and how long to wait', async () => {
    const { sent, request } = send();
    request.headers.set('Retry-After', '30');
    request.answer(429, { type: '/problems/too-many-requests', title: 'Too many', status: 429, detail: 'Slowly.', requestId: 'r1' });
    const error = await sent.catch((reason: unknown) => reason);
    expect(error).toBeInstanceOf(ProblemError);
    expect(error).toMatchObject({ kind: 'too-many-requests', requestId: 'r1', retryAfter: 30 });
  });

  it('takes an answer that is no photo for a fault of the register', async () => {
    const { sent, request } = send();
    request.answer(201, '<html>');
    await expect(sent).rejects.toMatchObject({ kind: 'internal' });
  });

  it('says that no answer came', async () => {
    const { sent, request } = send();
    request.dispatchEvent(new Event('error'));
    await expect(sent).rejects.toEqual(new UnreachableError('no-answer', null));
  });

  it('gives up a line on which nothing moves, and no other', async () => {
    const { sent, request } = send();
    vi.advanceTimersByTime(40_000);
    request.progress(1);
    vi.advanceTimersByTime(40_000);
    request.progress(2);
    vi.advanceTimersByTime(45_000);
    await expect(sent).rejects.toMatchObject({ reason: 'timeout' });
  });

  it('is given up through its signal', async () => {
    const { sent, control } = send();
    control.abort();
    await expect(sent).rejects.toMatchObject({ name: 'AbortError' });
  });

  it('is not begun where it was given up before', async () => {
    const control = new AbortController();
    control.abort();
    await expect(sendPhoto(FILE, { keepDate: false, onProgress: () => undefined, signal: control.signal })).rejects.toMatchObject({ name: 'AbortError' });
    expect(StandInRequest.last.opened).toEqual([]);
  });
});
