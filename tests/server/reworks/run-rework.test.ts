import type { Knex } from 'knex';
import { afterAll, afterEach, beforeAll, describe, expect, test, vi } from 'vitest';
import { connect } from '#db/connection.ts';
import { CipherVersion } from '#db/models/cipher-version.ts';
import { Cipher } from '#db/models/cipher.ts';
import { Maker } from '#db/models/maker.ts';
import { Notice } from '#db/models/notice.ts';
import { PartFit } from '#db/models/part-fit.ts';
import { PartFitting } from '#db/models/part-fitting.ts';
import { ReworkMachine } from '#db/models/rework-machine.ts';
import { Rework } from '#db/models/rework.ts';
import { reworkHandlings } from '#server/jobs/rework-handlings.ts';
import { takeUpReworks } from '#server/jobs/take-up-reworks.ts';
import { startJobRunner } from '#server/queue/job-runner.ts';
import { createCipherCache } from '#server/services/cipher-cache.ts';
import { giveUpRework } from '#server/services/reworks/give-up-rework.ts';
import { isBeingWorkedOut } from '#server/services/reworks/is-being-worked-out.ts';
import { resumeReworks } from '#server/services/reworks/resume-reworks.ts';
import { runRework } from '#server/services/reworks/run-rework.ts';
import { startRework } from '#server/services/reworks/start-rework.ts';
import { useDatabase } from '#tests/support/database.ts';
import { clearJobs, jobsOf } from '#tests/support/jobs.ts';
import { keptLog } from '#tests/support/log.ts';

const UNTIL = { timeout: 20_000, interval: 20 };

const database = useDatabase();
const ciphers = createCipherCache({ onUnusable: () => expect.unreachable() });
let knex: Knex;
beforeAll(() => {
  knex = connect(database.url);
});
afterEach(async () => {
  await clearJobs(knex);
});
afterAll(() => knex.destroy());

async function run(id: string, partsAtOnce?: number, signal = new AbortController().signal): Promise<void> {
  await runRework(id, { knex, ciphers, signal, ...(partsAtOnce === undefined ? {} : { partsAtOnce }) });
}

/** Everything the reworks of a record came to. */
async function state(): Promise<unknown> {
  return {
    castings: await knex('parts').select('id', 'castingId').orderBy('id'),
    decodings: await knex('mark_decodings').orderBy('markId'),
    fits: await knex('part_fits').orderBy('fittingId'),
  };
}

async function startOver(): Promise<void> {
  await knex('part_fits').delete();
  await knex('mark_decodings').delete();
  await knex('rework_machines').delete();
  await knex('notices').delete();
  await knex('reworks').update({ state: 'waiting', reached: null, done: 0, total: null, changed: 0, finishedAt: null });
}

async function reworks(): Promise<readonly Rework[]> {
  return Rework.query(knex).orderBy('id');
}

/** Enters a version of the ten-letter cipher that was in use to another day, and has what rests on it worked out again. */
async function enterVersion(usedTo: string): Promise<string> {
  const cipher = await Cipher.query(knex).findOne({ slug: 'brackwater-ten-letter' }).throwIfNotFound();
  const before = await CipherVersion.query(knex).modify('inForce').findOne({ cipherId: cipher.id }).throwIfNotFound();
  return knex.transaction(async (trx) => {
    const { cipherId, number, header, citations, enteredById, definition } = before;
    await before.$query(trx).patch({ supersededAt: '2026-11-01T00:00:00Z' });
    await CipherVersion.query(trx).insert({
      cipherId, number: number + 1, header, citations, enteredById, enteredAt: '2026-11-01T00:00:00Z', reason: 'The key ended sooner.', definition: { ...definition, usedTo },
    });
    await startRework({ factId: cipher.id, kind: 'cipher', version: number + 1, rests: { makers: [cipher.makerId], models: [] } }, trx);
    const { id } = await Rework.query(trx).orderBy('startedAt', 'desc').orderBy('id', 'desc').first().throwIfNotFound();
    return id;
  });
}

describe('a rework', () => {
  test('of the demo works everything out, tells how far it is, and changes nothing anybody was told', async () => {
    for (const { id } of await reworks()) await run(id);
    for (const one of await reworks()) {
      expect(one).toMatchObject({ state: 'done', changed: 0 });
      expect(one.finishedAt).not.toBeNull();
      expect(one.done).toBe(one.total);
      expect(one.done).toBeGreaterThan(0);
    }
    expect(await PartFit.query(knex).resultSize()).toBe(await PartFitting.query(knex).resultSize());
    expect(await Notice.query(knex)).toEqual([]);
  });

  test('that was cut half way goes on where it stopped and ends in the same state', async () => {
    await startOver();
    for (const { id } of await reworks()) await run(id);
    const whole = await state();
    await startOver();
    const [first, ...others] = await reworks();
    if (first === undefined) throw new Error('the demo has no reworks');
    const cutting = new AbortController();
    const watched = connect(database.url, { poolSize: 1 });
    watched.on('query-response', (_answer: unknown, { sql }: { sql: string }) => {
      if (sql.startsWith('update "reworks"')) cutting.abort(new Error('cut'));
    });
    await expect(runRework(first.id, { knex: watched, ciphers, signal: cutting.signal, partsAtOnce: 60 })).rejects.toThrow('cut');
    await watched.destroy();
    const half = await Rework.query(knex).findById(first.id).throwIfNotFound();
    expect(half).toMatchObject({ state: 'running', finishedAt: null });
    expect(half.reached).not.toBeNull();
    expect(await state()).not.toEqual(whole);

    await run(first.id, 60);
    for (const { id } of others) await run(id, 60);
    expect(await state()).toEqual(whole);
    expect((await reworks()).map(({ state: of }) => of)).toEqual(['done', 'done', 'done', 'done']);
  });

  test('that is run by two at once is done once, and tells each owner once, saying what and why', async () => {
    const id = await enterVersion('1936-12-31');
    const another = connect(database.url);
    await Promise.all([run(id, 40), runRework(id, { knex: another, ciphers, signal: new AbortController().signal, partsAtOnce: 40 })]);
    await another.destroy();
    const done = await Rework.query(knex).findById(id).throwIfNotFound();
    expect(done.state).toBe('done');
    expect(done.changed).toBeGreaterThan(10);

    const machines = await ReworkMachine.query(knex).where({ reworkId: id }).withGraphFetched('machine');
    const owners = [...new Set(machines.map(({ machine }) => machine?.ownerId))].sort();
    const notices = await Notice.query(knex).where({ kind: 'recomputed' });
    expect(notices.map(({ memberId }) => memberId).sort()).toEqual(owners);
    const dates = machines.reduce((sum, machine) => sum + machine.dates, 0);
    const fits = machines.reduce((sum, machine) => sum + machine.fits, 0);
    expect(dates).toBeGreaterThan(0);
    // Parts on benches are nobody’s machine’s.
    expect(dates + fits).toBeLessThanOrEqual(done.changed);
    for (const { title, body, href } of notices) {
      expect(title).toMatch(/^Worked out again: /);
      expect(body).toMatch(/^Brackwater ten-letter key changed and is at version 4: The key ended sooner\.\n/);
      expect(body).toMatch(/: (?:\d+ dates?|\d+ fits?)/);
      expect(href).toBe(`/facts/${done.factId}/history`);
    }

    await run(id, 40);
    expect(await Notice.query(knex).where({ kind: 'recomputed' }).resultSize()).toBe(notices.length);
    expect(await Rework.query(knex).findById(id)).toEqual(done);
  });

  test('comes out as if it had been so from the first', async () => {
    const again = await state();
    await startOver();
    for (const { id } of await reworks()) await run(id, 75);
    expect(await state()).toEqual(again);
  });

  test('of nothing is done at once, and one that is gone does no harm', async () => {
    const { id: factId } = await Maker.query(knex).orderBy('id').first().throwIfNotFound();
    const none = await knex.transaction(async (trx) => {
      await startRework({ factId, kind: 'maker', version: 1, rests: { makers: [], models: ['01980000-0000-7000-8000-000000000001'] } }, trx);
      return Rework.query(trx).orderBy('id', 'desc').first().throwIfNotFound();
    });
    await run(none.id);
    expect(await Rework.query(knex).findById(none.id)).toMatchObject({ state: 'done', done: 0, total: 0, changed: 0 });
    await run('01980000-0000-7000-8000-000000000002');
  });
});

describe('the jobs', () => {
  test('begin with the act they follow from, or not at all', async () => {
    const { id: factId } = await Maker.query(knex).orderBy('id').first().throwIfNotFound();
    const before = (await reworks()).length;
    await knex
      .transaction(async (trx) => {
        await startRework({ factId, kind: 'maker', version: 1, rests: { makers: [factId], models: [] } }, trx);
        throw new Error('not after all');
      })
      .catch(() => undefined);
    await knex.transaction((trx) => startRework({ factId, kind: 'maker', version: 1, rests: { makers: [], models: [] } }, trx));
    expect(await reworks()).toHaveLength(before);
    expect(await jobsOf('run-rework', knex)).toEqual([]);
  });

  test('work off what was entered, and what an earlier server left', async () => {
    const id = await enterVersion('1938-12-31');
    await clearJobs(knex);
    await giveUpRework(id, knex);
    expect((await Rework.query(knex).findById(id))?.state).toBe('failed');
    const { logger } = keptLog();
    await takeUpReworks({ knex, logger, signal: new AbortController().signal });
    const runner = startJobRunner({ url: database.url, handlings: reworkHandlings({ knex, ciphers }), logger, pollEvery: 20 });
    await vi.waitFor(async () => {
      for (const one of await reworks()) expect(one.state).toBe('done');
    }, UNTIL);
    await runner.stop();
    expect((await Rework.query(knex).findById(id))?.changed).toBeGreaterThan(0);
    expect(await resumeReworks(knex)).toBe(0);
  });

  test('that fail for good leave the rework failed and its pages without figures', async () => {
    const [one] = await reworks();
    if (one === undefined) throw new Error('the demo has no reworks');
    await Rework.query(knex).findById(one.id).patch({ state: 'running', finishedAt: null });
    const makers = one.makers;
    await giveUpRework(one.id, knex);
    expect(await isBeingWorkedOut({ makers, models: [] }, knex)).toBe(true);
    expect(await isBeingWorkedOut({ makers: ['01980000-0000-7000-8000-000000000001'], models: [] }, knex)).toBe(false);
    expect(await isBeingWorkedOut({ makers: [], models: [] }, knex)).toBe(true);
    await run(one.id);
    expect(await isBeingWorkedOut({ makers, models: [] }, knex)).toBe(false);
    await giveUpRework(one.id, knex);
    expect((await Rework.query(knex).findById(one.id))?.state).toBe('done');
  });
});
