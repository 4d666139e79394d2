import type { Knex } from 'knex';
import { v7 as uuidV7 } from 'uuid';
import { z } from 'zod';
import { connect } from '#db/connection.ts';
import { CipherVersion } from '#db/models/cipher-version.ts';
import { Cipher } from '#db/models/cipher.ts';
import { MachineModel } from '#db/models/machine-model.ts';
import { Rework } from '#db/models/rework.ts';
import { createCipherCache } from '#server/services/cipher-cache.ts';
import { cipherEvidence } from '#server/services/kinds/cipher-evidence.ts';
import { runRework } from '#server/services/reworks/run-rework.ts';
import { cloneDatabase, createDemoDatabase, dropDatabases, testRun, urlOf } from '#tests/support/test-databases.ts';
import type { TestRun } from '#tests/support/test-databases.ts';
import { fillRecord } from './fill-record.ts';
import { printTable } from './print-table.ts';

const SIZES = [10_000, 30_000, 100_000];

const Texts = z.tuple([z.object({ count: z.string() })]);

type Measured = { readonly marks: number; readonly texts: number; readonly evidence: number; readonly first: number; readonly again: number; readonly changed: number };

/** Evidence for a cipher over many marks, and working them out: for the first time, and again after a version of it was entered. */
export async function benchRecord(): Promise<void> {
  const run = testRun();
  const template = await createDemoDatabase(run);
  const measured: Measured[] = [];
  try {
    for (const size of SIZES) measured.push(await measure(size, run, template));
  } finally {
    await dropDatabases(run.adminUrl, [template]);
  }
  const [smallest] = measured;
  const table = (title: string, of: (one: Measured) => number): void => {
    printTable(
      title,
      ['marks', 'different', 's', 'marks a second', 'of the first'],
      measured.map((one) => [whole(one.marks), whole(one.texts), of(one).toFixed(2), whole(one.marks / of(one)), smallest ? `${(of(one) / of(smallest)).toFixed(1)}×` : '']),
    );
  };
  table('Evidence for a cipher, random keys included', ({ evidence }) => evidence);
  table('Date marks and fits worked out for the first time', ({ first }) => first);
  table(`The same again after a version was entered (${measured.map(({ changed }) => whole(changed)).join(', ')} came out otherwise)`, ({ again }) => again);
}

async function measure(size: number, run: TestRun, template: string): Promise<Measured> {
  const database = await cloneDatabase(run, template);
  const knex = connect(urlOf(run.adminUrl, database), { statementTimeout: 0 });
  try {
    const cipher = await Cipher.query(knex).findOne({ slug: 'brackwater-ten-letter' }).throwIfNotFound();
    const model = await MachineModel.query(knex).findOne({ slug: 'brackwater-30-crawler' }).throwIfNotFound();
    await knex('reworks').delete();
    await knex('parts').delete();
    await fillRecord(size, { cipherId: cipher.id, modelId: model.id }, knex);
    const texts = Texts.parse(await knex('marks').where({ kind: 'date-code' }).countDistinct({ count: 'reading' }))[0].count;

    const version = await CipherVersion.query(knex).modify('inForce').findOne({ cipherId: cipher.id }).throwIfNotFound();
    const definition = { ...version.definition, usedTo: '1941-06-30' };
    const { makerId, foundryId, title, machineKind, note } = cipher;
    const evidence = await seconds(() => cipherEvidence({ factId: cipher.id, payload: { makerId, foundryId, title, machineKind, note, definition } }, knex));

    const first = await seconds(() => rework(cipher, version.number, knex));
    await knex.transaction(async (trx) => {
      await version.$query(trx).patch({ supersededAt: '2026-12-01T00:00:00Z' });
      await CipherVersion.query(trx).insert({ ...versionAfter(version), definition });
    });
    const again = await seconds(() => rework(cipher, version.number + 1, knex));
    const last = await Rework.query(knex).orderBy('id', 'desc').first().throwIfNotFound();
    return { marks: size, texts: Number(texts), evidence, first, again, changed: last.changed };
  } finally {
    await knex.destroy();
    await dropDatabases(run.adminUrl, [database]);
  }
}

function versionAfter({ cipherId, number, header, citations, enteredById }: CipherVersion): Partial<CipherVersion> {
  return { cipherId, number: number + 1, header, citations, enteredById, enteredAt: '2026-12-01T00:00:00Z', reason: 'For the bench' };
}

async function rework({ id, makerId }: Cipher, version: number, knex: Knex): Promise<void> {
  const { id: reworkId } = await Rework.query(knex).insert({ id: uuidV7(), factId: id, kind: 'cipher', version, makers: [makerId], models: [] });
  const ciphers = createCipherCache({
    onUnusable: () => {
      throw new Error('A cipher does not compile');
    },
  });
  await runRework(reworkId, { knex, ciphers, signal: new AbortController().signal });
}

async function seconds(work: () => Promise<unknown>): Promise<number> {
  const began = performance.now();
  await work();
  return (performance.now() - began) / 1_000;
}

function whole(value: number): string {
  return value.toLocaleString('en', { maximumFractionDigits: 0 });
}
