import type supertest from 'supertest';
import { describe, expect, test } from 'vitest';
import { DecodeAnswer } from '#contract/decode.ts';
import type { DecodeResult } from '#contract/decode.ts';
import { LIMITS } from '#contract/limits.ts';
import { Cipher } from '#db/models/cipher.ts';
import { CipherVersion } from '#db/models/cipher-version.ts';
import { Maker } from '#db/models/maker.ts';
import { useApp } from '#tests/support/app.ts';
import { useDatabase } from '#tests/support/database.ts';
import { addCipher, addMaker, TEST_CIPHER } from '#tests/support/factories/catalogue.ts';
import { pathsOf, problemOf } from '#tests/support/problem.ts';

const database = useDatabase();
const app = useApp(database);

function ask(question: object): supertest.Test {
  return app.agent.post('/api/decode').send(question);
}

async function decode(question: object): Promise<DecodeAnswer> {
  const response = await ask(question);
  expect(response.status, response.text).toBe(200);
  return DecodeAnswer.parse(response.body);
}

/** The answer's one result. */
function only({ results }: DecodeAnswer): DecodeResult {
  const [result] = results;
  if (!result || results.length > 1) throw new Error(`One result was expected, not ${results.length}`);
  return result;
}

function datesOf(result: DecodeResult): readonly string[] {
  return result.candidates.map(({ from, to }) => (from === to ? from : `${from}/${to}`));
}

async function cipherId(slug: string): Promise<string> {
  return (await Cipher.query(database.knex).findOne({ slug }).throwIfNotFound()).id;
}

async function makerId(slug: string): Promise<string> {
  return (await Maker.query(database.knex).findOne({ slug }).throwIfNotFound()).id;
}

describe('decoding under a stored cipher', () => {
  // The worked examples of the specification of the decoder.
  test.each([
    ['brackwater-ten-letter', 'RLKON', ['1939-07-25']],
    ['brackwater-ten-letter', 'KPOI', ['1938-05-06']],
    ['brackwater-ten-letter', 'BBOCB', ['1941-01-13', '1941-11-03']],
    ['brackwater-ten-letter', 'B-BO-CB', ['1941-01-13']],
    ['hesper-month-letter', 'C147', ['1927-03-14', '1937-03-14', '1947-03-14', '1957-03-14']],
    ['fensholt-year-letter', 'K07', ['1919-02-10/1919-02-16', '1939-02-13/1939-02-19', '1959-02-09/1959-02-15']],
  ])('%s reads %s', async (slug, mark, dates) => {
    const result = only(await decode({ mark, cipherId: await cipherId(slug) }));
    expect(result.cipher?.slug).toBe(slug);
    expect(datesOf(result)).toEqual(dates);
    expect(result.total).toBe(dates.length);
  });

  test('shows which glyphs gave which field', async () => {
    const [candidate] = only(await decode({ mark: 'B-BO-CB', cipherId: await cipherId('brackwater-ten-letter') })).candidates;
    expect(candidate?.spans).toEqual([
      { field: 'month', start: 0, end: 1, text: 'B', value: 1 },
      { field: 'day', start: 1, end: 3, text: 'BO', value: 13 },
      { field: 'year', start: 3, end: 5, text: 'CB', value: 1941 },
    ]);
  });

  test('answers the reading as it was understood', async () => {
    const { glyphs, breaks } = await decode({ mark: 'b?-[od]*', cipherId: await cipherId('brackwater-ten-letter') });
    expect(glyphs).toEqual([
      { position: 0, kind: 'sure', glyphs: ['B'] },
      { position: 1, kind: 'unread', glyphs: [] },
      { position: 2, kind: 'oneOf', glyphs: ['O', 'D'] },
      { position: 3, kind: 'run', glyphs: [] },
    ]);
    expect(breaks).toEqual([2]);
  });

  test('gives the reasons when the cipher cannot make the mark', async () => {
    const result = only(await decode({ mark: 'TKKOI', cipherId: await cipherId('brackwater-ten-letter') }));
    expect(result).toMatchObject({ status: 'none', total: 0, candidates: [] });
    expect(result.reasons.map(({ code }) => code)).toContain('leading-zero');
  });

  test('keeps to the limits it is given', async () => {
    const limits = { from: '1941-06-01', to: '1949-12-31' };
    const result = only(await decode({ mark: 'BBOCB', cipherId: await cipherId('brackwater-ten-letter'), limits }));
    expect(datesOf(result)).toEqual(['1941-11-03']);
    expect(result.status).toBe('dated');
  });

  test('takes look-alikes into account only when asked', async () => {
    const question = { mark: 'RLKON', cipherId: await cipherId('brackwater-ten-letter') };
    expect(only(await decode(question)).total).toBe(1);
    expect(only(await decode({ ...question, lookAlikes: true })).total).toBeGreaterThan(1);
  });
});

describe('decoding under the ciphers of a maker', () => {
  test('tries each of them and answers for those that cannot make the mark too', async () => {
    const { results, triedCiphers, matchedCiphers } = await decode({ mark: 'BBOCB', makerId: await makerId('brackwater-tractor-works') });
    expect(results).toHaveLength(triedCiphers);
    expect(results[0]?.cipher?.slug).toBe('brackwater-ten-letter');
    expect(results.filter(({ status }) => status !== 'none')).toHaveLength(matchedCiphers);
    expect(results.some(({ status, reasons }) => status === 'none' && reasons.length > 0)).toBe(true);
  });

  test('counts a cipher that a foundry poured under as the foundry’s', async () => {
    const foundry = await addMaker({ poursIron: true }, database.knex);
    const { slug } = await addCipher({ foundryId: foundry.id }, database.knex);
    const answer = await decode({ mark: 'C38', makerId: foundry.id });
    expect(only(answer).cipher?.slug).toBe(slug);
  });

  test('answers an empty list for a maker without ciphers', async () => {
    const { id } = await addMaker({}, database.knex);
    expect(await decode({ mark: 'C38', makerId: id })).toMatchObject({ results: [], triedCiphers: 0, matchedCiphers: 0 });
  });
});

describe('decoding under a definition of one’s own', () => {
  test('needs nothing on record', async () => {
    const answer = await decode({ mark: 'C38', cipher: TEST_CIPHER });
    expect(only(answer)).toMatchObject({ cipher: null, status: 'dated', used: { from: '1928-01-01', to: '1954-12-31' } });
    expect(datesOf(only(answer))).toEqual(['1938-03-01/1938-03-31']);
    expect(only(answer).candidates[0]?.precision).toBe('month');
  });

  test('takes a cipher still in use up to today, or up to the day that is asked about', async () => {
    const cipher = { ...TEST_CIPHER, usedTo: null };
    expect(datesOf(only(await decode({ mark: 'A26', cipher })))).toEqual(['2026-01-01/2026-01-31']);
    expect(only(await decode({ mark: 'A26', cipher, asOf: '2025-12-31' })).status).toBe('none');
    expect(only(await decode({ mark: 'A26', cipher })).used.to).toBeNull();
  });
});

describe('decoding with the cipher unknown', () => {
  test('tries all and lists those that can make the mark, the likeliest first', async () => {
    const { results, triedCiphers, matchedCiphers } = await decode({ mark: 'K07' });
    expect(triedCiphers).toBe(await CipherVersion.query(database.knex).modify('inForce').resultSize());
    expect(results).toHaveLength(matchedCiphers);
    expect(results.every(({ status }) => status !== 'none')).toBe(true);
    const likelihoods = results.map(({ likelihood }) => likelihood);
    expect(likelihoods).toEqual(likelihoods.toSorted((one, other) => other - one));
  });

  test('lists no more than fifty and counts the rest', async () => {
    const maker = await addMaker({}, database.knex);
    for (let count = 0; count < LIMITS.results + 3; count += 1) await addCipher({ makerId: maker.id }, database.knex);
    const { results, matchedCiphers } = await decode({ mark: 'M54' });
    expect(results).toHaveLength(LIMITS.results);
    expect(matchedCiphers).toBeGreaterThanOrEqual(LIMITS.results + 3);
  });

  test('answers an empty list when none can make it', async () => {
    const { results, triedCiphers, matchedCiphers } = await decode({ mark: 'ZZZZZZZZZZZZ' });
    expect(triedCiphers).toBeGreaterThan(0);
    expect({ results, matchedCiphers }).toEqual({ results: [], matchedCiphers: 0 });
  });

  test('leaves out a stored cipher that does not compile, and writes that down', async () => {
    const broken = await addCipher({ definition: { ...TEST_CIPHER, symbolSets: {} } }, database.knex);
    const good = await addCipher({}, database.knex);
    const { results } = await decode({ mark: 'M54' });
    expect(results.map(({ cipher }) => cipher?.slug)).toContain(good.slug);
    expect(app.log.takeErrors().map((line) => line['cipherId'])).toEqual([broken.id]);
  });
});

describe('a question that cannot be answered', () => {
  test.each([
    ['nothing', {}, ['mark']],
    ['an empty mark', { mark: '' }, ['mark']],
    ['a mark that is no text', { mark: 1941 }, ['mark']],
    ['a glyph there is none of', { mark: 'B+B' }, ['mark']],
    ['two stars', { mark: 'B*B*' }, ['mark']],
    ['a mark of 33 glyphs', { mark: 'B'.repeat(33) }, ['mark']],
    ['a mark of 100 kB', { mark: 'B'.repeat(100_000) }, ['mark']],
    ['a month 13', { mark: 'B', asOf: '1941-13-01' }, ['asOf']],
    ['a 30 February', { mark: 'B', limits: { from: '1926-02-30' } }, ['limits.from']],
    ['limits that end before they begin', { mark: 'B', limits: { from: '1941-01-02', to: '1941-01-01' } }, ['limits.to']],
    ['a cipher id that is none', { mark: 'B', cipherId: '7' }, ['cipherId']],
    ['a key nobody knows', { mark: 'B', colour: 'red' }, ['colour']],
    ['several faults', { mark: '+', lookAlikes: 'yes', limits: { until: '1941-01-01' } }, ['mark', 'limits.until', 'lookAlikes']],
  ])('%s', async (_name, question, paths) => {
    expect(pathsOf(await problemOf(ask(question), 422)).toSorted()).toEqual(paths.toSorted());
  });

  test('names the character and its place', async () => {
    const { errors } = await problemOf(ask({ mark: 'BL+T' }), 422);
    expect(errors?.[0]?.message).toContain('+');
  });

  test('holds two of cipher, cipherId and makerId', async () => {
    const question = { mark: 'B', cipherId: await cipherId('brackwater-ten-letter'), makerId: await makerId('skerry-foundry') };
    const { errors } = await problemOf(ask(question), 422);
    expect(errors).toEqual([{ path: ['cipher'], message: 'Give a cipher, a cipherId or a makerId, not several' }]);
  });

  test.each(['cipherId', 'makerId'])('names a %s that is not on record', async (key) => {
    const problem = await problemOf(ask({ mark: 'B', [key]: '01890000-0000-7000-8000-000000000000' }), 422);
    expect(pathsOf(problem)).toEqual([key]);
  });

  test('holds a cipher of 10,000 fields', async () => {
    const fields = Array.from({ length: 10_000 }, () => ({ field: 'year', symbols: 'numerals', width: 2 }));
    expect(JSON.stringify(fields).length).toBeGreaterThan(LIMITS.jsonBody);
    await problemOf(ask({ mark: 'B', cipher: { ...TEST_CIPHER, fields } }), 413);
    const short = Array.from({ length: 10_000 }, () => ({ a: 1 }));
    expect(pathsOf(await problemOf(ask({ mark: 'B', cipher: { ...TEST_CIPHER, fields: short } }), 422))).toEqual(['cipher.fields']);
  });

  test('has more faults than anybody mends at one go', async () => {
    const unknown = Object.fromEntries(Array.from({ length: 150 }, (_, place) => [`key${place}`, place]));
    const { errors, detail } = await problemOf(ask({ mark: 'B', ...unknown }), 422);
    expect(errors).toHaveLength(100);
    expect(detail).toContain('50 more');
  });

  test('holds a cipher with more fields than a cipher has', async () => {
    const fields = Array.from({ length: 13 }, () => ({ field: 'literal', text: 'X' }));
    expect(pathsOf(await problemOf(ask({ mark: 'B', cipher: { ...TEST_CIPHER, fields } }), 422))).toContain('cipher.fields');
  });

  test('holds a cipher whose meaning is wrong, with the path of each fault', async () => {
    const cipher = {
      ...TEST_CIPHER,
      fields: [
        { field: 'month', symbols: 'moons', width: 1 },
        { field: 'year', symbols: 'numerals', width: [3, 2] },
      ],
      usedTo: '1927-12-31',
    };
    expect(pathsOf(await problemOf(ask({ mark: 'B', cipher }), 422)).toSorted()).toEqual([
      'cipher.fields.0.symbols',
      'cipher.fields.1.width',
      'cipher.usedTo',
    ]);
  });
});
