import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import { CastingPage } from '#contract/castings.ts';
import { CipherPage } from '#contract/ciphers.ts';
import { History } from '#contract/common.ts';
import { MakerPage } from '#contract/makers.ts';
import { ModelPage } from '#contract/models.ts';
import { PartTypePage } from '#contract/part-types.ts';
import { SerialRangePage } from '#contract/serial-ranges.ts';
import { SourcePage } from '#contract/sources.ts';
import { useApp } from '#tests/support/app.ts';
import { useDatabase } from '#tests/support/database.ts';
import { pathsOf, problemOf } from '#tests/support/problem.ts';

const app = useApp(useDatabase());

const List = z.strictObject({ items: z.array(z.looseObject({ id: z.string(), slug: z.string() })), next: z.string().nullable(), total: z.number().optional() });

async function list(path: string, query: Record<string, string> = {}): Promise<z.infer<typeof List>> {
  const response = await app.agent.get(`/api/${path}`).query(query);
  expect(response.status, response.text).toBe(200);
  return List.parse(response.body);
}

async function page<Page extends z.ZodType>(shape: Page, path: string): Promise<z.output<Page>> {
  const response = await app.agent.get(`/api/${path}`);
  expect(response.status, response.text).toBe(200);
  return shape.parse(response.body);
}

const NOUNS = [
  ['makers', MakerPage],
  ['models', ModelPage],
  ['part-types', PartTypePage],
  ['castings', CastingPage],
  ['ciphers', CipherPage],
  ['serial-ranges', SerialRangePage],
  ['sources', SourcePage],
] as const;

describe.each(NOUNS)('%s', (noun, shape) => {
  test('are listed, and each has a page and a history', async () => {
    const { items, total } = await list(noun, { limit: '3' });
    expect(items.length).toBeGreaterThan(0);
    expect(total).toBeGreaterThanOrEqual(items.length);
    for (const { slug, id } of items) {
      expect(await page(shape, `${noun}/${slug}`)).toMatchObject({ slug, id });
      const history = await page(History, `${noun}/${slug}/history`);
      const versions = history.items.map(({ version }) => version);
      expect(versions).toEqual(versions.toSorted((one, other) => other - one));
      expect(versions.at(-1)).toBe(1);
      expect(history.items.filter(({ inForce }) => inForce).map(({ version }) => version)).toEqual([versions[0]]);
    }
  });

  test('that nobody entered are missing', async () => {
    await problemOf(app.agent.get(`/api/${noun}/no-such-thing`), 404);
    await problemOf(app.agent.get(`/api/${noun}/no-such-thing/history`), 404);
  });

  test('are not asked for by what is no slug', async () => {
    expect(pathsOf(await problemOf(app.agent.get(`/api/${noun}/No%20Slug`), 422))).toEqual(['slug']);
  });

  test('are walked page by page without repeats or gaps, forwards and backwards', async () => {
    const sorts = noun === 'serial-ranges' ? ['series', 'dates', '-dates'] : noun === 'castings' ? ['number', '-number', 'made', '-made'] : [undefined];
    for (const sort of sorts) {
      const asked = { ...(sort ? { sort } : {}), limit: '100' };
      const whole: string[] = [];
      let next: string | null = null;
      do {
        const part: z.infer<typeof List> = await list(noun, { ...asked, ...(next ? { after: next } : {}) });
        whole.push(...part.items.map(({ id }) => id));
        next = part.next;
      } while (next);
      expect(new Set(whole).size).toBe(whole.length);

      const few = Math.max(1, Math.floor(whole.length / 3));
      const walked: string[] = [];
      do {
        const part: z.infer<typeof List> = await list(noun, { ...asked, limit: String(few), ...(next ? { after: next } : {}) });
        walked.push(...part.items.map(({ id }) => id));
        next = part.next;
      } while (next);
      expect(walked).toEqual(whole);
    }
  });

  test.each([
    ['an order there is none of', { sort: 'x;drop' }, 'sort'],
    ['no items', { limit: '0' }, 'limit'],
    ['more items than a page holds', { limit: '101' }, 'limit'],
    ['a cursor nobody made', { after: 'bm9uZQ' }, 'after'],
    ['a cursor that is not base64', { after: '%%%' }, 'after'],
    ['a key nobody knows', { colour: 'red' }, 'colour'],
    ['a search of no end', { q: 'a'.repeat(121) }, 'q'],
  ] as const)('refuse %s', async (_name, query, path) => {
    expect(pathsOf(await problemOf(app.agent.get(`/api/${noun}`).query(query), 422))).toEqual([path]);
  });

  test('take a percent sign in a search for itself', async () => {
    expect((await list(noun, { q: '%' })).items).toEqual([]);
    expect((await list(noun, { q: '_' })).items).toEqual([]);
    expect((await list(noun, { q: '\\' })).items).toEqual([]);
  });
});

describe('a cursor', () => {
  const forged = (...parts: unknown[]): string => Buffer.from(JSON.stringify(parts)).toString('base64url');
  const id = '01890000-0000-7000-8000-000000000000';

  test.each([
    ['of another order', forged('-name', 'Brackwater', id)],
    ['with too few values', forged('name', id)],
    ['with a value of another kind', forged('name', 7, id)],
    ['with a NUL', forged('name', 'a\0', id)],
    ['with an id that is none', forged('name', 'a', '7')],
    ['that is no list', Buffer.from('{}').toString('base64url')],
  ])('%s is refused', async (_name, after) => {
    expect(pathsOf(await problemOf(app.agent.get('/api/makers').query({ after }), 422))).toEqual(['after']);
  });

  test('made by hand of the right kind only moves the page', async () => {
    const { items } = await list('makers', { after: forged('name', 'Fz', id) });
    expect(items.map(({ slug }) => slug)).toEqual(['hesper-lathe-company', 'skerry-foundry']);
  });
});

describe('what the pages say', () => {
  test('a maker: its works, models and ciphers, and whom it poured for', async () => {
    const brackwater = await page(MakerPage, 'makers/brackwater-tractor-works');
    expect(brackwater).toMatchObject({ name: 'Brackwater Tractor Works', active: { from: '1919-01-01', to: '1957-12-31' } });
    expect(brackwater.modelList.map(({ slug }) => slug)).toContain('brackwater-30-crawler');
    expect(brackwater.models).toBe(brackwater.modelList.length);
    expect(brackwater.ciphers).toBe(brackwater.cipherList.length);
    expect(brackwater.works[0]?.provenance.sources.length).toBeGreaterThan(0);
    const skerry = await page(MakerPage, 'makers/skerry-foundry');
    expect([skerry.buildsMachines, skerry.poursIron, skerry.foundryMark]).toEqual([true, true, 'S◇']);
    expect(skerry.pouredFor.map(({ slug }) => slug)).toContain('brackwater-tractor-works');
    expect(skerry.pouredFor.map(({ slug }) => slug)).not.toContain('skerry-foundry');
  });

  test('a model: its checklist with leads and cautions, its series with ranges and dated machines', async () => {
    const model = await page(ModelPage, 'models/brackwater-30-crawler');
    const block = model.positions.find(({ slug }) => slug === 'cylinder-block');
    expect(block).toMatchObject({ weight: 5, lead: { least: 0, most: 365 } });
    expect(block?.caution).toMatch(/lift/i);
    expect(block?.castings.map(({ number }) => number)).toEqual(['B4406', 'B5120']);
    expect(block?.provenance.sources.map(({ field }) => field)).toContain('lead');
    const [series] = model.series;
    expect(series).toMatchObject({ prefix: '3C' });
    const first = series?.ranges.find(({ preferred }) => preferred);
    expect(first).toMatchObject({ first: '1001', last: '1390', dates: { from: '1938-08-01', to: '1941-08-31' } });
    expect(series?.ranges.some(({ preferred }) => !preferred)).toBe(true);
    expect(series?.anchors.map(({ number }) => number)).toContain('1190');
  });

  test('a casting: how to tell it, where it belongs and when those machines were built', async () => {
    const casting = await page(CastingPage, 'castings/brackwater-b4406');
    expect(casting).toMatchObject({ number: 'B4406', made: { from: '1938-07-01', to: '1944-03-31' }, pouredBy: { slug: 'skerry-foundry' } });
    expect(casting.tells.length).toBeGreaterThan(0);
    expect(casting.partNumbers.length).toBeGreaterThan(0);
    expect(casting.ciphers.map(({ slug }) => slug)).toContain('brackwater-ten-letter');
    const asBuilt = casting.fitments.find(({ verdict, model }) => verdict === 'as-built' && model.slug === 'brackwater-30-crawler');
    expect(asBuilt).toMatchObject({ position: { slug: 'cylinder-block' }, prefix: '3C' });
    expect(asBuilt?.built?.from).toMatch(/^19\d\d-\d\d-\d\d$/);
    expect(casting.followedBy.map((one) => one.casting.number)).toContain('B5120');
    const later = await page(CastingPage, 'castings/brackwater-b5120');
    expect(later.follows.map((one) => one.casting.number)).toContain('B4406');
  });

  test('a cipher: its definition in force, and in its history each one before it', async () => {
    const cipher = await page(CipherPage, 'ciphers/brackwater-ten-letter');
    expect(cipher.used).toEqual({ from: '1928-01-01', to: '1954-12-31' });
    expect(cipher.definition.symbolSets).toHaveProperty('key');
    const history = await page(History, 'ciphers/brackwater-ten-letter/history');
    expect(history.items).toHaveLength(cipher.version);
    expect(history.items[0]?.payload).toEqual(cipher.definition);
  });

  test('a serial range: its days as they are written, in this zone as in any', async () => {
    const { items } = await list('serial-ranges', { model: 'brackwater-30-crawler' });
    const first = items.find(({ preferred }) => preferred);
    expect(first).toMatchObject({ first: '1001', dates: { from: '1938-08-01', to: '1941-08-31' } });
    const range = await page(SerialRangePage, `serial-ranges/${String(first?.slug)}`);
    expect(range).toMatchObject({ maker: { slug: 'brackwater-tractor-works' }, dates: { from: '1938-08-01', to: '1941-08-31' } });
  });

  test('a source: its own fields and all it stands behind', async () => {
    const source = await page(SourcePage, 'sources/brackwater-parts-book-14');
    expect(source.details).toContainEqual({ name: 'Publisher', value: 'Brackwater Tractor Works' });
    expect(source.behind).toHaveLength(source.facts);
    expect(source.behind).toContainEqual(expect.objectContaining({ kind: 'casting', slug: 'brackwater-b4406' }));
    expect(source.behind.every(({ title }) => !/undefined|null/.test(title))).toBe(true);
    const [entry, ...more] = (await page(History, 'sources/brackwater-parts-book-14/history')).items;
    expect(more).toEqual([]);
    expect(entry).toMatchObject({ version: 1, inForce: true, payload: { title: source.title } });
  });
});

describe('lists are narrowed', () => {
  test.each([
    ['models', { maker: 'hesper-lathe-company' }, 'maker'],
    ['ciphers', { maker: 'hesper-lathe-company' }, 'maker'],
    ['castings', { maker: 'hesper-lathe-company' }, 'maker'],
    ['castings', { partType: 'cylinder-block' }, 'partType'],
    ['serial-ranges', { model: 'brackwater-30-crawler' }, 'model'],
  ] as const)('%s by %j', async (noun, query, key) => {
    const { items } = await list(noun, { ...query, limit: '100' });
    expect(items.length).toBeGreaterThan(0);
    const [wanted] = Object.values(query);
    expect(items.map((item) => z.object({ slug: z.string() }).parse(item[key]).slug)).toEqual(items.map(() => wanted));
  });

  test('serial ranges by maker, castings by model, sources by kind', async () => {
    const ranges = (await list('serial-ranges', { maker: 'hesper-lathe-company', limit: '100' })).items;
    expect(ranges.length).toBeGreaterThan(0);
    expect(ranges.every(({ slug }) => slug.startsWith('hesper-'))).toBe(true);
    const castings = (await list('castings', { model: 'brackwater-30-crawler', limit: '100' })).items;
    expect(castings.map(({ slug }) => slug)).toContain('brackwater-b4406');
    const sources = (await list('sources', { kind: 'drawing' })).items;
    expect(new Set(sources.map(({ kind }) => kind))).toEqual(new Set(['drawing']));
  });

  test('to nothing by the name of what nobody entered', async () => {
    expect((await list('models', { maker: 'no-such-maker' })).items).toEqual([]);
  });

  test('by a word in any case', async () => {
    expect((await list('makers', { q: 'sKERRY' })).items.map(({ slug }) => slug)).toContain('skerry-foundry');
  });
});

describe('castings by number', () => {
  const numbers = async (number: string): Promise<unknown[]> =>
    (await list('castings', { number, limit: '100' })).items.map((item) => item['number']);

  test.each([
    ['B4406', ['B4406']],
    ['b4-406', ['B4406']],
    ['B44?6', ['B4406']],
    ['[BR]4406', ['B4406']],
    ['*406', ['B4406']],
    ['ZZZ9', []],
  ])('%s finds %j', async (number, found) => {
    expect(await numbers(number)).toEqual(found);
  });

  test('with glyphs missing finds all it can be, and nothing else', async () => {
    const found = await numbers('B4?0*');
    expect(found.length).toBeGreaterThan(1);
    expect(found.every((number) => /^B4.0/.test(String(number).replaceAll(/[^A-Z0-9]/g, '')))).toBe(true);
  });

  test.each(['B4(', '^(a+)+$', 'B*4*', 'B'.repeat(33), '100 000 %'])('%s is no reading of a number', async (number) => {
    expect(pathsOf(await problemOf(app.agent.get('/api/castings').query({ number }), 422))).toEqual(['number']);
  });
});
