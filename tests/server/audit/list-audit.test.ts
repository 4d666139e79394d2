import { describe, expect, test } from 'vitest';
import { v7 as uuidV7 } from 'uuid';
import { z } from 'zod';
import { AuditRow as AuditAnswer } from '#contract/admin.ts';
import type { AuditAct } from '#contract/admin.ts';
import { AuditRow } from '#db/models/audit-row.ts';
import { usePeople } from '#tests/support/people.ts';
import { pathsOf, problemOf } from '#tests/support/problem.ts';
import { signedInFully } from '#tests/support/second-factors.ts';

const people = usePeople();
type Browser = ReturnType<typeof people.browser>;

const List = z.strictObject({ items: z.array(AuditAnswer), next: z.string().nullable(), total: z.number().optional() });

async function registrarBrowser(): Promise<Browser> {
  return signedInFully(people, await people.addMember({ role: 'registrar', authenticator: true }));
}

async function list(browser: Browser, query: Record<string, string>) {
  return List.parse((await browser.get('/api/admin/audit').query(query).expect(200)).body);
}

async function write(row: { act: AuditAct; actorId: string | null; subjectId: string; at: string }): Promise<string> {
  const id = uuidV7();
  await AuditRow.query(people.knex).insert({ id, subjectKind: 'member', detail: { note: 1 }, requestId: `request-${id.slice(-6)}`, ...row });
  return id;
}

/** Two people and what they did, to themselves and each other. */
async function history() {
  const one = await people.addMember({ displayName: `Dell ${uuidV7().slice(-8)}` });
  const other = await people.addMember({ displayName: `Moor ${uuidV7().slice(-8)}` });
  const opened = await write({ act: 'account.opened', actorId: null, subjectId: one.id, at: '2026-03-01T10:00:00Z' });
  const renamed = await write({ act: 'account.renamed', actorId: one.id, subjectId: one.id, at: '2026-03-02T10:00:00Z' });
  const suspended = await write({ act: 'member.suspended', actorId: other.id, subjectId: one.id, at: '2026-03-03T10:00:00Z' });
  const ended = await write({ act: 'session.ended', actorId: other.id, subjectId: other.id, at: '2026-03-04T10:00:00Z' });
  return { one, other, opened, renamed, suspended, ended };
}

describe('the audit trail', () => {
  test('says who did what to whom, when and in which request', async () => {
    const browser = await registrarBrowser();
    const { one, other, suspended } = await history();
    const found = (await list(browser, { subject: one.id })).items.find(({ id }) => id === suspended);
    expect(found).toEqual({
      id: suspended,
      at: '2026-03-03T10:00:00.000Z',
      act: 'member.suspended',
      actor: { id: other.id, displayName: other.displayName },
      subject: { kind: 'member', id: one.id, name: one.displayName },
      detail: { note: 1 },
      requestId: `request-${suspended.slice(-6)}`,
    });
  });

  test('is narrowed by person, subject, act and time, alone and together', async () => {
    const browser = await registrarBrowser();
    const { one, other, opened, renamed, suspended, ended } = await history();
    const ids = async (query: Record<string, string>) => (await list(browser, query)).items.map(({ id }) => id);
    expect(await ids({ subject: one.id })).toEqual([suspended, renamed, opened]);
    expect(await ids({ subject: one.id, sort: 'at' })).toEqual([opened, renamed, suspended]);
    expect(await ids({ actor: other.id })).toEqual([ended, suspended]);
    expect(await ids({ actor: other.id, subject: one.id })).toEqual([suspended]);
    expect(await ids({ subject: one.id, act: 'account.renamed' })).toEqual([renamed]);
    expect(await ids({ subject: one.id, act: 'account.closed' })).toEqual([]);
    expect(await ids({ subject: one.id, since: '2026-03-02T10:00:00Z' })).toEqual([suspended, renamed]);
    expect(await ids({ subject: one.id, until: '2026-03-02T10:00:00Z' })).toEqual([opened]);
    expect(await ids({ subject: one.id, since: '2026-03-02T05:00:00-05:00', until: '2026-03-02T10:00:01Z' })).toEqual([renamed]);
    expect(await ids({ q: one.displayName.toLowerCase() })).toEqual([suspended, renamed, opened]);
    expect(await ids({ q: '%' })).toEqual([]);
  });

  test('comes page by page, each row once', async () => {
    const browser = await registrarBrowser();
    const { one, opened, renamed, suspended } = await history();
    const first = await list(browser, { subject: one.id, limit: '2' });
    expect(first.total).toBe(3);
    const second = await list(browser, { subject: one.id, limit: '2', after: first.next ?? '' });
    expect([...first.items, ...second.items].map(({ id }) => id)).toEqual([suspended, renamed, opened]);
    expect(second.next).toBeNull();
  });

  test('tells no name of somebody who left', async () => {
    const browser = await registrarBrowser();
    const member = await people.addMember({ displayName: 'Soon Gone' });
    const own = await people.signedIn(member);
    await own.post('/api/me/close').send({ password: 'rivet, boss and draft angle' }).expect(200);
    const { items } = await list(browser, { subject: member.id });
    expect(items.map(({ act }) => act)).toContain('account.closed');
    expect(JSON.stringify(items)).not.toContain('Soon Gone');
    expect(JSON.stringify(items)).not.toContain(member.email);
  });

  test.each([{ act: 'nothing.known' }, { actor: 'x' }, { since: 'yesterday' }, { until: '2026-03-02' }, { after: 'x' }])('refuses %j', async (query) => {
    const browser = await registrarBrowser();
    expect(pathsOf(await problemOf(browser.get('/api/admin/audit').query(query), 422))).toEqual(Object.keys(query));
  });
});
