import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import supertest from 'supertest';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import * as contract from '#contract/post.ts';
import { appOver } from '#tests/support/app.ts';
import { useDatabase } from '#tests/support/database.ts';
import { keptLog } from '#tests/support/log.ts';
import { problemOf } from '#tests/support/problem.ts';

const database = useDatabase();
let folder: string;
beforeAll(async () => {
  folder = await mkdtemp(path.join(tmpdir(), 'pourbook-post-'));
  const letter = 'From: post@pourbook.invalid\r\nTo: b@register.example\r\nSubject: Hello\r\n\r\nFollow http://127.0.0.1:5080/confirm?token=x\r\n';
  await writeFile(path.join(folder, '1795000000000-0a1b2c3d.eml'), letter);
});
afterAll(() => rm(folder, { recursive: true }));

function agentWith(settings: NonNullable<Parameters<typeof appOver>[2]>): supertest.Agent {
  return supertest.agent(appOver(database.knex, keptLog(), settings));
}

describe('the letters of the local post', () => {
  test('are listed and read', async () => {
    const agent = agentWith({ localPostDirectory: folder });
    const { items } = contract.listPost.answer.parse((await agent.get('/api/post').expect(200)).body);
    expect(items).toEqual([{ id: '1795000000000-0a1b2c3d', to: 'b@register.example', subject: 'Hello', at: '2026-11-18T11:06:40.000Z' }]);
    const letter = contract.readPost.answer.parse((await agent.get(`/api/post/${items[0]!.id}`).expect(200)).body);
    expect(letter.links).toEqual(['http://127.0.0.1:5080/confirm?token=x']);
  });

  test('that are not there are missing', async () => {
    const agent = agentWith({ localPostDirectory: folder });
    await problemOf(agent.get('/api/post/1795000000000-ffffffff'), 404);
    await problemOf(agent.get('/api/post/..%2f..%2fetc%2fpasswd'), 422);
  });

  test.each([
    ['without a local post', {}],
    ['in production, whatever the settings say', { environment: 'production', localPostDirectory: '/tmp' }],
  ] as const)('are at no address %s', async (_when, settings) => {
    await problemOf(agentWith(settings).get('/api/post'), 404);
    await problemOf(agentWith(settings).get('/api/post/1795000000000-0a1b2c3d'), 404);
  });
});
