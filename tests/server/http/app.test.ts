import { describe, expect, test } from 'vitest';
import { ENDPOINTS } from '#contract/endpoints.ts';
import { useApp } from '#tests/support/app.ts';
import { useDatabase } from '#tests/support/database.ts';
import { problemOf } from '#tests/support/problem.ts';

const app = useApp(useDatabase());

const METHODS = { GET: 'get', POST: 'post', PUT: 'put', PATCH: 'patch', DELETE: 'delete' } as const;

describe('addresses', () => {
  test.each(Object.entries(ENDPOINTS))('%s is mounted', async (_name, { method, path }) => {
    const address = `/api${path.replaceAll(/:\w+/g, 'no-such-thing')}`;
    const response = await app.agent[METHODS[method]](address);
    // An endpoint that is not there would be refused as a method: the check of methods knows every path.
    expect(response.status).not.toBe(405);
    expect(response.status).toBeLessThan(500);
  });

  test.each(['/api', '/api/', '/api/nothing', '/api/x.css', '/api/makers/', '/nothing.js', '/photos/x.jpg', '/.env'])('%s is missing', async (path) => {
    await problemOf(app.agent.get(path), 404);
  });

  test.each(['/api/%', '/api/makers/%zz', '/api/makers/%E0%A4%A', '/api/makers/%ED%A0%80', '/api/makers?q=%ff', '/%'])(
    '%s is not percent-encoded UTF-8',
    async (path) => {
      await problemOf(app.agent.get(path), 400);
    },
  );

  test.each(['/api/makers/a%00b', '/api/makers?q=%00', '/a%00b'])('%s holds a NUL', async (path) => {
    await problemOf(app.agent.get(path), 400);
  });

  test.each([
    ['post', '/api/makers', 'GET, HEAD'],
    ['delete', '/api/makers/skerry-foundry', 'GET, HEAD'],
    ['get', '/api/decode', 'POST'],
    ['put', '/api/fit', 'POST'],
    ['options', '/api/fit', 'POST'],
  ] as const)('%s %s is refused and told what is taken', async (method, path, allow) => {
    const call = app.agent[method](path);
    await problemOf(call, 405);
    expect((await app.agent[method](path)).headers['allow']).toBe(allow);
  });

  test('are asked for by HEAD as by GET', async () => {
    const response = await app.agent.head('/api/makers').expect(200);
    expect(response.text).toBeUndefined();
  });
});

describe('the request id', () => {
  test('is made here, one for each request', async () => {
    const ids = [await app.agent.get('/healthz'), await app.agent.get('/healthz')].map(({ headers }) => String(headers['x-request-id']));
    expect(new Set(ids).size).toBe(2);
    expect(ids[0]).toMatch(/^[0-9a-f-]{36}$/);
  });

  test('is taken from whoever is before us, and written into the log', async () => {
    const response = await app.agent.get('/api/makers/no-such-thing').set('X-Request-Id', 'edge-0123456789');
    expect(response.headers['x-request-id']).toBe('edge-0123456789');
    expect(response.body).toMatchObject({ requestId: 'edge-0123456789' });
    expect(app.log.text()).toContain('"id":"edge-0123456789"');
  });

  test.each(['short', 'x'.repeat(65), 'with space 123', 'quote"inside1', '<script>alert</script>'])('is not taken when it reads %s', async (offered) => {
    const { headers } = await app.agent.get('/healthz').set('X-Request-Id', offered);
    expect(headers['x-request-id']).not.toBe(offered);
  });
});

describe('the log', () => {
  test('holds a line for each request, without what people typed', async () => {
    await app.agent.get('/api/models/brackwater-30-crawler/build?serial=3C987654').set('Cookie', 'session=canary-cookie');
    await app.agent.post('/api/decode').set('Authorization', 'canary-token').send({ mark: 'BCANARYB' });
    const lines = app.log.lines().filter(({ msg }) => msg === 'answered');
    expect(lines).toHaveLength(2);
    expect(lines[0]).toMatchObject({ req: { method: 'GET', path: '/api/models/brackwater-30-crawler/build' }, res: { status: 200 } });
    expect(lines[0]?.['responseTime']).toEqual(expect.any(Number));
    expect(app.log.text()).not.toMatch(/987654|canary/i);
  });

  test('keeps a line break in an address on its line', async () => {
    await app.agent.get('/api/makers/%0a%7B%22level%22:60%7D');
    expect(app.log.lines().every(({ level }) => level < 60)).toBe(true);
  });
});
