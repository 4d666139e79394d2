// @vitest-environment node
import { afterEach, describe, expect, it, vi } from 'vitest';
import { z } from 'zod';
import { addressOf, call } from '#client/lib/call.ts';
import { ProblemError, UnreachableError } from '#client/lib/problem-error.ts';
import { endpoint } from '#contract/endpoint.ts';

const read = endpoint({ method: 'GET', path: '/things/:slug', summary: 'One thing', params: z.strictObject({ slug: z.string() }), answer: z.object({ name: z.string() }) });
const list = endpoint({ method: 'GET', path: '/things', summary: 'Things', query: z.strictObject({ q: z.string().optional(), limit: z.number().optional() }), answer: z.object({ name: z.string() }) });
const write = endpoint({ method: 'POST', path: '/things', summary: 'A new thing', body: z.strictObject({ name: z.string() }), answer: z.object({ name: z.string() }) });

function answering(body: unknown, init: ResponseInit = {}): ReturnType<typeof vi.fn<typeof fetch>> {
  const stub = vi.fn<typeof fetch>(() => Promise.resolve(new Response(typeof body === 'string' ? body : JSON.stringify(body), init)));
  vi.stubGlobal('fetch', stub);
  return stub;
}

function failing(error: Error, online = true): void {
  vi.stubGlobal('fetch', () => Promise.reject(error));
  vi.stubGlobal('navigator', { onLine: online });
}

afterEach(() => vi.unstubAllGlobals());

describe('call', () => {
  it('fills in the address and gives back the parsed answer without what the contract does not name', async () => {
    const stub = answering({ name: 'Sump', secret: 'x' });
    await expect(call(read, { params: { slug: 'a b' } })).resolves.toEqual({ name: 'Sump' });
    expect(stub.mock.calls[0]?.[0]).toBe('/api/things/a%20b');
    expect(stub.mock.calls[0]?.[1]).not.toHaveProperty('body');
  });
  it('sends a body as JSON', async () => {
    const stub = answering({ name: 'Sump' });
    await call(write, { body: { name: 'Sump' } });
    expect(stub.mock.calls[0]?.[1]).toMatchObject({ method: 'POST', body: '{"name":"Sump"}', headers: { 'Content-Type': 'application/json' } });
  });
  it('names the key under which it is done once, where one is given', async () => {
    const stub = answering({ name: 'Sump' });
    await call(write, { body: { name: 'Sump' }, key: '018f0000-0000-7000-8000-000000000000' });
    await call(write, { body: { name: 'Sump' } });
    expect(stub.mock.calls[0]?.[1]?.headers).toHaveProperty('Idempotency-Key', '018f0000-0000-7000-8000-000000000000');
    expect(stub.mock.calls[1]?.[1]?.headers).not.toHaveProperty('Idempotency-Key');
  });
  it('lets the query be left out where nothing in it is required', async () => {
    const stub = answering({ name: 'Sump' });
    await call(list, {});
    await call(list, { query: { q: 'a&b', limit: 5 } });
    expect(stub.mock.calls.map(([address]) => address)).toEqual(['/api/things', '/api/things?q=a%26b&limit=5']);
  });
  it('refuses an answer that breaks the contract', async () => {
    answering({ title: 'Sump' });
    await expect(call(read, { params: { slug: 'a' } })).rejects.toThrow(z.ZodError);
  });

  it('raises the register’s problem with its faults and its number', async () => {
    answering(
      { type: '/problems/invalid', title: 'A value is wrong', status: 422, detail: 'See errors.', requestId: 'r-1', errors: [{ path: ['mark'], message: 'No glyph' }] },
      { status: 422, headers: { 'Retry-After': '7' } },
    );
    const error = await call(read, { params: { slug: 'a' } }).catch((thrown: unknown) => thrown);
    expect(error).toBeInstanceOf(ProblemError);
    expect(error).toMatchObject({ kind: 'invalid', status: 422, requestId: 'r-1', retryAfter: 7, faults: [{ path: ['mark'], message: 'No glyph' }] });
  });
  it.each([
    [404, 'not-found'],
    [429, 'too-many-requests'],
    [500, 'internal'],
    [502, 'unavailable'],
    [504, 'unavailable'],
    [418, 'internal'],
  ])('knows a bare %i from something between by its status', async (status, kind) => {
    answering('<html>no</html>', { status, headers: { 'Retry-After': 'soon' } });
    await expect(call(read, { params: { slug: 'a' } })).rejects.toMatchObject({ kind, requestId: null, retryAfter: null, faults: [] });
  });
  it('goes by the status where the kind is newer than this bundle', async () => {
    answering({ type: '/problems/of-tomorrow', title: 'x', status: 409, detail: 'y', requestId: 'r' }, { status: 409 });
    await expect(call(read, { params: { slug: 'a' } })).rejects.toMatchObject({ kind: 'conflict', message: 'y' });
  });

  it('tells offline from a line that broke', async () => {
    failing(new TypeError('Failed to fetch'), false);
    await expect(call(read, { params: { slug: 'a' } })).rejects.toMatchObject({ reason: 'offline' });
    failing(new TypeError('Failed to fetch'));
    await expect(call(read, { params: { slug: 'a' } })).rejects.toThrow(UnreachableError);
    await expect(call(read, { params: { slug: 'a' } })).rejects.toMatchObject({ reason: 'no-answer' });
  });
  it('says when patience ran out', async () => {
    const ended = AbortSignal.abort(new DOMException('too long', 'TimeoutError'));
    vi.spyOn(AbortSignal, 'timeout').mockReturnValue(ended);
    vi.stubGlobal('fetch', (_: string, { signal }: RequestInit) => Promise.reject(signal?.reason instanceof Error ? signal.reason : new Error('not aborted')));
    await expect(call(read, { params: { slug: 'a' } })).rejects.toMatchObject({ reason: 'timeout' });
  });
  it('rejects with the caller’s reason when the caller gave up', async () => {
    failing(new TypeError('aborted'));
    const reason = new Error('another page');
    await expect(call(read, { params: { slug: 'a' }, signal: AbortSignal.abort(reason) })).rejects.toBe(reason);
  });
});

describe('addressOf', () => {
  it('refuses a path with a parameter missing', () => {
    expect(() => addressOf('/things/:slug', {}, {})).toThrow(':slug');
  });
});
