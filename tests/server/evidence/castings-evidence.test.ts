import type { Knex } from 'knex';
import { describe, expect, test } from 'vitest';
import { MarkDecoding } from '#db/models/mark-decoding.ts';
import type { Mark } from '#db/models/mark.ts';
import { castingEvidence } from '#server/services/kinds/casting-evidence.ts';
import { fitmentEvidence } from '#server/services/kinds/fitment-evidence.ts';
import { positionEvidence } from '#server/services/kinds/position-evidence.ts';
import { supersessionEvidence } from '#server/services/kinds/supersession-evidence.ts';
import { useDatabase } from '#tests/support/database.ts';
import { addCipher, addMaker } from '#tests/support/factories/catalogue.ts';
import {
  addAccount, addCasting, addFitment, addMachine, addMark, addPart, addPartType, addPosition, addRange, addSeries, fitPart,
} from '#tests/support/factories/record.ts';
import { groupCalled, told } from './groups-of.ts';

const database = useDatabase();

/** Says what a date mark was worked out to mean. */
async function dated(mark: Mark, days: readonly string[], knex: Knex): Promise<void> {
  const cipher = await addCipher({}, knex);
  await MarkDecoding.query(knex).insert({
    markId: mark.id,
    cipherId: cipher.id,
    cipherVersion: 1,
    status: days.length === 1 ? 'dated' : 'several',
    total: days.length,
    candidates: days.map((day) => ({ from: day, to: day, share: 1 / days.length })),
  });
}

describe('the evidence for a casting', () => {
  async function county(knex: Knex) {
    const { id: makerId } = await addMaker({}, knex);
    const { id: partTypeId } = await addPartType({ name: 'Test bracket' }, knex);
    return { makerId, partTypeId };
  }

  function payloadOf(makerId: string, partTypeId: string) {
    return { makerId, partTypeId, pouredById: null, number: 'T-44', pattern: null, made: { from: '1939-01-01', to: '1940-12-31' }, note: null, tells: [], partNumbers: [] };
  }

  test('tells the same number elsewhere, the marks that carry it, and their dates against its years', async () => {
    const { knex } = database;
    const { makerId, partTypeId } = await county(knex);
    await addCasting({ makerId, partTypeId, number: 'T 44', pattern: 'first pattern' }, knex);
    await addCasting({ number: 'T44', made: { from: '1950-01-01', to: null } }, knex);
    const part = async (number: string, days: readonly string[], given = {}) => {
      const one = await addPart({ makerId, partTypeId, ...given }, knex);
      await addMark(one, 'casting-number', number, knex);
      if (days.length > 0) await dated(await addMark(one, 'date-code', 'RLKON', knex), days, knex);
    };
    await part('T44', ['1939-07-25']);
    await part('T-44', ['1941-01-13', '1940-11-03'], { visibility: 'private' });
    await part('T44', ['1941-01-13']);
    await part('T?4', ['1939-07-25']);
    await part('T45', ['1939-07-25']);
    await part('T44', [], { partTypeId: (await addPartType({ name: 'Test wheel' }, knex)).id });
    await part('T44', ['1939-07-25'], { makerId: (await addMaker({}, knex)).id });

    expect(told(await castingEvidence({ factId: null, payload: payloadOf(makerId, partTypeId) }, knex))).toEqual({
      'same-number': [1, null, 0, ['years not known']],
      'same-number-elsewhere': [1, null, 0, ['poured from 1 Jan 1950 on']],
      marks: [4, null, 1, ['cast 25 Jul 1939', 'cast 13 Jan 1941', 'undated']],
      'marks-perhaps': [1, null, 0, ['cast 25 Jul 1939']],
      'within-years': [2, 3, 1, ['cast 25 Jul 1939']],
      'outside-years': [1, 3, 0, ['cast 13 Jan 1941']],
      'other-part-type': [1, null, 0, ['Test wheel']],
    });
  });

  test('of itself says nothing, and without years no date is within or outside', async () => {
    const { knex } = database;
    const { makerId, partTypeId } = await county(knex);
    const own = await addCasting({ makerId, partTypeId, number: 'T 44' }, knex);
    const part = await addPart({ makerId, partTypeId }, knex);
    await addMark(part, 'casting-number', 'T44', knex);
    await dated(await addMark(part, 'date-code', 'RLKON', knex), ['1939-07-25'], knex);
    const findings = told(await castingEvidence({ factId: own.id, payload: { ...payloadOf(makerId, partTypeId), made: null } }, knex));
    expect(findings['same-number']?.[0]).toBe(0);
    expect(findings['marks']?.[0]).toBe(1);
    expect(findings['within-years']).toEqual([0, 0, 0, []]);
  });
});

/** A model with serials Q1–Q9 of 1939 and Q10–Q19 of 1940, a position with a lead of at most a year, and two castings that go there. */
async function fittedCounty(knex: Knex) {
  const position = await addPosition({ lead: { from: 0, to: 365 } }, knex);
  const { modelId, partTypeId } = position;
  const series = await addSeries({ modelId, prefix: 'Q' }, knex);
  const account = await addAccount('A book', knex);
  const range = (from: string, to: string, year: string) =>
    addRange({ seriesId: series.id, accountId: account.id, numbers: { from, to }, built: { from: `${year}-01-01`, to: `${year}-12-31` } }, knex);
  await range('1', '9', '1939');
  await range('10', '19', '1940');
  const { makerId } = series;
  const older = await addCasting({ makerId, partTypeId, number: 'T1', made: { from: '1936-01-01', to: '1939-12-31' } }, knex);
  const later = await addCasting({ makerId, partTypeId, number: 'T2' }, knex);
  const fitted = async (serialAsStamped: string, castingId: string | null, day?: string, visibility: 'public' | 'private' = 'public') => {
    const part = await addPart({ makerId, partTypeId, castingId, visibility }, knex);
    await fitPart(part, await addMachine({ modelId, serialAsStamped }, knex), position, knex);
    if (day !== undefined) await dated(await addMark(part, 'date-code', 'RLKON', knex), [day], knex);
    return part;
  };
  return { position, series, older, later, fitted };
}

describe('the evidence for a fitment', () => {
  test('tells what else is said of the position, and the parts seen there on such machines and on others', async () => {
    const { knex } = database;
    const { position, series, older, later, fitted } = await fittedCounty(knex);
    await addFitment({ castingId: older.id, positionId: position.id, seriesId: series.id, numbers: { from: '10', to: '19' }, verdict: 'earlier-fits' }, knex);
    await addFitment({ castingId: later.id, positionId: position.id, verdict: 'later-fits' }, knex);
    await fitted('Q2', older.id, '1939-03-12');
    await fitted('Q3', older.id, undefined, 'private');
    await fitted('Q4', later.id);
    await fitted('Q5', null);
    await fitted('Q12', older.id);
    const payload = { positionId: position.id, castingId: older.id, seriesId: series.id, numbers: { from: null, to: '9' }, verdict: 'as-built', note: null } as const;
    expect(told(await fitmentEvidence({ factId: null, payload }, knex))).toEqual({
      'same-casting': [1, null, 0, ['earlier fits: Q 10 to 19']],
      'other-castings': [1, null, 0, ['later fits: every series']],
      seen: [2, 4, 1, ['cast 12 Mar 1939']],
      'seen-other': [1, 4, 0, ['undated']],
      'seen-unknown': [1, 4, 0, ['undated']],
      'seen-elsewhere': [1, null, 0, ['undated']],
    });
    const everySeries = told(await fitmentEvidence({ factId: null, payload: { ...payload, seriesId: null, numbers: { from: null, to: null } } }, knex));
    expect([everySeries['seen']?.[0], everySeries['seen-elsewhere']?.[0]]).toEqual([3, 0]);
  });
});

describe('the evidence for a position', () => {
  test('judges the dated parts that are there now by its lead', async () => {
    const { knex } = database;
    const { position, older, fitted } = await fittedCounty(knex);
    // Days and verdicts of the worked table of fit, for a machine built in all of 1939 and a lead of 0 to 365 days.
    await fitted('Q1', older.id, '1938-12-31');
    await fitted('Q2', older.id, '1939-03-12');
    await fitted('Q3', older.id, '1943-02-02');
    await fitted('Q4', older.id, '1930-01-01');
    await fitted('Q5', older.id);
    const { modelId, partTypeId, name, ordinal } = position;
    await addPosition({ modelId, partTypeId, name: 'The other', ordinal: 77 }, knex);
    const payload = { modelId, partTypeId, name, ordinal, weight: 1, lead: { from: 0, to: 365 }, note: null };
    const findings = await positionEvidence({ factId: position.id, payload }, knex);
    const counts = told(findings);
    expect(counts['in-step']).toEqual([1, 4, 0, ['cast 31 Dec 1938; machine built 1939']]);
    expect([counts['possible']?.[0], counts['cast-after-build']?.[0], counts['older-stock']?.[0], counts['unsettled']?.[0]]).toEqual([1, 1, 1, 0]);
    expect(counts['same-part-type']).toEqual([1, null, 0, ['row 77']]);
    expect(counts['parts']?.[0]).toBe(5);
    const open = told(await positionEvidence({ factId: position.id, payload: { ...payload, lead: null } }, knex));
    expect([open['in-step']?.[0], open['older-stock']?.[0]]).toEqual([2, 0]);
    expect(told(await positionEvidence({ factId: null, payload }, knex))).not.toHaveProperty('in-step');
  });
});

describe('the evidence for a supersession', () => {
  test('lays the years and the dated parts of the two beside each other', async () => {
    const { knex } = database;
    const { older, later, fitted } = await fittedCounty(knex);
    await fitted('Q1', older.id, '1938-12-31');
    await fitted('Q2', later.id, '1939-03-12', 'private');
    const payload = { oldId: older.id, newId: later.id, interchange: 'both-ways', note: null } as const;
    const findings = await supersessionEvidence({ factId: null, payload }, knex);
    expect(told(findings)).toEqual({
      years: [2, null, 0, ['poured 1936–1939', 'years not known']],
      others: [0, null, 0, []],
      'old-parts': [1, null, 0, ['cast 31 Dec 1938']],
      'new-parts': [1, null, 1, []],
    });
    expect(groupCalled(findings, 'years').items[0]?.subject).toMatchObject({ kind: 'casting', id: older.id, title: 'T1' });
  });
});
