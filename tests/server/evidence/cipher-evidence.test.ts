import type { Knex } from 'knex';
import { describe, expect, test } from 'vitest';
import type { CipherDefinition } from '#domain/ciphers/definition.ts';
import type { Cipher } from '#db/models/cipher.ts';
import { cipherEvidence } from '#server/services/kinds/cipher-evidence.ts';
import { TEN } from '#tests/domain/ciphers/worked-ciphers.ts';
import { useDatabase } from '#tests/support/database.ts';
import { addCipher, addMaker } from '#tests/support/factories/catalogue.ts';
import { addAccount, addCasting, addMachine, addMark, addPart, addPosition, addRange, addSeries, fitPart } from '#tests/support/factories/record.ts';
import { groupCalled, told } from './groups-of.ts';

const database = useDatabase();

function proposalOf(cipher: Pick<Cipher, 'id' | 'makerId' | 'foundryId' | 'title' | 'machineKind' | 'note'>, definition: CipherDefinition, isNew = false) {
  const { makerId, foundryId, title, machineKind, note } = cipher;
  return { factId: isNew ? null : cipher.id, payload: { makerId, foundryId, title, machineKind, note, definition } };
}

/** A casting of 1939 to 1945, and one machine built in January 1941. */
async function county(knex: Knex) {
  const cipher = await addCipher({ definition: TEN }, knex);
  const { makerId } = cipher;
  const position = await addPosition({}, knex);
  const { modelId, partTypeId } = position;
  const casting = await addCasting({ makerId, partTypeId, number: 'T-1', made: { from: '1939-01-01', to: '1945-12-31' } }, knex);
  const series = await addSeries({ modelId, prefix: 'Q' }, knex);
  const account = await addAccount('A book', knex);
  await addRange({ seriesId: series.id, accountId: account.id, numbers: { from: '1', to: '9' }, built: { from: '1941-01-01', to: '1941-01-31' } }, knex);
  const machine = await addMachine({ modelId, serialAsStamped: 'Q 5' }, knex);
  return { cipher, makerId, position, casting, machine };
}

describe('the evidence for a cipher', () => {
  test('tells the marks it dates, dates several ways and can’t date, against their castings’ years and their machines’ days', async () => {
    const { knex } = database;
    const { cipher, makerId, position, casting, machine } = await county(knex);
    const onCasting = () => addPart({ makerId, castingId: casting.id }, knex);
    // The readings and their dates are those of the worked examples.
    const july = await addMark(await onCasting(), 'date-code', 'RLKON', knex);
    await addMark(await onCasting(), 'date-code', 'KPOI', knex);
    await addMark(await addPart({ makerId, visibility: 'private' }, knex), 'date-code', 'TKKOI', knex);
    const fitted = await onCasting();
    await fitPart(fitted, machine, position, knex);
    await addMark(fitted, 'date-code', 'BBOCB', knex);
    const late = await addPart({ makerId }, knex);
    const second = await addMachine({ modelId: machine.modelId, serialAsStamped: 'Q7' }, knex);
    await fitPart(late, second, position, knex);
    await addMark(late, 'date-code', 'B-O-CL', knex);
    // Not its maker’s, not a date, and not read: none of these is asked.
    await addMark(await addPart({ makerId: (await addMaker({}, knex)).id }, knex), 'date-code', 'RLKON', knex);
    await addMark(await onCasting(), 'casting-number', 'T1', knex);

    const findings = await cipherEvidence(proposalOf(cipher, TEN, true), knex);
    expect(told(findings)).toEqual({
      dates: [3, 5, 0, ['25 Jul 1939', '6 May 1938', '3 Jan 1942']],
      several: [1, 5, 0, ['13 Jan 1941 or 3 Nov 1941']],
      'cannot-date': [1, 5, 1, []],
      'outside-years': [1, 3, 0, ['6 May 1938; poured 1939–1945']],
      'after-build': [1, 2, 0, ['3 Jan 1942; machine built January 1941']],
    });
    expect(groupCalled(findings, 'dates').items[0]).toEqual({
      subject: { kind: 'mark', id: july.id, title: 'Date mark on T-1' },
      mark: 'RLKON',
      text: '25 Jul 1939',
    });
  });

  test('of a change tells what the version in force reads otherwise', async () => {
    const { knex } = database;
    const { cipher, makerId } = await county(knex);
    await addMark(await addPart({ makerId }, knex), 'date-code', 'RLKON', knex);
    await addMark(await addPart({ makerId }, knex), 'date-code', 'KPOI', knex);
    const shorter = { ...TEN, usedFrom: '1939-01-01' };
    const { changes, dates } = told(await cipherEvidence(proposalOf(cipher, shorter), knex));
    expect(dates?.[0]).toBe(1);
    expect(changes?.slice(0, 3)).toEqual([1, 2, 0]);
    expect(changes?.[3][0]).toMatch(/; in force: 6 May 1938$/);
    expect(told(await cipherEvidence(proposalOf(cipher, TEN), knex))['changes']).toEqual([0, 2, 0, []]);
    expect(told(await cipherEvidence(proposalOf(cipher, TEN, true), knex))).not.toHaveProperty('changes');
  });

  test('keeps to castings of its foundry where it has one, and to those nobody has identified', async () => {
    const { knex } = database;
    const foundry = await addMaker({ poursIron: true }, knex);
    const cipher = await addCipher({ definition: TEN, foundryId: foundry.id }, knex);
    const { makerId } = cipher;
    const poured = await addCasting({ makerId, pouredById: foundry.id }, knex);
    const own = await addCasting({ makerId }, knex);
    await addMark(await addPart({ castingId: poured.id }, knex), 'date-code', 'RLKON', knex);
    await addMark(await addPart({ makerId }, knex), 'date-code', 'KPOI', knex);
    await addMark(await addPart({ castingId: own.id }, knex), 'date-code', 'CLKON', knex);
    await addMark(await addPart({ makerId: foundry.id }, knex), 'date-code', 'LLKON', knex);
    const { dates } = told(await cipherEvidence(proposalOf(cipher, TEN), knex));
    expect(dates?.[0]).toBe(3);
    const everyFoundry = told(await cipherEvidence(proposalOf({ ...cipher, foundryId: null }, TEN), knex));
    expect(everyFoundry['dates']?.[0]).toBe(3);
    expect(everyFoundry['dates']?.[3]).toContain('25 Apr 1939');
    expect(dates?.[3]).not.toContain('25 Apr 1939');
  });

  test('with nothing on record is empty, with no figure', async () => {
    const { knex } = database;
    const cipher = await addCipher({ definition: TEN }, knex);
    const findings = await cipherEvidence(proposalOf(cipher, TEN), knex);
    expect(findings.groups.map(({ count }) => count)).toEqual([0, 0, 0, 0, 0, 0]);
    expect(findings.figures).toEqual([]);
  });
});

describe('what chance alone would give', () => {
  const WORD = 'BLOCKPRINT';
  const keyed = (word: string): CipherDefinition => ({
    ...TEN,
    symbolSets: { key: { kind: 'digits', symbols: Object.fromEntries([...word].map((letter, place) => [letter, String((place + 1) % 10)])) } },
  });

  async function dated(knex: Knex) {
    const cipher = await addCipher({ definition: TEN }, knex);
    const casting = await addCasting({ makerId: cipher.makerId, made: { from: '1938-01-01', to: '1941-12-31' } }, knex);
    for (const text of ['RLKON', 'KPOI', 'OBLON', 'CLBCT', 'BBOCB', 'NTOI', 'ICON', 'LBOCT']) {
      await addMark(await addPart({ castingId: casting.id }, knex), 'date-code', text, knex);
    }
    return cipher;
  }

  test('is next to nothing for the true key, and much for a key that is no better than another', async () => {
    const { knex } = database;
    const cipher = await dated(knex);
    const figures = async (word: string) => (await cipherEvidence(proposalOf(cipher, keyed(word)), knex)).figures;
    const [agreement, usual, chance] = await figures(WORD);
    expect(agreement).toMatchObject({ code: 'agreement', value: 7 / 8, working: '7 of 8 date marks on castings whose years are on record.' });
    expect(usual?.value).toBeLessThan(0.2);
    expect(chance).toMatchObject({ code: 'chance', value: 1 / 200 });
    expect(chance?.working).toContain('199 times');
    const [none, , often] = await figures('TNIRPKCOLB');
    expect(none?.value).toBe(0);
    expect(often?.value).toBe(1);
    expect(await figures(WORD)).toEqual([agreement, usual, chance]);
  });

  test('is not to be said of a layout in numerals', async () => {
    const { knex } = database;
    const cipher = await dated(knex);
    const figures: CipherDefinition = {
      fields: [
        { field: 'month', symbols: 'numerals', width: 2 },
        { field: 'year', symbols: 'numerals', width: 2 },
      ],
      symbolSets: {},
      usedFrom: '1928-01-01',
      usedTo: null,
    };
    expect((await cipherEvidence(proposalOf(cipher, figures), knex)).figures).toEqual([]);
  });
});
