import type { Knex } from 'knex';
import { v7 as uuidv7 } from 'uuid';
import type { CipherDefinition } from '#domain/ciphers/definition.ts';
import { Cipher } from '#db/models/cipher.ts';
import { CipherVersion } from '#db/models/cipher-version.ts';
import { Fact } from '#db/models/fact.ts';
import { FactVersion } from '#db/models/fact-version.ts';
import { Maker } from '#db/models/maker.ts';
import { Member } from '#db/models/member.ts';
import type { FactKind } from '#domain/vocabulary.ts';

/**
 * Facts for tests: fill in what was not said, build parents on demand. Each has a version in force and no source, which the schema
 * asks for only at commit; a test's transaction never gets there.
 */

const ENTERED_AT = '2026-01-02T03:04:05.000Z';

let made = 0;

/** A number no other fact of this test run was made with. */
function next(): number {
  made += 1;
  return made;
}

export async function addMaker(given: Partial<Maker>, trx: Knex): Promise<Maker> {
  const place = next();
  const id = await addFact('maker', trx);
  return Maker.query(trx).insertAndFetch({
    id,
    slug: `test-maker-${place}`,
    name: `Test Maker ${place}`,
    buildsMachines: true,
    poursIron: false,
    foundryMark: null,
    place: null,
    founded: null,
    closed: null,
    note: null,
    ...given,
  });
}

/** A month, then two figures of the year, in use 1928 to 1954. */
export const TEST_CIPHER: CipherDefinition = {
  fields: [
    { field: 'month', symbols: 'months', width: 1 },
    { field: 'year', symbols: 'numerals', width: 2 },
  ],
  symbolSets: {
    months: { kind: 'values', symbols: { A: 1, B: 2, C: 3, D: 4, E: 5, F: 6, G: 7, H: 8, J: 9, K: 10, L: 11, M: 12 } },
  },
  usedFrom: '1928-01-01',
  usedTo: '1954-12-31',
};

export async function addCipher({ definition, ...given }: Partial<Cipher> & { readonly definition?: CipherDefinition }, trx: Knex): Promise<Cipher> {
  const place = next();
  const makerId = given.makerId ?? (await addMaker({}, trx)).id;
  const id = uuidv7();
  await Fact.query(trx).insert({ id, kind: 'cipher' });
  const cipher = await Cipher.query(trx).insertAndFetch({
    id,
    slug: `test-cipher-${place}`,
    title: `Test cipher ${place}`,
    foundryId: null,
    machineKind: null,
    note: null,
    ...given,
    makerId,
  });
  await CipherVersion.query(trx).insert({
    cipherId: id,
    number: 1,
    header: { slug: cipher.slug, makerId, foundryId: cipher.foundryId, title: cipher.title, machineKind: cipher.machineKind, note: cipher.note },
    definition: definition ?? TEST_CIPHER,
    citations: [],
    enteredById: await someMember(trx),
    enteredAt: ENTERED_AT,
    reason: 'For a test',
  });
  return cipher;
}

export async function addFact(kind: Exclude<FactKind, 'cipher'>, trx: Knex): Promise<string> {
  const id = uuidv7();
  await Fact.query(trx).insert({ id, kind });
  await FactVersion.query(trx).insert({
    factId: id,
    kind,
    number: 1,
    payload: {},
    citations: [],
    enteredById: await someMember(trx),
    enteredAt: ENTERED_AT,
    reason: 'For a test',
  });
  return id;
}

async function someMember(trx: Knex): Promise<string> {
  const member = await Member.query(trx).orderBy('id').first().throwIfNotFound();
  return member.id;
}
