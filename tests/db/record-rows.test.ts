import { DatabaseError } from 'pg';
import { v7 as uuidV7 } from 'uuid';
import { describe, expect, test } from 'vitest';
import { FIT_VERDICTS } from '#domain/fit/fit.ts';
import {
  EVIDENCE_STRENGTHS,
  MARK_KINDS,
  MARK_TECHNIQUES,
  PHOTO_STATES,
  PHOTO_TYPES,
  RENDITIONS,
  RENDITION_TYPES,
  VISIBILITIES,
} from '#domain/vocabulary.ts';
import { Mark } from '#db/models/mark.ts';
import { MarkDecoding } from '#db/models/mark-decoding.ts';
import { PartFitting } from '#db/models/part-fitting.ts';
import { REWORK_STATES } from '#db/vocabulary.ts';
import { useDatabase } from '#tests/support/database.ts';
import { addMachine, addMark, addPart, addPosition, addSeries } from '#tests/support/factories/record.ts';

const database = useDatabase();

/** SQLSTATE and constraint that a statement fails with; nothing where it succeeds. Codes: appendix A of the PostgreSQL 15 manual. */
async function refusal(work: () => Promise<unknown>): Promise<string | null> {
  try {
    await database.knex.transaction(async () => work());
    return null;
  } catch (error) {
    const native = error instanceof Error && 'nativeError' in error ? error.nativeError : error;
    if (native instanceof DatabaseError) return `${native.code ?? ''} ${native.constraint ?? ''}`;
    throw error;
  }
}

async function twoMachines() {
  const { knex } = database;
  const position = await addPosition({}, knex);
  const other = await addPosition({ modelId: position.modelId }, knex);
  await addSeries({ modelId: position.modelId, prefix: 'Q' }, knex);
  const machine = await addMachine({ modelId: position.modelId, serialAsStamped: 'Q1' }, knex);
  const second = await addMachine({ modelId: position.modelId, serialAsStamped: 'Q2' }, knex);
  return { position, other, machine, second };
}

function fit(partId: string, machine: { readonly id: string; readonly modelId: string }, position: { readonly id: string }, from: string, to: string | null) {
  return PartFitting.query(database.knex).insert({
    id: uuidV7(), partId, machineId: machine.id, positionId: position.id, modelId: machine.modelId, fitted: { from, to },
  });
}

describe('where a part is', () => {
  test('is one machine at a time, and the only one at its position there', async () => {
    const { position, machine, second } = await twoMachines();
    const part = await addPart({}, database.knex);
    await fit(part.id, machine, position, '2020-01-01', '2020-12-31');
    expect(await refusal(() => fit(part.id, second, position, '2021-01-01', null).then())).toBeNull();
  });

  test.each([
    ['a second machine on the same day', 'second', 'position', '23P01 part_fittings_one_machine'],
    ['another position of the same machine', 'machine', 'other', '23P01 part_fittings_one_machine'],
  ] as const)('is not %s', async (_, on, at, wanted) => {
    const all = await twoMachines();
    const part = await addPart({}, database.knex);
    await fit(part.id, all.machine, all.position, '2020-01-01', '2020-12-31');
    expect(await refusal(() => fit(part.id, all[on], all[at], '2020-12-31', null).then())).toBe(wanted);
  });

  test('is not where another part is', async () => {
    const { position, machine } = await twoMachines();
    await fit((await addPart({}, database.knex)).id, machine, position, '2020-01-01', null);
    const later = await addPart({}, database.knex);
    expect(await refusal(() => fit(later.id, machine, position, '2024-01-01', null).then())).toBe('23P01 part_fittings_one_part');
  });

  test('is not a position of another model', async () => {
    const { machine } = await twoMachines();
    const foreign = await addPosition({}, database.knex);
    const part = await addPart({}, database.knex);
    expect(await refusal(() => fit(part.id, machine, foreign, '2020-01-01', null).then())).toMatch(/^23503 part_fittings_position_id_model_id_fkey/);
  });
});

describe('a mark', () => {
  test('stands on a part or a machine, and what is cast on a part', async () => {
    const { knex } = database;
    const { machine } = await twoMachines();
    const part = await addPart({}, knex);
    const add = (given: Partial<Mark>) => refusal(() => Mark.query(knex).insert({ id: uuidV7(), kind: 'plate', technique: 'cast', ...given }).then());
    expect(await add({ partId: part.id, machineId: machine.id })).toBe('23514 marks_one_place_check');
    expect(await add({})).toBe('23514 marks_one_place_check');
    expect(await add({ machineId: machine.id, kind: 'date-code' })).toBe('23514 marks_machine_check');
    expect(await add({ machineId: machine.id })).toBeNull();
    expect(await add({ partId: part.id, kind: 'date-code' })).toBeNull();
  });
});

describe('what a date mark means', () => {
  test.each<[string, Partial<MarkDecoding>, string]>([
    ['no date and a cipher', { status: 'none', total: 0, candidates: [] }, '23514 mark_decodings_status_total_check'],
    ['one date of two', { status: 'dated', total: 2, candidates: [{ from: '1939-01-01', to: '1939-01-01', share: 1 }] }, '23514 mark_decodings_status_total_check'],
    ['more dates than there are', { status: 'dated', total: 1, candidates: [1, 2].map(() => ({ from: '1939-01-01', to: '1939-01-01', share: 0.5 })) }, '23514 mark_decodings_some_candidates_check'],
    ['a version of no cipher', { cipherId: null, status: 'dated', total: 1, candidates: [{ from: '1939-01-01', to: '1939-01-01', share: 1 }] }, '23514'],
  ])('is not %s', async (_, given, wanted) => {
    const { knex } = database;
    const cipher = await knex('ciphers').orderBy('id').first<{ id: string }>('id');
    const mark = await addMark(await addPart({}, knex), 'date-code', 'AA', knex);
    expect(await refusal(() => MarkDecoding.query(knex).insert({ markId: mark.id, cipherId: cipher.id, cipherVersion: 1, ...given }).then())).toContain(wanted);
  });
});

describe('the words of the columns are those of the vocabulary', () => {
  test.each<[string, readonly string[]]>([
    ['marks_kind_check', MARK_KINDS],
    ['marks_technique_check', MARK_TECHNIQUES],
    ['marks_evidence_check', EVIDENCE_STRENGTHS],
    ['visibility_check', VISIBILITIES],
    ['part_fits_verdict_check', FIT_VERDICTS],
    ['reworks_state_check', REWORK_STATES],
    ['pictures_type_check', PHOTO_TYPES],
    ['pictures_state_check', PHOTO_STATES],
    ['picture_files_rendition_check', RENDITIONS],
    ['picture_files_type_check', RENDITION_TYPES],
  ])('%s', async (constraint, words) => {
    const { rows } = await database.knex.raw<{ rows: { line: string }[] }>('select pg_get_constraintdef(oid) as line from pg_constraint where conname = ?', [constraint]);
    expect([...(rows[0]?.line ?? '').matchAll(/'([^']*)'::text/g)].map(([, word]) => word)).toEqual([...words]);
  });
});
