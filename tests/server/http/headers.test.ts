import { describe, expect, test } from 'vitest';
import { useApp } from '#tests/support/app.ts';
import { useDatabase } from '#tests/support/database.ts';

const database = useDatabase();
const app = useApp(database);

/** All but those that differ from answer to answer. */
function fixedHeaders(headers: unknown): Record<string, unknown> {
  const { date: _date, 'x-request-id': _id, etag: _etag, 'content-length': _length, ...fixed } = headers as Record<string, unknown>;
  return fixed;
}

const SECURITY = {
  'content-security-policy':
    "default-src 'self';base-uri 'none';object-src 'none';frame-ancestors 'none';form-action 'self';script-src 'self';" +
    "script-src-attr 'none';style-src 'self';img-src 'self' data: blob:;font-src 'self';connect-src 'self'",
  'cross-origin-opener-policy': 'same-origin',
  'cross-origin-resource-policy': 'same-origin',
  'origin-agent-cluster': '?1',
  'referrer-policy': 'same-origin',
  'x-content-type-options': 'nosniff',
  'x-dns-prefetch-control': 'off',
  'x-download-options': 'noopen',
  'x-frame-options': 'DENY',
  'x-permitted-cross-domain-policies': 'none',
  'x-xss-protection': '0',
};

describe('headers', () => {
  test('of an answer', async () => {
    const response = await app.agent.get('/api/makers').set('Accept-Encoding', 'identity').expect(200);
    expect(fixedHeaders(response.headers)).toEqual({
      ...SECURITY,
      'cache-control': 'no-cache',
      connection: 'close',
      'content-type': 'application/json; charset=utf-8',
      vary: 'Cookie, Accept-Encoding',
    });
  });

  test('of an answer that has not changed', async () => {
    const { headers } = await app.agent.get('/api/makers');
    const response = await app.agent.get('/api/makers').set('If-None-Match', String(headers['etag'])).expect(304);
    expect(fixedHeaders(response.headers)).toMatchObject({ ...SECURITY, 'cache-control': 'no-cache' });
    expect(response.text).toBe('');
  });

  test('of an answer to a question, which is nobody else’s', async () => {
    const question = { candidates: [{ from: '1939-03-12', to: '1939-03-12', share: 1 }], build: { from: '1939-01-01', to: '1939-12-31' } };
    const response = await app.agent.post('/api/fit').send(question).expect(200);
    expect(response.headers).toMatchObject({ ...SECURITY, 'cache-control': 'no-store' });
  });

  test('of a problem', async () => {
    const response = await app.agent.get('/api/nothing').set('Accept-Encoding', 'identity').expect(404);
    expect(fixedHeaders(response.headers)).toEqual({
      ...SECURITY,
      'cache-control': 'no-store',
      connection: 'close',
      'content-type': 'application/problem+json; charset=utf-8',
      vary: 'Cookie, Accept-Encoding',
    });
  });

  test('say nothing of what runs here and open nothing to other origins', async () => {
    const { headers } = await app.agent.get('/api/makers').set('Origin', 'https://elsewhere.example');
    expect(Object.keys(headers as object).filter((name) => /^(?:x-powered-by|server|access-control-)/.test(name))).toEqual([]);
  });

  test('compress what is long', async () => {
    const response = await app.agent.get('/api/castings?limit=100').set('Accept-Encoding', 'gzip').expect(200);
    expect(response.headers['content-encoding']).toBe('gzip');
  });
});

describe('over https', () => {
  const secure = useApp(database, { publicOrigin: 'https://register.example' });

  test('the browser is told to stay there for a year', async () => {
    const { headers } = await secure.agent.get('/api/makers');
    expect(headers['strict-transport-security']).toBe('max-age=31536000; includeSubDomains');
  });
});
