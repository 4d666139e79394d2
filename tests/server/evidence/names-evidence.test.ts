import { describe, expect, test } from 'vitest';
import { MarkDecoding } from '#db/models/mark-decoding.ts';
import { Maker } from '#db/models/maker.ts';
import { MachineModel } from '#db/models/machine-model.ts';
import { PartType } from '#db/models/part-type.ts';
import { Works } from '#db/models/works.ts';
import { makerEvidence } from '#server/services/kinds/maker-evidence.ts';
import { modelEvidence } from '#server/services/kinds/model-evidence.ts';
import { partTypeEvidence } from '#server/services/kinds/part-type-evidence.ts';
import { wearLimitEvidence } from '#server/services/kinds/wear-limit-evidence.ts';
import { worksEvidence } from '#server/services/kinds/works-evidence.ts';
import { useDatabase } from '#tests/support/database.ts';
import { addCipher, addMaker } from '#tests/support/factories/catalogue.ts';
import { addCasting, addMark, addPart } from '#tests/support/factories/record.ts';
import { groupCalled, told } from './groups-of.ts';

const database = useDatabase();

const MAKER = { place: null, buildsMachines: true, poursIron: true, foundryMark: null, founded: null, closed: null, note: null };

describe('the evidence for a maker', () => {
  test('names makers that read alike or share its mark', async () => {
    const { knex } = database;
    const payload = { ...MAKER, name: 'Brackwater Tractor Co', foundryMark: 'S◇' };
    const findings = await makerEvidence({ factId: null, payload }, knex);
    expect(groupCalled(findings, 'namesakes').items.map(({ subject }) => subject?.title)).toEqual(['Brackwater Tractor Works']);
    expect(groupCalled(findings, 'same-mark').items.map(({ subject }) => subject?.title)).toEqual(['Skerry Foundry']);
    expect(told(await makerEvidence({ factId: null, payload: { ...MAKER, name: 'Zzyzx' } }, knex))).toEqual({
      namesakes: [0, null, 0, []],
      'same-mark': [0, null, 0, []],
    });
  });

  test('of one on record says what refers to it, and which of its castings are dated outside its years', async () => {
    const { knex } = database;
    const maker = await addMaker({}, knex);
    const cipher = await addCipher({ makerId: maker.id }, knex);
    const casting = await addCasting({ makerId: maker.id }, knex);
    for (const [day, visibility] of [['1931-05-01', 'public'], ['1929-05-01', 'public'], ['1941-05-01', 'private']] as const) {
      const mark = await addMark(await addPart({ castingId: casting.id, visibility }, knex), 'date-code', 'E31', knex);
      await MarkDecoding.query(knex).insert({ markId: mark.id, cipherId: cipher.id, cipherVersion: 1, status: 'dated', total: 1, candidates: [{ from: day, to: day, share: 1 }] });
    }
    const findings = told(await makerEvidence({ factId: maker.id, payload: { ...MAKER, name: maker.name, founded: 1930, closed: 1940 } }, knex));
    expect(findings).toMatchObject({
      'outside-years': [2, 3, 1, ['cast 1 May 1929']],
      models: [0, null, 0, []],
      castings: [1, null, 0, []],
      ciphers: [1, null, 0, []],
      parts: [3, null, 0, []],
    });
    const open = told(await makerEvidence({ factId: maker.id, payload: { ...MAKER, name: maker.name } }, knex));
    expect(open['outside-years']?.slice(0, 2)).toEqual([0, 3]);
  });
});

describe('the evidence for works, models, part types and wear limits', () => {
  test('names what reads alike of the same maker only, and not itself', async () => {
    const { knex } = database;
    const works = await Works.query(knex).orderBy('id').first().throwIfNotFound();
    const other = await Maker.query(knex).whereNot({ id: works.makerId }).orderBy('id').first().throwIfNotFound();
    const namesakes = async (factId: string | null, makerId: string) =>
      groupCalled(await worksEvidence({ factId, payload: { makerId, name: works.name, place: null, note: null } }, knex), 'namesakes').items.map(({ subject }) => subject?.id);
    expect(await namesakes(null, works.makerId)).toContain(works.id);
    expect(await namesakes(works.id, works.makerId)).not.toContain(works.id);
    expect(await namesakes(null, other.id)).not.toContain(works.id);
  });

  test('of a model tells its ranges with days outside its years', async () => {
    const { knex } = database;
    const model = await MachineModel.query(knex).findOne({ slug: 'brackwater-30-crawler' }).throwIfNotFound();
    const { makerId, name, machineKind } = model;
    const outside = async (made: { from: string | null; to: string | null } | null) =>
      told(await modelEvidence({ factId: model.id, payload: { makerId, name, machineKind, made, note: null } }, knex))['outside-years'];
    expect((await outside({ from: '1900-01-01', to: '1999-12-31' }))?.[0]).toBe(0);
    expect((await outside(null))?.[0]).toBe(0);
    const all = await outside({ from: '1950-01-01', to: null });
    expect(all?.[0]).toBe(all?.[1]);
    expect(all?.[0]).toBeGreaterThan(0);
  });

  test('of a part type and a wear limit count what refers', async () => {
    const { knex } = database;
    const partType = await PartType.query(knex).findOne({ slug: 'cylinder-block' }).throwIfNotFound();
    const findings = told(await partTypeEvidence({ factId: partType.id, payload: { name: partType.name, note: null, caution: null } }, knex));
    expect(findings['castings']?.[0]).toBeGreaterThan(0);
    expect(findings['positions']?.[0]).toBeGreaterThan(0);
    const parts = findings['parts']?.[0];
    expect(parts).toBeGreaterThan(0);
    const limit = {
      partTypeId: partType.id, modelId: null, measure: 'bore', unit: 'mm', asBuilt: null, direction: 'most', limit: 101, method: null, note: null,
    } as const;
    const limits = told(await wearLimitEvidence({ factId: null, payload: limit }, knex));
    expect(limits['parts']?.[0]).toBe(parts);
    expect(limits).toHaveProperty('other-limits');
  });
});
