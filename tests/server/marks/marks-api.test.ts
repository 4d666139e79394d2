import type { Knex } from 'knex';
import { describe, expect, test } from 'vitest';
import { MarkPage } from '#contract/marks.ts';
import { Machine } from '#db/models/machine.ts';
import { Mark } from '#db/models/mark.ts';
import { Member } from '#db/models/member.ts';
import { Part } from '#db/models/part.ts';
import { Rework } from '#db/models/rework.ts';
import { createCipherCache } from '#server/services/cipher-cache.ts';
import { runRework } from '#server/services/reworks/run-rework.ts';
import { TEN } from '#tests/domain/ciphers/worked-ciphers.ts';
import { useApp } from '#tests/support/app.ts';
import { useDatabase } from '#tests/support/database.ts';
import { addCipher } from '#tests/support/factories/catalogue.ts';
import { addCasting, addMachine, addMark, addPart, addPosition, addReading, addSeries, fitPart } from '#tests/support/factories/record.ts';

const database = useDatabase();
const server = useApp(database);

/** Works off everything that waits in this test’s record. */
async function workOff(knex: Knex): Promise<void> {
  const ciphers = createCipherCache({ onUnusable: () => expect.unreachable() });
  for (const { id } of await Rework.query(knex).whereNot({ state: 'done' })) await runRework(id, { knex, ciphers, signal: new AbortController().signal });
}

async function county(knex: Knex) {
  const cipher = await addCipher({ definition: TEN }, knex);
  const { makerId } = cipher;
  const position = await addPosition({}, knex);
  const { modelId, partTypeId } = position;
  await addSeries({ modelId, prefix: 'Q' }, knex);
  const casting = await addCasting({ makerId, partTypeId, number: 'T-1' }, knex);
  const machine = await addMachine({ modelId, serialAsStamped: 'Q 1207' }, knex);
  const part = await addPart({ makerId, partTypeId, castingId: casting.id }, knex);
  await fitPart(part, machine, position, knex);
  const mark = await addMark(part, 'date-code', 'BBOCB', knex);
  await knex('reworks').insert({ id: cipher.id, fact_id: cipher.id, kind: 'cipher', version: 1, makers: [makerId], models: [] });
  return { cipher, casting, machine, part, mark };
}

const pathOf = (mark: Pick<Mark, 'id'>): string => `/api/marks/${mark.id}`;

async function pageOf(mark: Pick<Mark, 'id'>): Promise<MarkPage> {
  return MarkPage.parse((await server.agent.get(pathOf(mark)).expect(200)).body);
}

describe('a mark', () => {
  test('tells its readings and, once they are worked out, its dates', async () => {
    const { knex } = database;
    const { cipher, casting, mark } = await county(knex);
    const [reader, other, third] = await Member.query(knex).orderBy('id').limit(3);
    await addReading(mark, 'b-bo-cb', other?.id ?? '', knex, '2030-01-01T00:00:00Z');
    await addReading(mark, 'B BO CB', third?.id ?? '', knex, '2030-01-02T00:00:00Z');
    expect(await pageOf(mark)).toMatchObject({ workingOut: true, dates: null, reading: 'B-BO-CB' });

    await workOff(knex);
    const page = await pageOf(mark);
    expect(page).toMatchObject({
      id: mark.id,
      kind: 'date-code',
      technique: 'cast',
      reading: 'B-BO-CB',
      readings: [
        { text: 'B-BO-CB', by: third?.displayName },
        { text: 'B-BO-CB', by: other?.displayName },
        { text: 'BBOCB', by: reader?.displayName },
      ],
      casting: { kind: 'casting', id: casting.id, title: 'T-1' },
      dates: {
        status: 'dated',
        cipher: { kind: 'cipher', id: cipher.id, slug: cipher.slug, title: cipher.title },
        cipherVersion: 1,
        candidates: [{ from: '1941-01-13', to: '1941-01-13', share: 1 }],
        total: 1,
      },
      workingOut: false,
    });
  });

  test('masks the last digits of its machine’s serial unless its owner shows them', async () => {
    const { knex } = database;
    const { machine, mark } = await county(knex);
    expect(await pageOf(mark)).toMatchObject({ machine: { serial: 'Q12••' } });
    await Machine.query(knex).findById(machine.id).patch({ serialShown: true });
    expect(await pageOf(mark)).toMatchObject({ machine: { serial: 'Q1207' } });
    await Machine.query(knex).findById(machine.id).patch({ visibility: 'by-link' });
    expect(await pageOf(mark)).toMatchObject({ machine: null });
  });

  test('on a part that is not public is as if it were not there', async () => {
    const { knex } = database;
    const { part, mark } = await county(knex);
    for (const visibility of ['private', 'by-link'] as const) {
      await Part.query(knex).findById(part.id).patch({ visibility });
      await server.agent.get(pathOf(mark)).expect(404);
    }
    await server.agent.get('/api/marks/01980000-0000-7000-8000-000000000001').expect(404);
    await server.agent.get('/api/marks/nothing').expect(422);
  });

  test('that would tell a serial its owner doesn’t show is not there either', async () => {
    const { knex } = database;
    const { machine } = await county(knex);
    const mark = await Mark.query(knex).insert({ id: machine.id, partId: null, machineId: machine.id, kind: 'serial', technique: 'stamped' });
    const member = await Member.query(knex).first().throwIfNotFound();
    await addReading(mark, 'Q1207', member.id, knex);
    await server.agent.get(pathOf(mark)).expect(404);
    await Machine.query(knex).findById(machine.id).patch({ serialShown: true });
    const page = await pageOf(mark);
    expect(page).toMatchObject({ reading: 'Q1207', dates: null, workingOut: false });
  });

  test('that nobody has read says so', async () => {
    const { knex } = database;
    const { part } = await county(knex);
    await workOff(knex);
    const mark = await Mark.query(knex).insert({ id: part.id, partId: part.id, machineId: null, kind: 'date-code', technique: 'cast' });
    const page = await pageOf(mark);
    expect(page).toMatchObject({ reading: null, readings: [], dates: null, workingOut: false });
  });
});
