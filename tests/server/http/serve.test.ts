import express, { Router } from 'express';
import type { Express } from 'express';
import supertest from 'supertest';
import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import { endpoint } from '#contract/endpoint.ts';
import { LIMITS } from '#contract/limits.ts';
import { Problem } from '#contract/problem.ts';
import { logRequests } from '#server/http/logging.ts';
import { answerProblems } from '#server/http/middleware/answer-problems.ts';
import { serve } from '#server/http/serve.ts';
import { keptLog } from '#tests/support/log.ts';
import type { KeptLog } from '#tests/support/log.ts';

const readPart = endpoint({
  method: 'GET',
  path: '/parts/:number',
  summary: 'A part',
  params: z.strictObject({ number: z.string().regex(/^\d+$/, 'Digits only') }),
  query: z.strictObject({ depth: z.coerce.number().int('A whole number').default(1) }),
  answer: z.object({ number: z.string(), depth: z.number() }),
});

const addPart = endpoint({
  method: 'POST',
  path: '/parts',
  status: 201,
  summary: 'Adds a part',
  body: z.strictObject({ number: z.string(), tags: z.array(z.string()).default([]) }),
  answer: z.object({ number: z.string(), tags: z.array(z.string()) }),
});

function appWith(mount: (router: Router) => void): { readonly app: Express; readonly log: KeptLog } {
  const log = keptLog();
  const router = Router();
  mount(router);
  const app = express();
  app.set('query parser', 'simple');
  app.use(logRequests(log.logger), router, answerProblems);
  return { app, log };
}

const { app } = appWith((router) => {
  serve(router, readPart, ({ params, query }) => ({ number: params.number, depth: query.depth, ownerEmail: 'secret@example.org' }));
  serve(router, addPart, ({ body }) => body);
});

async function problem(call: supertest.Test, status: number): Promise<Problem> {
  const response = await call;
  expect(response.status).toBe(status);
  expect(response.type).toBe('application/problem+json');
  return Problem.parse(response.body);
}

describe('an endpoint', () => {
  test('hands parsed values to its handler and defaults where nothing was said', async () => {
    const response = await supertest(app).get('/parts/12').expect(200);
    expect(response.body).toEqual({ number: '12', depth: 1 });
    expect((await supertest(app).get('/parts/12?depth=3')).body).toEqual({ number: '12', depth: 3 });
  });

  test('drops from the answer what the contract does not name', async () => {
    const response = await supertest(app).get('/parts/12');
    expect(response.text).not.toContain('secret');
  });

  test('answers with the status it names', async () => {
    await supertest(app).post('/parts').send({ number: '7' }).expect(201, { number: '7', tags: [] });
  });

  test('tells the faults of address and query together', async () => {
    const { errors } = await problem(supertest(app).get('/parts/x?depth=1.5&colour=red'), 422);
    expect(errors).toEqual([
      { path: ['number'], message: 'Digits only' },
      { path: ['depth'], message: 'A whole number' },
      { path: ['colour'], message: 'Nothing of this name is taken here' },
    ]);
  });

  test('refuses a query key given twice', async () => {
    const { errors } = await problem(supertest(app).get('/parts/1?depth=1&depth=2'), 422);
    expect(errors).toEqual([{ path: ['depth'], message: 'Given more than once' }]);
  });

  test('takes a bracket in a query key as part of its name', async () => {
    const { errors } = await problem(supertest(app).get('/parts/1?depth[gt]=1'), 422);
    expect(errors).toEqual([{ path: ['depth[gt]'], message: 'Nothing of this name is taken here' }]);
  });

  test('fails, and says so only to the log, when its own answer is not of the contract', async () => {
    const broken = appWith((router) => {
      // The stored value is what is wrong here, not the handler: it promises a number and the row holds another.
      serve(router, readPart, () => ({ number: '1', depth: Number.NaN }));
    });
    const { errors, detail } = await problem(supertest(broken.app).get('/parts/1'), 500);
    expect(errors).toBeUndefined();
    expect(detail).not.toMatch(/NaN|expected/i);
    expect(broken.log.takeErrors()).not.toEqual([]);
  });
});

describe('a body', () => {
  const post = (): supertest.Test => supertest(app).post('/parts');
  const json = (text: string): supertest.Test => post().type('application/json').send(text);

  test('with wrong values is refused with the path of each', async () => {
    const { errors } = await problem(post().send({ number: 1, tags: ['a', 2], more: true }), 422);
    expect(errors?.map(({ path }) => path)).toEqual([['number'], ['tags', 1], ['more']]);
  });

  test.each(['[]', '"text"', '3', 'null'])('of JSON that is no object (%s) is a wrong value as a whole', async (text) => {
    const { errors } = await problem(json(text), 422);
    expect(errors?.map(({ path }) => path)).toEqual([[]]);
  });

  test.each(['{', '{"number":}', '{"number":"7"}x', "{'number':'7'}"])('that is not JSON (%s) is malformed', async (text) => {
    await problem(json(text), 400);
  });

  test('that is empty or not there is malformed', async () => {
    await problem(json(''), 400);
    await problem(post(), 400);
  });

  test('that is not UTF-8 is malformed', async () => {
    const call = post().type('application/json');
    call.write(Buffer.from('{"number":"\xff"}', 'latin1'));
    await problem(call, 400);
  });

  test.each(['text/plain', 'application/x-www-form-urlencoded', 'application/jsonx', 'nonsense'])('of type %s is not taken', async (type) => {
    await problem(post().set('Content-Type', type).send('{"number":"7"}'), 415);
  });

  test('that is compressed is not taken', async () => {
    await problem(post().type('application/json').set('Content-Encoding', 'gzip').send('{"number":"7"}'), 415);
  });

  test('is taken up to the limit and not a byte further', async () => {
    const body = (length: number): string => `{"number":"${'7'.repeat(length - '{"number":""}'.length)}"}`;
    await json(body(LIMITS.jsonBody)).expect(201);
    await problem(json(body(LIMITS.jsonBody + 1)), 413);
  });

  test.each([
    ['a NUL', String.raw`{"number":"a\u0000b"}`, ['number']],
    ['half a surrogate pair', String.raw`{"number":"x","tags":["\ud800"]}`, ['tags', 0]],
    ['a NUL in a name', String.raw`{"number":"x","a\u0000":1}`, []],
    ['a name that reaches into the prototype', '{"number":"x","__proto__":{"admin":true}}', []],
  ])('with %s is malformed, and the path says where', async (_name, text, path) => {
    const { errors } = await problem(json(text), 400);
    expect(errors?.map((fault) => fault.path)).toEqual([path]);
  });

  test('keeps a whole character outside the first plane', async () => {
    await json(String.raw`{"number":"\ud83d\udd29"}`).expect(201, { number: '🔩', tags: [] });
  });

  test('nested to no end is refused', async () => {
    const depth = 100_000;
    await problem(json(`{"number":${'['.repeat(depth)}${']'.repeat(depth)}}`), 400);
  });
});
