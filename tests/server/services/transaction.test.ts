import { describe, expect, test } from 'vitest';
import { Member } from '#db/models/member.ts';
import { withTransaction } from '#server/services/transaction.ts';
import { usePeople } from '#tests/support/people.ts';

const people = usePeople();

/** A failure as the driver reports it. */
class DatabaseFailure extends Error {
  readonly code: string;

  constructor(code: string) {
    super(`SQLSTATE ${code}`);
    this.code = code;
  }
}

async function runsUntil(failures: readonly string[]): Promise<{ readonly runs: number; readonly failed: unknown }> {
  let runs = 0;
  try {
    await withTransaction(people.knex, async (trx) => {
      await trx.raw('select 1');
      const code = failures[runs];
      runs += 1;
      if (code !== undefined) throw new DatabaseFailure(code);
    });
    return { runs, failed: undefined };
  } catch (failed) {
    return { runs, failed };
  }
}

// PostgreSQL 15 manual, 13.5: 40001 and 40P01 are to be retried as a whole.
describe('a transaction', () => {
  test.each(['40001', '40P01'])('that lost to another (%s) runs again', async (code) => {
    expect(await runsUntil([code, code])).toEqual({ runs: 3, failed: undefined });
  });

  test('runs five times and no more', async () => {
    const { runs, failed } = await runsUntil(Array.from({ length: 9 }, () => '40001'));
    expect(runs).toBe(5);
    expect(failed).toBeInstanceOf(DatabaseFailure);
  });

  test.each(['23505', '23P01', '57014', '22P02'])('that is refused (%s) does not', async (code) => {
    expect(await runsUntil([code])).toMatchObject({ runs: 1, failed: { code } });
  });

  test('leaves nothing of a run that lost', async () => {
    const member = await people.addMember({ displayName: 'As It Was' });
    let run = 0;
    await withTransaction(people.knex, async (trx) => {
      run += 1;
      const { displayName } = await Member.query(trx).findById(member.id).throwIfNotFound();
      await Member.query(trx).findById(member.id).patch({ displayName: `${displayName} and on` });
      if (run === 1) throw new DatabaseFailure('40001');
    });
    expect((await Member.query(people.knex).findById(member.id))?.displayName).toBe('As It Was and on');
  });

  test('of two that wait for each other ends in both being done', async () => {
    const one = await people.addMember();
    const other = await people.addMember();
    const rename = (first: string, second: string, name: string) =>
      withTransaction(people.knex, async (trx) => {
        await Member.query(trx).findById(first).patch({ displayName: name });
        await trx.raw('select pg_sleep(0.3)');
        await Member.query(trx).findById(second).patch({ displayName: name });
      });
    await Promise.all([rename(one.id, other.id, 'First Of Two'), rename(other.id, one.id, 'Second Of Two')]);
    const names = await Member.query(people.knex).findByIds([one.id, other.id]);
    expect(new Set(names.map(({ displayName }) => displayName)).size).toBe(1);
  });

  test('inside another runs once: only the whole can be run again', async () => {
    let runs = 0;
    const whole = people.knex.transaction((outer) =>
      withTransaction(outer, () => {
        runs += 1;
        return Promise.reject(new DatabaseFailure('40001'));
      }),
    );
    await expect(whole).rejects.toThrow('40001');
    expect(runs).toBe(1);
  });

  test('tells the database whose act it is, and only for its own time', async () => {
    const setting = async (trx: { raw: typeof people.knex.raw }) => {
      const { rows } = await trx.raw<{ rows: { actor: string | null }[] }>(`select current_setting('app.actor_id', true) as actor`);
      return rows[0]?.actor;
    };
    expect(await withTransaction(people.knex, setting, { actorId: '0199aaaa-0000-7000-8000-000000000000' })).toBe(
      '0199aaaa-0000-7000-8000-000000000000',
    );
    expect(await withTransaction(people.knex, setting)).toSatisfy((actor: unknown) => actor === '' || actor === null);
  });
});
