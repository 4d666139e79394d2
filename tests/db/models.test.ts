import { describe, expect, test } from 'vitest';
import { v7 as uuidV7 } from 'uuid';
import { Anchor } from '#db/models/anchor.ts';
import { Casting } from '#db/models/casting.ts';
import { Cipher } from '#db/models/cipher.ts';
import { Fact } from '#db/models/fact.ts';
import { Fitment } from '#db/models/fitment.ts';
import { Position } from '#db/models/position.ts';
import { SerialRange } from '#db/models/serial-range.ts';
import { Series } from '#db/models/series.ts';
import { Source } from '#db/models/source.ts';
import { Supersession } from '#db/models/supersession.ts';
import { useDatabase } from '#tests/support/database.ts';

const database = useDatabase();

describe('a row with what it refers to', () => {
  test('a casting', async () => {
    const casting = await Casting.query(database.knex)
      .findOne({ slug: 'brackwater-b4406' })
      .withGraphFetched('[maker, pouredBy, partType, tells, partNumbers, versions.enteredBy, versionInForce, factSources.source]')
      .throwIfNotFound();
    expect(casting).toMatchObject({
      number: 'B4406',
      numberKey: 'B4406',
      made: { from: '1938-07-01', to: '1944-03-31' },
      maker: { name: 'Brackwater Tractor Works' },
      pouredBy: { name: 'Skerry Foundry', foundryMark: 'S◇' },
      partType: { name: 'Cylinder block' },
      tells: [
        { ordinal: 1, place: 'Rear web' },
        { ordinal: 2, place: 'Foundry mark' },
      ],
      partNumbers: [
        { number: '4406-2', note: null },
        { number: '4409', note: 'less studs' },
      ],
      versionInForce: { number: 4, supersededAt: null },
    });
    expect(casting.versions?.map(({ number, enteredBy }) => [number, enteredBy?.displayName])).toEqual([
      [4, 'Harrow Lane'],
      [3, 'Two Valleys club'],
      [2, 'Ottoline Marsh'],
      [1, 'Harrow Lane'],
    ]);
    expect(casting.factSources?.find((one) => one.field === 'made')?.source?.title).toBe('Works drawing 4406, sheet 2');
  });

  test('a serial range, a dated machine and a series', async () => {
    const range = await SerialRange.query(database.knex)
      .findOne('serial_ranges.slug', 'brackwater-30-crawler-3c-1001-1390-brackwater-parts-book-14')
      .withGraphFetched('[series.[model.maker, works, seriesAccounts.account], account.source, factSources]')
      .throwIfNotFound();
    expect(range).toMatchObject({
      numbers: { from: '1001', to: '1390' },
      built: { from: '1938-08-01', to: '1941-08-31' },
      series: {
        prefix: '3C',
        model: { name: '30 Crawler', maker: { slug: 'brackwater-tractor-works' } },
        works: { name: 'Hill Works' },
      },
      account: { source: { kind: 'book' } },
    });
    expect(range.series?.seriesAccounts?.filter((one) => one.preferred).map((one) => one.account?.slug)).toEqual([
      'brackwater-parts-book-14',
    ]);
    const anchors = await Anchor.query(database.knex)
      .where({ seriesId: range.seriesId })
      .orderBy('number')
      .withGraphFetched('series');
    expect(anchors[0]).toMatchObject({
      number: '1190',
      built: { from: '1941-02-10', to: '1941-02-10' },
      series: { prefix: '3C' },
    });
    expect(await Series.query(database.knex).where({ prefix: '' }).resultSize()).toBe(2);
  });

  test('a fitment, a supersession, a position, a cipher and a source', async () => {
    const [fitment] = await Fitment.query(database.knex)
      .withGraphJoined('[casting, position.[model, partType], series]')
      .where({ 'casting.slug': 'brackwater-b4406', 'series.prefix': '5C' });
    expect(fitment).toMatchObject({
      verdict: 'earlier-fits',
      numbers: { from: '1', to: null },
      position: {
        name: 'Cylinder block',
        lead: { from: 0, to: 365 },
        weight: 5,
        model: { name: '35 Crawler' },
        partType: { slug: 'cylinder-block' },
      },
    });
    const [supersession] = await Supersession.query(database.knex)
      .withGraphJoined('[oldCasting, newCasting]')
      .where('oldCasting.number', 'B4406');
    expect(supersession).toMatchObject({ newCasting: { number: 'B5120' }, interchange: 'both-ways' });
    const checklist = await Position.query(database.knex).where({ modelId: fitment?.modelId }).modify('asChecklist');
    expect(checklist.map((position) => position.ordinal)).toEqual(checklist.map((_, place) => place + 1));
    const cipher = await Cipher.query(database.knex)
      .findOne({ slug: 'brackwater-ten-letter' })
      .withGraphFetched('[maker, foundry, versions.enteredBy, versionInForce, factSources.source]');
    expect(cipher).toMatchObject({
      foundry: null,
      versionInForce: { number: 3, used: { from: '1928-01-01', to: '1954-12-31' }, definition: { usedTo: '1954-12-31' } },
      versions: [{ number: 3 }, { number: 2 }, { number: 1, used: { from: '1931-01-01', to: '1950-12-31' } }],
    });
    const sighting = await Source.query(database.knex)
      .findOne({ slug: 'bench-circle-count' })
      .withGraphFetched('[member, enteredBy]');
    expect(sighting).toMatchObject({ dated: '2024-11-02', member: { displayName: 'Lathe Bench Circle' } });
  });
});

describe('a row written', () => {
  test('ranges go in as they come out, and what the database works out is its own', async () => {
    const other = await Casting.query(database.knex).findOne({ slug: 'brackwater-b4406' }).throwIfNotFound();
    const fact = await Fact.query(database.knex).insert({ id: uuidV7(), kind: 'casting' });
    const made = { from: '1939-01-01', to: null };
    await Casting.query(database.knex).insert({
      id: fact.id,
      makerId: other.makerId,
      pouredById: null,
      partTypeId: other.partTypeId,
      slug: 'brackwater-b-99-x',
      number: 'B-99 X',
      pattern: null,
      made,
      note: null,
    });
    const read = await Casting.query(database.knex).findById(fact.id);
    expect(read).toMatchObject({ made, numberKey: 'B99X' });
    await Casting.query(database.knex).patch({ made: null }).findById(fact.id);
    expect((await Casting.query(database.knex).findById(fact.id))?.made).toBeNull();
  });

  test('fields that were not read are not there', async () => {
    const [casting] = await Casting.query(database.knex).select('slug').limit(1);
    expect(Object.keys(casting ?? {})).toEqual(['slug']);
  });
});
