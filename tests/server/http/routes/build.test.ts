import type supertest from 'supertest';
import { describe, expect, test } from 'vitest';
import { BuildAnswer } from '#contract/models.ts';
import { useApp } from '#tests/support/app.ts';
import { useDatabase } from '#tests/support/database.ts';
import { pathsOf, problemOf } from '#tests/support/problem.ts';

const app = useApp(useDatabase());

function ask(serial: string, model = 'brackwater-30-crawler'): supertest.Test {
  return app.agent.get(`/api/models/${model}/build`).query({ serial });
}

async function place(serial: string, model?: string): Promise<BuildAnswer> {
  const response = await ask(serial, model);
  expect(response.status, response.text).toBe(200);
  return BuildAnswer.parse(response.body);
}

describe('placing a machine by its serial', () => {
  test('gives the window, the likely day inside it, the range and what it rests on', async () => {
    const answer = await place('3C1207');
    expect(answer).toMatchObject({
      serial: { asStamped: '3C1207', prefix: '3C', number: '1207', suffix: '', substitutions: [] },
      window: { from: '1941-02-10', to: '1941-03-10' },
      standing: 'in-range',
      range: { first: '1001', last: '1390', dates: { from: '1938-08-01', to: '1941-08-31' }, inOrder: true },
      neighbours: [],
    });
    // Between the anchors 1190 and 1229 over 29 days: floor(17.5 / 40 · 29) = 12 days after 10 February.
    expect(answer.likely).toEqual({ day: '1941-02-22', from: '1941-02-10', to: '1941-03-10' });
    expect(answer.sources.map(({ source }) => source.slug)).toEqual(
      expect.arrayContaining(['brackwater-parts-book-14', 'brackwater-plate-3c-1190', 'brackwater-plate-3c-1229']),
    );
  });

  test('sets rival accounts side by side, the register’s own first', async () => {
    const { accounts, window } = await place('3C1207');
    expect(accounts.length).toBeGreaterThan(1);
    expect(accounts.map(({ preferred }) => preferred)).toEqual([true, ...accounts.slice(1).map(() => false)]);
    expect(accounts[0]?.window).toEqual(window);
    expect(accounts[1]?.window).toEqual({ from: '1941-04-01', to: '1941-04-30' });
  });

  test('names no dated machine of another range as its ground', async () => {
    const { range, sources } = await place('3C1400');
    expect(range?.first).toBe('1391');
    expect(sources.map(({ source }) => source.slug)).not.toContain('brackwater-plate-3c-1229');
  });

  test('reads a serial however it is spaced, and says what it took for what', async () => {
    const answer = await place(' 3c-12O7 ');
    expect(answer.serial).toMatchObject({ prefix: '3C', number: '1207', substitutions: [{ seen: 'O', taken: '0' }] });
    expect(answer.window).toEqual({ from: '1941-02-10', to: '1941-03-10' });
  });

  test('says that a number comes before the first known, and names the neighbour', async () => {
    const answer = await place('3C1');
    expect(answer).toMatchObject({ standing: 'before-first', window: null, likely: null, range: null });
    expect(answer.neighbours.map(({ first }) => first)).toEqual(['1001']);
  });

  test('knows nothing of a prefix it never saw', async () => {
    expect(await place('K12')).toMatchObject({ standing: 'unknown-prefix', window: null, accounts: [], sources: [] });
  });

  test('carries the largest number as it is', async () => {
    const answer = await place('3C9223372036854775806');
    expect(answer.serial.number).toBe('9223372036854775806');
  });
});

describe('a serial that is none', () => {
  test.each([
    ['emoji', '🚜🚜'],
    ['letters alone', 'CRAWLER'],
    ['a sign', '3C#1207'],
    ['41 characters', '1'.repeat(41)],
    ['a number no column holds', '9223372036854775807'],
    ['spaces', '   '],
  ])('%s', async (_name, serial) => {
    expect(pathsOf(await problemOf(ask(serial), 422))).toEqual(['serial']);
  });

  test('names the character and its place', async () => {
    const { errors } = await problemOf(ask('3C🚜7'), 422);
    expect(errors?.[0]?.message).toBe('🚜 at place 3 is no letter, digit or separator');
  });

  test('is missing, or given twice', async () => {
    const path = '/api/models/brackwater-30-crawler/build';
    expect((await problemOf(app.agent.get(path), 422)).errors).toEqual([{ path: ['serial'], message: 'Missing' }]);
    const twice = await problemOf(app.agent.get(`${path}?serial=1&serial=2`), 422);
    expect(twice.errors).toEqual([{ path: ['serial'], message: 'Given more than once' }]);
  });
});

test('a model nobody entered is missing', async () => {
  await problemOf(ask('3C1207', 'no-such-model'), 404);
});
