import type { Knex } from 'knex';
import { describe, expect, test } from 'vitest';
import { anchorEvidence } from '#server/services/kinds/anchor-evidence.ts';
import { serialRangeEvidence } from '#server/services/kinds/serial-range-evidence.ts';
import { seriesEvidence } from '#server/services/kinds/series-evidence.ts';
import { useDatabase } from '#tests/support/database.ts';
import { addAccount, addAnchor, addMachine, addModel, addRange, addSeries } from '#tests/support/factories/record.ts';
import { told } from './groups-of.ts';

const database = useDatabase();

/** One account has 1–9 in 1938 and 31–39 in 1940, another 21–25 in 1941; 22 and 24 are dated. */
async function county(knex: Knex) {
  const series = await addSeries({ prefix: 'Q' }, knex);
  const seriesId = series.id;
  const book = await addAccount('A book', knex);
  const list = await addAccount('A list', knex);
  const first = await addRange({ seriesId, accountId: book.id, numbers: { from: '1', to: '9' }, built: { from: '1938-01-01', to: '1938-12-31' } }, knex);
  await addRange({ seriesId, accountId: book.id, numbers: { from: '31', to: '39' }, built: { from: '1940-01-01', to: '1940-12-31' } }, knex);
  await addRange({ seriesId, accountId: list.id, numbers: { from: '21', to: '25' }, built: { from: '1941-01-01', to: '1941-12-31' } }, knex);
  await addRange({ seriesId, accountId: list.id, numbers: { from: '20', to: '29' }, built: { from: '1942-01-01', to: '1942-12-31' }, meaning: 'sold' }, knex);
  await addAnchor({ seriesId, number: '22', built: { from: '1939-06-05', to: '1939-06-05' } }, knex);
  await addAnchor({ seriesId, number: '24', built: { from: '1939-05-05', to: '1939-05-05' } }, knex);
  await addAnchor({ seriesId, number: '27', built: { from: '1941-02-01', to: '1941-02-01' } }, knex);
  await addMachine({ modelId: series.modelId, serialAsStamped: 'Q23' }, knex);
  await addMachine({ modelId: series.modelId, serialAsStamped: 'Q40', visibility: 'private' }, knex);
  return { series, book, list, first };
}

const PAYLOAD = { built: { from: '1939-01-01', to: '1939-12-31' }, precision: 'year', meaning: 'built', standing: 'solid', note: null } as const;

describe('the evidence for a serial range', () => {
  test('tells gaps, rivals, dated machines that agree or not and in which order, and machines', async () => {
    const { knex } = database;
    const { series, book } = await county(knex);
    const payload = { ...PAYLOAD, seriesId: series.id, accountId: book.id, numbers: { from: '11', to: '28' }, inOrder: true };
    expect(told(await serialRangeEvidence({ factId: null, payload }, knex))).toEqual({
      overlaps: [0, null, 0, []],
      gaps: [2, null, 0, ['10 left out', '29 to 30 left out']],
      rivals: [1, null, 0, ['A list: 21 to 25, 1941']],
      'anchors-agree': [2, 3, 0, ['22: 5 Jun 1939', '24: 5 May 1939']],
      'anchors-disagree': [1, 3, 0, ['27: 1 Feb 1941']],
      'anchors-out-of-order': [1, 3, 0, ['24: 5 May 1939']],
      machines: [1, null, 0, []],
    });
  });

  test('tells numbers shared with its own account, itself left out, and takes an open end as every later number', async () => {
    const { knex } = database;
    const { series, book, first } = await county(knex);
    const payload = { ...PAYLOAD, seriesId: series.id, accountId: book.id, numbers: { from: '5', to: null }, inOrder: false };
    const findings = told(await serialRangeEvidence({ factId: null, payload }, knex));
    expect(findings['overlaps']).toEqual([2, null, 0, ['A book: 1 to 9, 1938', 'A book: 31 to 39, 1940']]);
    expect(findings['gaps']?.[0]).toBe(0);
    expect(findings['machines']?.[0]).toBe(2);
    expect(findings).not.toHaveProperty('anchors-out-of-order');
    expect(told(await serialRangeEvidence({ factId: first.id, payload }, knex))['overlaps']?.[0]).toBe(1);
  });

  test('of a new account has every other for a rival, and no neighbour', async () => {
    const { knex } = database;
    const { series } = await county(knex);
    const payload = { ...PAYLOAD, seriesId: series.id, accountId: null, numbers: { from: '1', to: '40' }, inOrder: false };
    const findings = told(await serialRangeEvidence({ factId: null, payload }, knex));
    expect(findings['rivals']?.[0]).toBe(3);
    expect([findings['overlaps']?.[0], findings['gaps']?.[0]]).toEqual([0, 0]);
  });
});

describe('the evidence for a dated machine', () => {
  test('tells ranges that agree or not, the same number, and days that run against the numbers', async () => {
    const { knex } = database;
    const { series, list } = await county(knex);
    await addRange({ seriesId: series.id, accountId: list.id, numbers: { from: '26', to: '29' }, built: { from: '1941-01-01', to: '1942-12-31' }, inOrder: true }, knex);
    const payload = { seriesId: series.id, number: '27', built: { from: '1938-03-01', to: '1938-03-01' }, precision: 'day', meaning: 'built', note: null } as const;
    expect(told(await anchorEvidence({ factId: null, payload }, knex))).toEqual({
      'ranges-agree': [0, 1, 0, []],
      'ranges-disagree': [1, 1, 0, ['A list: 26 to 29, 1941–1942']],
      'same-number': [1, null, 0, ['27: 1 Feb 1941']],
      'out-of-order': [2, 3, 0, ['22: 5 Jun 1939', '24: 5 May 1939']],
      machines: [0, null, 0, []],
    });
    const agreeing = { ...payload, number: '23', built: { from: '1941-03-01', to: '1941-03-01' } };
    const findings = told(await anchorEvidence({ factId: null, payload: agreeing }, knex));
    expect(findings['ranges-agree']?.[0]).toBe(1);
    expect(findings['machines']?.[0]).toBe(1);
    expect(findings).not.toHaveProperty('out-of-order');
  });
});

describe('the evidence for a series', () => {
  test('tells prefixes of the maker that read alike, machines that carry it, and what refers to it', async () => {
    const { knex } = database;
    const { series } = await county(knex);
    await addSeries({ modelId: series.modelId, prefix: 'O1' }, knex);
    await addSeries({ modelId: series.modelId, prefix: 'P1' }, knex);
    const other = await addModel({}, knex);
    await addSeries({ modelId: other.id, prefix: '01' }, knex);
    const payload = { modelId: series.modelId, prefix: '0I', worksId: null, label: null, note: null };
    const findings = told(await seriesEvidence({ factId: null, payload }, knex));
    expect(findings).toEqual({ 'reads-alike': [1, null, 0, ['prefix O1']], machines: [0, null, 0, []] });
    const own = told(await seriesEvidence({ factId: series.id, payload: { ...payload, prefix: 'Q' } }, knex));
    expect(own).toEqual({
      'reads-alike': [0, null, 0, []],
      machines: [2, null, 0, []],
      ranges: [4, null, 0, []],
      anchors: [3, null, 0, []],
      fitments: [0, null, 0, []],
    });
  });
});
