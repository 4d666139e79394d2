import type { Knex } from 'knex';
import { v7 as uuidV7 } from 'uuid';
import { describe, expect, test } from 'vitest';
import type { CipherDefinition } from '#domain/ciphers/definition.ts';
import { CipherVersion } from '#db/models/cipher-version.ts';
import { Cipher } from '#db/models/cipher.ts';
import { MarkDecoding } from '#db/models/mark-decoding.ts';
import { Notice } from '#db/models/notice.ts';
import { PartFit } from '#db/models/part-fit.ts';
import { Part } from '#db/models/part.ts';
import type { Position } from '#db/models/position.ts';
import { Rework } from '#db/models/rework.ts';
import { createCipherCache } from '#server/services/cipher-cache.ts';
import { settleMark } from '#server/services/marks/settle-mark.ts';
import { runRework } from '#server/services/reworks/run-rework.ts';
import { FEN, HES, TEN } from '#tests/domain/ciphers/worked-ciphers.ts';
import { useDatabase } from '#tests/support/database.ts';
import { addCipher, addMaker } from '#tests/support/factories/catalogue.ts';
import { addAccount, addCasting, addFitment, addMachine, addMark, addPart, addPartType, addPosition, addRange, addSeries, fitPart } from '#tests/support/factories/record.ts';

const database = useDatabase();

/** Works out what rests on some makers or models, in the test's transaction. */
async function workOut(rests: { readonly makers?: string[]; readonly models?: string[] }, knex: Knex): Promise<Rework> {
  const { id: factId } = await addMaker({}, knex);
  const { id } = await Rework.query(knex).insert({ id: uuidV7(), factId, kind: 'maker', version: 1, makers: rests.makers ?? [], models: rests.models ?? [] });
  const ciphers = createCipherCache({ onUnusable: () => expect.unreachable() });
  await runRework(id, { knex, ciphers, signal: new AbortController().signal });
  return Rework.query(knex).findById(id).throwIfNotFound();
}

async function decodingOf(definition: CipherDefinition, text: string, knex: Knex): Promise<MarkDecoding> {
  const { makerId } = await addCipher({ definition }, knex);
  const mark = await addMark(await addPart({ makerId }, knex), 'date-code', text, knex);
  await workOut({ makers: [makerId] }, knex);
  return MarkDecoding.query(knex).findById(mark.id).throwIfNotFound();
}

describe('a date mark', () => {
  // The worked examples of the decoder.
  test.each<[string, CipherDefinition, string, number, readonly (readonly [from: string, to: string, share: number])[]]>([
    ['ten', TEN, 'RLKON', 1, [['1939-07-25', '1939-07-25', 1]]],
    ['ten', TEN, 'BBOCB', 2, [['1941-01-13', '1941-01-13', 0.5], ['1941-11-03', '1941-11-03', 0.5]]],
    ['hes', HES, 'C147', 4, [1927, 1937, 1947, 1957].map((year) => [`${year}-03-14`, `${year}-03-14`, 0.25] as const)],
    ['fen', FEN, 'A53', 1, [['1931-12-28', '1932-01-03', 1]]],
    ['ten', TEN, 'TKKOI', 0, []],
  ])('in %s (%#): decoded as the worked example says', async (_, definition, text, total, dates) => {
    const decoding = await decodingOf(definition, text, database.knex);
    expect(decoding).toMatchObject({ total, status: total === 0 ? 'none' : total === 1 ? 'dated' : 'several' });
    expect(decoding.candidates.map(({ from, to, share }) => [from, to, share])).toEqual(dates);
    expect(decoding.cipherId === null).toBe(total === 0);
  });

  test('is decoded under the cipher that makes it likeliest, of those its part may carry', async () => {
    const { knex } = database;
    const { id: makerId } = await addMaker({}, knex);
    const foundry = await addMaker({ poursIron: true }, knex);
    const stranger = await addMaker({ poursIron: true }, knex);
    await addCipher({ makerId, definition: TEN }, knex);
    const hes = await addCipher({ makerId, foundryId: foundry.id, definition: HES }, knex);
    const other = await addCipher({ makerId, foundryId: stranger.id, definition: FEN }, knex);
    const poured = await addCasting({ makerId, pouredById: foundry.id }, knex);
    const mark = await addMark(await addPart({ castingId: poured.id }, knex), 'date-code', 'C147', knex);
    const foreign = await addMark(await addPart({ castingId: poured.id }, knex), 'date-code', 'U42', knex);
    const unidentified = await addMark(await addPart({ makerId }, knex), 'date-code', 'U42', knex);
    await workOut({ makers: [foundry.id] }, knex);
    expect(await MarkDecoding.query(knex).findById(mark.id)).toMatchObject({ cipherId: hes.id, cipherVersion: 1, total: 4 });
    expect(await MarkDecoding.query(knex).findById(foreign.id)).toMatchObject({ status: 'none' });
    expect(await MarkDecoding.query(knex).findById(unidentified.id)).toBeUndefined();
    await workOut({ makers: [makerId] }, knex);
    expect(await MarkDecoding.query(knex).findById(unidentified.id)).toMatchObject({ cipherId: other.id });
  });

  test('on a part of no known maker, or that nobody has read any more, means nothing', async () => {
    const { knex } = database;
    const { makerId } = await addCipher({ definition: TEN }, knex);
    const nobodys = await addMark(await addPart({}, knex), 'date-code', 'RLKON', knex);
    const mark = await addMark(await addPart({ makerId }, knex), 'date-code', 'RLKON', knex);
    await workOut({ makers: [makerId] }, knex);
    expect(await MarkDecoding.query(knex).findById(nobodys.id)).toBeUndefined();
    expect(await MarkDecoding.query(knex).findById(mark.id)).toBeDefined();
    await knex('readings').where({ markId: mark.id }).delete();
    await settleMark(mark.id, knex);
    expect((await workOut({ makers: [makerId] }, knex)).changed).toBe(1);
    expect(await MarkDecoding.query(knex).findById(mark.id)).toBeUndefined();
  });
});

describe('a casting number', () => {
  test('leads to the only casting it can be; an uncertain one to none, but takes none away that it can be', async () => {
    const { knex } = database;
    const { id: makerId } = await addMaker({}, knex);
    const { id: partTypeId } = await addPartType({}, knex);
    const one = await addCasting({ makerId, partTypeId, number: 'Q 441' }, knex);
    const first = await addCasting({ makerId, partTypeId, number: 'Q500', pattern: 'first' }, knex);
    await addCasting({ makerId, partTypeId, number: 'Q500', pattern: 'second' }, knex);
    const namesake = await addCasting({ number: 'Q441' }, knex);
    const part = async (number: string, given: Partial<Part>) => {
      const added = await addPart({ makerId, partTypeId, ...given }, knex);
      await addMark(added, 'casting-number', number, knex);
      return added.id;
    };
    const cases = [
      [await part('Q441', {}), one.id],
      [await part('Q-4-41', { castingId: first.id }), one.id],
      [await part('Q500', {}), null],
      [await part('Q500', { castingId: first.id }), first.id],
      [await part('Q?41', {}), null],
      [await part('Q?41', { castingId: one.id }), one.id],
      [await part('Q442', { castingId: one.id }), null],
      [await part('Q441', { makerId: null, partTypeId: namesake.partTypeId }), namesake.id],
      [(await addPart({ makerId, castingId: one.id }, knex)).id, one.id],
    ] as const;
    await workOut({ makers: [makerId] }, knex);
    const parts = await Part.query(knex).findByIds(cases.map(([id]) => id));
    expect(cases.map(([id]) => parts.find((found) => found.id === id)?.castingId)).toEqual(cases.map(([, castingId]) => castingId));
  });
});

describe('a fitted part', () => {
  /** A machine built on these days, a position with that lead, a part with that mark: how it fits. */
  async function fitOf(build: readonly [from: string, to: string], lead: Position['lead'], definition: CipherDefinition, text: string, knex: Knex): Promise<PartFit> {
    const position = await addPosition({ lead }, knex);
    const { modelId, partTypeId } = position;
    const series = await addSeries({ modelId, prefix: 'Q' }, knex);
    const account = await addAccount('A book', knex);
    await addRange({ seriesId: series.id, accountId: account.id, numbers: { from: '1', to: '9' }, built: { from: build[0], to: build[1] } }, knex);
    const { makerId } = await addCipher({ makerId: series.makerId, definition }, knex);
    const part = await addPart({ makerId, partTypeId }, knex);
    const fitting = await fitPart(part, await addMachine({ modelId, serialAsStamped: 'Q5' }, knex), position, knex);
    await addMark(part, 'date-code', text, knex);
    await workOut({ models: [modelId] }, knex);
    return PartFit.query(knex).findById(fitting.id).throwIfNotFound();
  }

  const YEAR = ['1939-01-01', '1939-12-31'] as const;
  const SPRING = ['1938-02-01', '1938-04-30'] as const;
  const A_YEAR = { from: 0, to: 365 };
  const MONTHS: CipherDefinition = {
    fields: [
      { field: 'month', symbols: 'numerals', width: [1, 2] },
      { field: 'year', symbols: 'numerals', width: 2 },
    ],
    symbolSets: {},
    usedFrom: '1928-01-01',
    usedTo: '1954-12-31',
  };

  // The worked table of fit.
  test.each<[string, readonly [string, string], Position['lead'], CipherDefinition, string, readonly [number, number, number], PartFit['verdict']]>([
    ['12 Mar 1939', YEAR, A_YEAR, TEN, 'O-BL-ON', [0.1918, 0.8082, 0], 'possible'],
    ['20 Sep 1938', YEAR, A_YEAR, TEN, 'N-LT-OI', [0, 0.7205, 0.2795], 'possible'],
    ['31 Dec 1938', YEAR, A_YEAR, TEN, 'BL-OB-OI', [0, 1, 0], 'in-step'],
    ['2 Feb 1943', YEAR, A_YEAR, TEN, 'L-L-CO', [1, 0, 0], 'cast-after-build'],
    ['13 Jan or 3 Nov 1941', ['1941-02-10', '1941-03-10'], A_YEAR, TEN, 'BBOCB', [0.5, 0.5, 0], 'unsettled'],
    ['March 1937', SPRING, A_YEAR, MONTHS, '337', [0, 0.4944, 0.5056], 'possible'],
    ['4 Jul 1935, no lead', SPRING, null, TEN, 'R-C-OK', [0, 1, 0], 'in-step'],
  ])('cast %s', async (_, build, lead, definition, text, figures, verdict) => {
    const fit = await fitOf(build, lead, definition, text, database.knex);
    expect([fit.late, fit.inLead, fit.early].map((figure) => Number(figure?.toFixed(4)))).toEqual(figures);
    expect(fit).toMatchObject({ verdict, built: { from: build[0], to: build[1] }, typeVerdict: null });
  });

  test('has no verdict by dates where nothing dates it or its machine, and one by type from the catalogue', async () => {
    const { knex } = database;
    const position = await addPosition({}, knex);
    const { modelId, partTypeId } = position;
    const series = await addSeries({ modelId, prefix: 'Q' }, knex);
    const account = await addAccount('A book', knex);
    await addRange({ seriesId: series.id, accountId: account.id, numbers: { from: '1', to: '9' }, built: { from: '1939-01-01', to: '1939-12-31' } }, knex);
    const casting = await addCasting({ makerId: series.makerId, partTypeId }, knex);
    await addFitment({ castingId: casting.id, positionId: position.id, seriesId: series.id, numbers: { from: '1', to: '4' }, verdict: 'as-built' }, knex);
    await addFitment({ castingId: casting.id, positionId: position.id, seriesId: series.id, numbers: { from: '5', to: '6' }, verdict: 'later-fits' }, knex);
    const typeOn = async (serialAsStamped: string) => {
      const fitting = await fitPart(await addPart({ castingId: casting.id }, knex), await addMachine({ modelId, serialAsStamped }, knex), position, knex);
      return fitting.id;
    };
    const ids = [await typeOn('Q3'), await typeOn('Q5'), await typeOn('Q7'), await typeOn('Q99')];
    await workOut({ models: [modelId] }, knex);
    const fits = await PartFit.query(knex).findByIds(ids);
    expect(ids.map((id) => fits.find(({ fittingId }) => fittingId === id)?.typeVerdict)).toEqual(['as-built', 'later-fits', null, null]);
    expect(fits.map(({ verdict }) => verdict)).toEqual([null, null, null, null]);
    expect(ids.map((id) => fits.find(({ fittingId }) => fittingId === id)?.built?.from ?? null)).toEqual(['1939-01-01', '1939-01-01', '1939-01-01', null]);
  });

  test('goes by its cast mark, not by what was stamped on it later', async () => {
    const { knex } = database;
    const fit = await fitOf(YEAR, A_YEAR, TEN, 'O-BL-ON', knex);
    const { partId } = await knex('part_fittings').where({ id: fit.fittingId }).first<{ partId: string }>('partId');
    const [mark] = await knex('marks').where({ partId }).select<{ id: string }[]>('id');
    await knex('marks').where({ id: mark?.id }).update({ technique: 'stamped' });
    const { modelId } = await knex('part_fittings').where({ id: fit.fittingId }).first<{ modelId: string }>('modelId');
    expect((await workOut({ models: [modelId] }, knex)).changed).toBe(1);
    expect(await PartFit.query(knex).findById(fit.fittingId)).toMatchObject({ verdict: null, markId: null, built: { from: '1939-01-01' } });
  });

  test('is worked out again when its cipher is retired, and its owner is told so', async () => {
    const { knex } = database;
    const fit = await fitOf(YEAR, A_YEAR, TEN, 'O-BL-ON', knex);
    const decoding = await MarkDecoding.query(knex).findById(fit.markId ?? '').throwIfNotFound();
    const cipherId = decoding.cipherId ?? '';
    const cipher = await Cipher.query(knex).findById(cipherId).throwIfNotFound();
    await Cipher.query(knex).deleteById(cipherId);
    const { id } = await Rework.query(knex).insert({ id: uuidV7(), factId: cipherId, kind: 'cipher', version: null, makers: [cipher.makerId], models: [] });
    await runRework(id, { knex, ciphers: createCipherCache({ onUnusable: () => expect.unreachable() }), signal: new AbortController().signal });
    expect(await MarkDecoding.query(knex).findById(decoding.markId)).toMatchObject({ status: 'none', cipherId: null, candidates: [] });
    expect(await PartFit.query(knex).findById(fit.fittingId)).toMatchObject({ verdict: null, markId: null });
    expect(await Rework.query(knex).findById(id)).toMatchObject({ state: 'done', changed: 2 });
    const [notice] = await Notice.query(knex).where({ kind: 'recomputed' });
    expect(notice?.title).toBe('Worked out again: Q5');
    expect(notice?.body).toMatch(/ was taken out of the catalogue\.\nWhat came out otherwise:\nQ5: 1 date, 1 fit\.$/);
  });

  test('with many others of one owner is told in one notice no longer than a notice may be', async () => {
    const { knex } = database;
    const { makerId } = await addCipher({ definition: TEN }, knex);
    const position = await addPosition({}, knex);
    const { modelId } = position;
    const series = await addSeries({ modelId, prefix: 'Q' }, knex);
    for (let number = 1; number <= 17; number += 1) {
      const machine = await addMachine({ modelId, serialAsStamped: `${series.prefix}${number}`, nickname: 'N'.repeat(200) }, knex);
      const part = await addPart({ makerId }, knex);
      await fitPart(part, machine, position, knex);
      await addMark(part, 'date-code', 'RLKON', knex);
    }
    await workOut({ makers: [makerId] }, knex);
    await knex('mark_decodings').update({ candidates: JSON.stringify([{ from: '1939-07-26', to: '1939-07-26', share: 1 }]) });
    await CipherVersion.query(knex).where({ number: 1 }).whereIn('cipherId', knex('ciphers').select('id').where({ makerId })).patch({ supersededAt: '2026-11-01T00:00:00Z' });
    const cipher = await Cipher.query(knex).findOne({ makerId }).throwIfNotFound();
    const before = await CipherVersion.query(knex).findById([cipher.id, 1]).throwIfNotFound();
    await CipherVersion.query(knex).insert({
      cipherId: cipher.id, number: 2, header: before.header, citations: [], enteredById: before.enteredById, enteredAt: '2026-11-01T00:00:00Z', reason: 'R'.repeat(4_000), definition: TEN,
    });
    const { id } = await Rework.query(knex).insert({ id: uuidV7(), factId: cipher.id, kind: 'cipher', version: 2, makers: [makerId], models: [] });
    await runRework(id, { knex, ciphers: createCipherCache({ onUnusable: () => expect.unreachable() }), signal: new AbortController().signal });
    const notices = await Notice.query(knex).where({ kind: 'recomputed' });
    expect(notices.map(({ title }) => title)).toEqual(['Worked out again: 17 of your machines']);
    expect(notices[0]?.body).toMatch(/: R{499}…\n[^]*\nAnd on 2 more\.$/);
  });
});
