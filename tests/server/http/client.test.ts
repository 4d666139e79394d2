import { mkdir, mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { useApp } from '#tests/support/app.ts';
import { useDatabase } from '#tests/support/database.ts';
import { problemOf } from '#tests/support/problem.ts';

const PAGE = '<!doctype html><title>Pourbook</title><script type="module" src="/assets/main-abc123.js"></script>';
const built = path.join(tmpdir(), `pourbook-pages-${process.pid}`);

beforeAll(async () => {
  await mkdir(path.join(built, 'assets'), { recursive: true });
  await writeFile(path.join(built, 'index.html'), PAGE);
  await writeFile(path.join(built, 'icon.svg'), '<svg xmlns="http://www.w3.org/2000/svg"/>');
  await writeFile(path.join(built, 'assets', 'main-abc123.js'), 'export {};');
  await writeFile(path.join(built, '.secret'), 'canary');
});
afterAll(async () => {
  await rm(built, { recursive: true, force: true });
});

const database = useDatabase();

describe('the built pages', () => {
  const app = useApp(database, { clientDirectory: built });

  test.each(['/', '/decode', '/makers/skerry-foundry', '/decode?mark=B%3F%5BOD%5DCB&serial=3C.1207'])('%s is the page, asked for anew each time', async (address) => {
    const response = await app.agent.get(address).expect(200);
    expect(response.text).toBe(PAGE);
    expect(response.headers['content-type']).toMatch(/^text\/html/);
    expect(response.headers['cache-control']).toBe('no-cache');
  });

  test('assets with a hash in their name are kept for ever', async () => {
    const response = await app.agent.get('/assets/main-abc123.js').expect(200);
    expect(response.headers['cache-control']).toBe('public, max-age=31536000, immutable');
    expect(response.headers['content-type']).toMatch(/javascript/);
  });

  test('other files are asked for anew', async () => {
    const response = await app.agent.get('/icon.svg').expect(200);
    expect(response.headers['cache-control']).toBe('no-cache');
  });

  test.each(['/assets/main-gone99.js', '/assets/', '/missing.png', '/api/x.css', '/api', '/.secret', '/makers/.hidden', '/..%2f..%2fetc%2fpasswd', '/assets/..%2f.secret'])(
    '%s is missing, not the page',
    async (address) => {
      await problemOf(app.agent.get(address), 404);
    },
  );

  test('are only read', async () => {
    await problemOf(app.agent.post('/decode'), 404);
  });
});

describe('pages that were never built', () => {
  test('are missing, and the interface works all the same', async () => {
    const empty = await mkdtemp(path.join(tmpdir(), 'pourbook-none-'));
    await rm(empty, { recursive: true });
    await problemOf(app.agent.get('/decode'), 404);
    await app.agent.get('/api/makers').expect(200);
  });
  const app = useApp(database);
});
