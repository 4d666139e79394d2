import fc from 'fast-check';
import type { Knex } from 'knex';
import { v7 as uuidV7 } from 'uuid';
import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import { MarkOnList } from '#contract/marks.ts';
import { parseReading, writeReading } from '#domain/marks/reading.ts';
import type { Glyph, Reading } from '#domain/marks/reading.ts';
import { Mark } from '#db/models/mark.ts';
import { MarkDecoding } from '#db/models/mark-decoding.ts';
import { canBe } from '#server/services/marks/can-be.ts';
import { whereMaySay } from '#server/services/marks/reading-pattern.ts';
import { useApp } from '#tests/support/app.ts';
import { useDatabase } from '#tests/support/database.ts';
import { addMaker } from '#tests/support/factories/catalogue.ts';
import { addMachine, addMark, addModel, addPart, addPartType, addReading, photograph } from '#tests/support/factories/record.ts';

const database = useDatabase();
const server = useApp(database);

const List = z.object({ items: z.array(MarkOnList), next: z.string().nullable(), total: z.number().optional() });

function read(text: string): Reading {
  const reading = parseReading(text);
  if (!reading.ok) throw new Error(reading.fault.message);
  return reading.value;
}

async function found(query: string): Promise<z.infer<typeof List>> {
  return List.parse((await server.agent.get(`/api/marks?limit=100&${query}`).expect(200)).body);
}

/** Marks of one maker, each on a part of its own, read so. */
async function marksRead(texts: readonly string[], knex: Knex): Promise<{ readonly maker: string; readonly marks: readonly Mark[] }> {
  const { id: makerId, slug } = await addMaker({}, knex);
  const marks: Mark[] = [];
  for (const text of texts) marks.push(await addMark(await addPart({ makerId }, knex), 'casting-number', text, knex));
  return { maker: slug, marks };
}

describe('a search by number', () => {
  test('finds all that may say the same', async () => {
    const alike = ['4406', '44-06', '4?06', '44[08]6', '4*', '*06', '44*06', '?40*'];
    const { maker } = await marksRead([...alike, '4806', '4476', '44066', '440', '9*'], database.knex);
    const wanted: readonly (readonly [number: string, texts: readonly string[]])[] = [
      ['4406', alike],
      ['4?06', [...alike, '4806']],
      ['44[07]6', [...alike, '4476']],
      ['4*6', [...alike, '4806', '4476', '44066']],
      ['B4407', []],
    ];
    for (const [number, texts] of wanted) {
      const { items } = await found(`maker=${maker}&number=${encodeURIComponent(number)}`);
      expect(items.map(({ reading }) => reading).toSorted(), number).toEqual(texts.toSorted());
    }
  });

  test('finds just those marks that share a text with it, tried on all texts', async () => {
    const { knex } = database;
    const letter = fc.constantFrom('A', 'B');
    const anyGlyph: fc.Arbitrary<Glyph> = fc.oneof(
      letter.map((glyph): Glyph => ({ kind: 'sure', glyph })),
      fc.constant<Glyph>({ kind: 'oneOf', glyphs: ['A', 'B'] }),
      fc.constant<Glyph>({ kind: 'oneOf', glyphs: ['B', 'C'] }),
      fc.constant<Glyph>({ kind: 'unread' }),
    );
    const anyReading: fc.Arbitrary<Reading> = fc
      .record({ glyphs: fc.array(anyGlyph, { minLength: 1, maxLength: 3 }), run: fc.option(fc.nat(3)) })
      .map(({ glyphs, run }) => ({ glyphs: run === null ? glyphs : glyphs.toSpliced(run, 0, { kind: 'run' }), breaks: [] }));
    const texts = ['', 'A', 'B', 'C'];
    for (let from = 1; texts.length < (3 ** 7 - 1) / 2; from += 1) for (const glyph of 'ABC') texts.push(`${texts[from] ?? ''}${glyph}`);
    const saying = (reading: Reading): ReadonlySet<string> => new Set(texts.filter((text) => canBe(reading, text)));

    const stored = fc.sample(anyReading, { numRuns: 120, seed: 4406 }).map((reading) => ({ id: uuidV7(), reading, says: saying(reading) }));
    const part = await addPart({}, knex);
    await Mark.query(knex).insert(
      stored.map(({ id, reading }) => ({ id, partId: part.id, machineId: null, kind: 'other' as const, technique: 'cast' as const, reading: writeReading(reading), readAt: '2026-01-01T00:00:00Z' })),
    );
    for (const asked of fc.sample(anyReading, { numRuns: 60, seed: 1938 })) {
      const query = knex('marks').where({ partId: part.id }).select('id');
      whereMaySay(query, asked);
      const ids = z.array(z.object({ id: z.string() })).parse(await query).map(({ id }) => id);
      const says = saying(asked);
      const wanted = stored.filter((one) => [...one.says].some((text) => says.has(text))).map(({ id }) => id);
      expect(ids.toSorted(), writeReading(asked)).toEqual(wanted.toSorted());
    }
  });

  test('has an index for each side', async () => {
    const { knex } = database;
    await knex.raw('set local enable_seqscan = off');
    const query = knex('marks').select('id');
    whereMaySay(query, read('4406*'));
    const { rows } = await knex.raw<{ rows: unknown[] }>('explain ?', [query]);
    const plan = JSON.stringify(rows);
    expect(plan).toContain('marks_reading_key');
    expect(plan).toContain('marks_reading_unsure');
  });

  test.each(['number=%5B', 'number=', 'number=A!', 'from=1939-13-01', 'from=1940-01-01&to=1939-01-01', 'kind=nothing', 'hasPhoto=yes', 'sort=title', 'after=x', 'nothing=1'])('is refused: %s', async (query) => {
    await server.agent.get(`/api/marks?${query}`).expect(422);
  });

  test('of the longest reading there can be is answered', async () => {
    const bracket = '%5BABCDEFGHIJKLMNOPQRSTUVWXYZ0123456789%5D';
    await found(`number=${bracket.repeat(31)}*`);
    await found(`number=*${'%3F'.repeat(31)}`);
  });
});

describe('the record of marks', () => {
  test('is of public parts, and of public machines as far as they show their serials', async () => {
    const { knex } = database;
    const { id: makerId, slug } = await addMaker({}, knex);
    for (const visibility of ['public', 'by-link', 'private'] as const) await addMark(await addPart({ makerId, visibility }, knex), 'other', 'QQ7', knex);
    const { id: modelId } = await addModel({}, knex);
    const hidden = await addMachine({ modelId, serialAsStamped: '77' }, knex);
    const shown = await addMachine({ modelId, serialAsStamped: '78', serialShown: true }, knex);
    const kept = await addMachine({ modelId, serialAsStamped: '79', serialShown: true, visibility: 'private' }, knex);
    for (const machine of [hidden, shown, kept]) {
      for (const kind of ['serial', 'other'] as const) {
        const mark = await Mark.query(knex).insert({ id: uuidV7(), partId: null, machineId: machine.id, kind, technique: 'stamped' });
        await addReading(mark, 'QQ7', machine.ownerId, knex);
      }
    }
    expect((await found(`maker=${slug}`)).items).toHaveLength(1);
    const { items } = await found('number=QQ7');
    expect(items.map(({ kind, part }) => `${kind} on a ${part === null ? 'machine' : 'part'}`).toSorted()).toEqual(['other on a machine', 'other on a machine', 'other on a part', 'serial on a machine']);
  });

  test('is narrowed by kind, maker, photo, wish, words and what marks can mean', async () => {
    const { knex } = database;
    const { id: makerId, slug } = await addMaker({ name: 'Ouzel Ironworks' }, knex);
    const { id: partTypeId } = await addPartType({ name: 'Crank tray' }, knex);
    const part = await addPart({ makerId, partTypeId, called: 'The blue one' }, knex);
    const date = await addMark(part, 'date-code', 'ZD9', knex);
    const number = await addMark(part, 'casting-number', 'ZN9', knex);
    const unread = await Mark.query(knex).insertAndFetch({ id: uuidV7(), partId: part.id, machineId: null, kind: 'other', technique: 'cast' });
    await photograph(number, knex);
    const cipher = await knex('ciphers').orderBy('id').first<{ id: string }>('id');
    await MarkDecoding.query(knex).insert({
      markId: date.id, cipherId: cipher.id, cipherVersion: 1, status: 'several', total: 2,
      candidates: [{ from: '1939-07-25', to: '1939-07-31', share: 0.5 }, { from: '1949-07-25', to: '1949-07-31', share: 0.5 }],
    });
    const ids = async (query: string): Promise<readonly string[]> => (await found(`maker=${slug}&${query}`)).items.map(({ id }) => id).toSorted();
    const all = [date, number, unread].map(({ id }) => id).toSorted();
    expect(await ids('')).toEqual(all);
    expect((await found(`maker=${slug}`)).total).toBe(3);
    expect(await ids('kind=date-code')).toEqual([date.id]);
    expect(await ids('hasPhoto=true')).toEqual([number.id]);
    expect(await ids('hasPhoto=false')).toEqual([date, unread].map(({ id }) => id).toSorted());
    expect(await ids('wantsReading=true')).toEqual([number.id]);
    expect(await ids('wantsReading=false&kind=other')).toEqual([unread.id]);
    for (const [query, isFound] of [['from=1939-07-31', true], ['from=1949-08-01', false], ['to=1939-07-25', true], ['to=1939-07-24', false], ['from=1940-01-01&to=1949-01-01', false], ['from=1939-07-28&to=1939-07-28', true]] as const) {
      expect(await ids(query), query).toEqual(isFound ? [date.id] : []);
    }
    for (const words of ['ouzel', 'crank', 'blue']) expect(await ids(`q=${words}`)).toEqual(all);
    expect(await ids('q=zd9')).toEqual([date.id]);
    expect(await ids('q=%25')).toEqual([]);
    const dated = (await found(`maker=${slug}&kind=date-code`)).items[0];
    expect(dated).toMatchObject({ hidden: false, part: { id: part.id, title: 'Crank tray' }, maker: { slug }, photo: null });
  });

  test.each(['-read', 'read', 'reading'])('goes on where it stopped, ordered by %s, marks nobody has read among them', async (sort) => {
    const { knex } = database;
    const { maker, marks } = await marksRead(['B1', 'A1', '[AB]1', 'C1', '[ABCDEFGHIJKLMNOPQRSTUVWXYZ]'.repeat(12)], knex);
    await knex('readings').whereIn('markId', marks.map(({ id }) => id)).update({ madeAt: '2026-01-01T00:00:00Z' });
    const unread = await Mark.query(knex).insertAndFetch({ id: uuidV7(), partId: marks[0]?.partId ?? null, machineId: null, kind: 'other', technique: 'cast' });
    const seen: string[] = [];
    let after = '';
    for (let pages = 0; pages < 10 && (pages === 0 || after !== ''); pages += 1) {
      const page = List.parse((await server.agent.get(`/api/marks?maker=${maker}&sort=${sort}&limit=2${after === '' ? '' : `&after=${after}`}`).expect(200)).body);
      seen.push(...page.items.map(({ id }) => id));
      after = page.next ?? '';
    }
    expect(seen.toSorted()).toEqual([...marks, unread].map(({ id }) => id).toSorted());
    expect(seen.indexOf(unread.id)).toBe(sort === '-read' ? 5 : 0);
  });
});
