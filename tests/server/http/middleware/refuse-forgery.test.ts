import express from 'express';
import supertest from 'supertest';
import { describe, expect, test } from 'vitest';
import { logRequests } from '#server/http/logging.ts';
import { answerProblems } from '#server/http/middleware/answer-problems.ts';
import { refuseForgery } from '#server/http/middleware/refuse-forgery.ts';
import { keptLog } from '#tests/support/log.ts';

const ORIGIN = 'https://register.example';
const COOKIE = { Cookie: '__Host-session=x' };

const app = express();
app.use(logRequests(keptLog().logger), refuseForgery(ORIGIN));
app.use((_request, response) => {
  response.json({ done: true });
});
app.use(answerProblems);

type Method = 'get' | 'head' | 'options' | 'post' | 'put' | 'patch' | 'delete';

function send(method: Method, headers: Readonly<Record<string, string>>, path = '/sign-out'): supertest.Test {
  return supertest(app)[method](path).set(headers);
}

// OWASP cheat sheet on CSRF, "Fetch Metadata headers" with its fall-back to Origin; W3C Fetch Metadata Request Headers for the values.
describe('a change', () => {
  test.each<[string, Readonly<Record<string, string>>, number]>([
    ['from this site', { 'Sec-Fetch-Site': 'same-origin' }, 200],
    ['from this site, of whatever origin the proxy made it', { 'Sec-Fetch-Site': 'same-origin', Origin: 'http://inner.example' }, 200],
    ['from another site', { 'Sec-Fetch-Site': 'cross-site' }, 403],
    ['from another site that says it is this one', { 'Sec-Fetch-Site': 'cross-site', Origin: ORIGIN }, 403],
    ['from a neighbour under one domain', { 'Sec-Fetch-Site': 'same-site', Origin: ORIGIN }, 403],
    ['from the address bar', { 'Sec-Fetch-Site': 'none' }, 403],
    ['from nonsense', { 'Sec-Fetch-Site': 'same-origin, cross-site' }, 403],
    ['from nothing', { 'Sec-Fetch-Site': '' }, 403],
    ['of this origin, from a browser that says no more', { Origin: ORIGIN }, 200],
    ['of another origin', { Origin: 'https://elsewhere.example' }, 403],
    ['of no origin', { Origin: 'null' }, 403],
    ['of this host without encryption', { Origin: 'http://register.example' }, 403],
    ['of this host at another port', { Origin: 'https://register.example:8443' }, 403],
    ['of a sub-domain', { Origin: 'https://a.register.example' }, 403],
    ['of a longer name', { Origin: 'https://register.example.elsewhere.example' }, 403],
    ['of another case', { Origin: 'https://REGISTER.example' }, 403],
    ['of a referrer alone', { Referer: `${ORIGIN}/account` }, 403],
    ['without a word of where it is from', {}, 403],
  ])('%s', async (_where, headers, status) => {
    for (const method of ['post', 'put', 'patch', 'delete'] as const) {
      const response = await send(method, { ...COOKIE, ...headers });
      expect(response.status, method).toBe(status);
      expect(response.headers['vary']).toBe('Sec-Fetch-Site, Origin');
      if (status === 403) expect(response.body).toMatchObject({ type: '/problems/not-allowed' });
    }
  });

  test.each<[string, Readonly<Record<string, string>>, number]>([
    ['that is no browser’s and brings no cookie has nobody’s name to act in', {}, 200],
    ['of a browser is refused without a cookie too, as it may bring one back', { Origin: 'https://elsewhere.example' }, 403],
    ['of a browser that says so', { 'Sec-Fetch-Site': 'cross-site' }, 403],
  ])('%s', async (_what, headers, status) => {
    expect((await send('post', headers)).status).toBe(status);
  });
});

test.each(['get', 'head', 'options'] as const)('a %s changes nothing and may come from anywhere', async (method) => {
  expect((await send(method, { ...COOKIE, 'Sec-Fetch-Site': 'cross-site', Origin: 'https://elsewhere.example' })).status).toBe(200);
});

// RFC 8058: a mail program posts to the address in List-Unsubscribe, without cookies and from no site.
test('a mail program unsubscribes with one click, and only that', async () => {
  const headers = { ...COOKIE, Origin: 'https://mail.example', 'Sec-Fetch-Site': 'cross-site' };
  expect((await send('post', headers, '/unsubscribe/token')).status).toBe(200);
  for (const path of ['/unsubscribe', '/unsubscribe/', '/unsubscribe/a/b', '/me/unsubscribe/token']) {
    expect((await send('post', headers, path)).status, path).toBe(403);
  }
});
