import { v7 as uuidV7 } from 'uuid';
import { describe, expect, test } from 'vitest';
import { AuditRow } from '#db/models/audit-row.ts';
import { Member } from '#db/models/member.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import { withTransaction } from '#server/services/transaction.ts';
import { PASSWORD, usePeople } from '#tests/support/people.ts';

const people = usePeople();

async function addRow(): Promise<string> {
  const { id } = await people.addMember();
  await withTransaction(people.knex, (trx) =>
    writeAudit({ act: 'account.opened', actorId: id, subject: { kind: 'member', id }, requestId: 'req-1' }, trx),
  );
  const row = await AuditRow.query(people.knex).findOne({ actorId: id }).throwIfNotFound();
  return row.id;
}

describe('the audit trail', () => {
  test.each([
    ['update audit_rows set act = $1', ['role.changed']],
    ['update audit_rows set detail = $1 where false', ['{}']],
    ['delete from audit_rows', []],
    ['delete from audit_rows where false', []],
    ['truncate audit_rows', []],
    ['truncate audit_rows cascade', []],
    ['truncate members cascade', []],
    [`insert into audit_rows (id, act, detail) select id, act, detail from audit_rows limit 1 on conflict (id) do update set act = 'role.changed'`, []],
    [`merge into audit_rows a using audit_rows b on a.id = b.id when matched then delete`, []],
  ])('refuses: %s', async (statement, values) => {
    const id = await addRow();
    const before = await AuditRow.query(people.knex).orderBy('id');
    const client = await (people.knex.client as { acquireConnection: () => Promise<{ query: (text: string, values: unknown[]) => Promise<unknown> }> })
      .acquireConnection();
    try {
      await expect(client.query(statement, [...values])).rejects.toMatchObject({ code: '23001', message: 'the audit trail only grows' });
    } finally {
      await (people.knex.client as { releaseConnection: (connection: unknown) => Promise<void> }).releaseConnection(client);
    }
    expect(await AuditRow.query(people.knex).orderBy('id')).toEqual(before);
    expect(before.map((row) => row.id)).toContain(id);
  });

  test('refuses the one who would skip the triggers, be it for want of the right or by the trigger itself', async () => {
    const id = await addRow();
    const asReplica = people.knex.transaction(async (trx) => {
      await trx.raw(`set local session_replication_role = 'replica'`);
      await AuditRow.query(trx).deleteById(id);
    });
    await expect(asReplica).rejects.toThrow(/the audit trail only grows|permission denied to set parameter/);
    expect(await AuditRow.query(people.knex).findById(id)).toBeDefined();
  });

  test('keeps a member from being deleted, so that whoever acted is known', async () => {
    await addRow();
    await expect(Member.query(people.knex).delete().whereIn('id', AuditRow.query(people.knex).select('actorId'))).rejects.toThrow(/foreign key/);
  });

  test('has nothing of an act that was rolled back', async () => {
    const { id } = await people.addMember();
    const act = withTransaction(people.knex, async (trx) => {
      await writeAudit({ act: 'account.renamed', actorId: id, subject: { kind: 'member', id }, requestId: null }, trx);
      throw new Error('and then it broke');
    });
    await expect(act).rejects.toThrow('and then it broke');
    expect(await people.actsOf(id)).toEqual([]);
  });

  test('and the act are written together or not at all', async () => {
    const member = await people.addMember({ displayName: 'Before The Fault' });
    const browser = await people.signedIn(member);
    await people.knex.raw(`alter table audit_rows add constraint planted_fault check (act <> 'account.renamed') not valid`);
    try {
      await browser.put('/api/me/name').send({ displayName: 'After The Fault' }).expect(422);
    } finally {
      await people.knex.raw('alter table audit_rows drop constraint planted_fault');
    }
    expect((await Member.query(people.knex).findById(member.id))?.displayName).toBe('Before The Fault');
    await browser.put('/api/me/name').send({ displayName: 'After The Fault' }).expect(200);
  });

  test('keeps acts of one transaction in their order, by the database’s clock', async () => {
    const { id } = await people.addMember();
    const acts = ['account.opened', 'account.verified', 'account.renamed', 'password.changed'] as const;
    await withTransaction(people.knex, async (trx) => {
      for (const act of acts) await writeAudit({ act, actorId: id, subject: { kind: 'member', id }, requestId: null }, trx);
    });
    expect((await people.actsOf(id)).map(({ act }) => act)).toEqual(acts);
  });

  test.each([
    ['an act that is no noun and deed', { act: 'renamed' }],
    ['a subject of no kind', { subjectKind: null }],
    ['detail that is no object', { detail: JSON.stringify(['a']) }],
    ['an actor nobody is', { actorId: uuidV7() }],
  ])('refuses a row with %s', async (_what, wrong) => {
    const { id } = await people.addMember();
    const row = { id: uuidV7(), act: 'account.renamed', actorId: id, subjectKind: 'member', subjectId: id, detail: '{}', requestId: null };
    await people.knex('audit_rows').insert({ ...row, id: uuidV7() });
    await expect(people.knex('audit_rows').insert({ ...row, ...wrong })).rejects.toThrow(/constraint/);
  });

  test('holds no address, name, password or secret after all a member can do', async () => {
    const member = await people.addMember({ displayName: 'Whimbrel Knot' });
    const browser = await people.signedIn(member);
    await browser.put('/api/me/name').send({ displayName: 'Whimbrel Godwit' }).expect(200);
    await browser.put('/api/me/email').send({ password: PASSWORD, email: 'whimbrel.new@bench.example' }).expect(200);
    await people.browser().post('/api/sign-in').send({ email: member.email, password: 'Whimbrel guesses' }).expect(401);
    await people.browser().post('/api/password/forgot').send({ email: member.email }).expect(200);
    const token = await people.linkTo(member.email);
    await browser.get('/api/me/export').expect(200);
    const trail = JSON.stringify(await AuditRow.query(people.knex));
    for (const secret of ['Whimbrel', member.email, 'whimbrel.new', PASSWORD, token]) expect(trail).not.toContain(secret);
  });
});
