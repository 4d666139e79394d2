import type { Knex } from 'knex';
import { v7 as uuidV7 } from 'uuid';
import { compileCipher } from '#domain/ciphers/compile.ts';
import type { CompiledCipher } from '#domain/ciphers/compiled-cipher.ts';
import { write } from '#domain/ciphers/write.ts';
import { parseDay } from '#domain/dates/day.ts';
import { lookAlikesOf } from '#domain/marks/look-alikes.ts';
import { parseReading, writeReading } from '#domain/marks/reading.ts';
import type { Casting } from '#db/models/casting.ts';
import { CipherVersion } from '#db/models/cipher-version.ts';
import { Fitment } from '#db/models/fitment.ts';
import { Machine } from '#db/models/machine.ts';
import { Mark } from '#db/models/mark.ts';
import { Member } from '#db/models/member.ts';
import { PartFitting } from '#db/models/part-fitting.ts';
import { Part } from '#db/models/part.ts';
import { Reading } from '#db/models/reading.ts';
import { Series } from '#db/models/series.ts';
import { chanceOf } from '#fixtures/demo/chance.ts';
import type { Chance } from '#fixtures/demo/chance.ts';

const ROWS_AT_ONCE = 2_000;
const AS_OF = 20_000;
const MADE_AT = '2026-01-01T12:00:00.000Z';

type Place = { readonly positionId: string; readonly casting: Casting };

/**
 * Puts so many parts on record, each with a casting number and a date in the cipher, eight on every machine of one model: days spread over
 * the castings’ years and the years around them, one reading in six with a glyph that is unread, doubtful or wrong. The same every time.
 */
export async function fillRecord(count: number, { cipherId, modelId }: { readonly cipherId: string; readonly modelId: string }, knex: Knex): Promise<void> {
  const version = await CipherVersion.query(knex).modify('inForce').findOne({ cipherId }).throwIfNotFound();
  const compiled = compileCipher(version.definition);
  if (!compiled.ok) throw new Error('The cipher does not compile');
  const member = await Member.query(knex).orderBy('id').first().throwIfNotFound();
  const series = await Series.query(knex).findOne({ modelId }).orderBy('id').throwIfNotFound();
  const places = await placesOf(modelId, knex);
  const chance = chanceOf('bench record');

  const texts = textsIn(compiled.value, chance);
  for (let start = 0; start < count; start += ROWS_AT_ONCE) {
    const machines: object[] = [];
    const parts: object[] = [];
    const fittings: object[] = [];
    const marks: object[] = [];
    const readings: object[] = [];
    let machineId = '';
    for (let place = start; place < Math.min(count, start + ROWS_AT_ONCE); place += 1) {
      const at = places[place % places.length];
      if (at === undefined) throw new Error('The model has no positions');
      if (place % places.length === 0 || machineId === '') {
        machineId = uuidV7();
        const number = String(1_001 + (place % 3_000));
        machines.push({ id: machineId, ownerId: member.id, modelId, serialAsStamped: `${series.prefix}${number}`, prefix: series.prefix, number, suffix: '', visibility: 'public' });
      }
      const partId = uuidV7();
      const { casting, positionId } = at;
      parts.push({ id: partId, holderId: member.id, partTypeId: casting.partTypeId, makerId: casting.makerId, castingId: casting.id, visibility: 'public' });
      fittings.push({ id: uuidV7(), partId, machineId, positionId, modelId, fitted: { from: '2026-01-01', to: null } });
      for (const [kind, text] of [['casting-number', normal(casting.number)], ['date-code', texts(casting)]] as const) {
        const markId = uuidV7();
        marks.push({ id: markId, partId, kind, technique: 'cast', reading: text, readAt: MADE_AT });
        readings.push({ id: uuidV7(), markId, readerId: member.id, text, asHolder: true, madeAt: MADE_AT });
      }
    }
    await Machine.query(knex).insert(machines);
    await Part.query(knex).insert(parts);
    await PartFitting.query(knex).insert(fittings);
    await Mark.query(knex).insert(marks);
    await Reading.query(knex).insert(readings);
  }
  await knex.raw('analyze');
}

async function placesOf(modelId: string, knex: Knex): Promise<readonly Place[]> {
  const fitments = await Fitment.query(knex).where({ modelId, verdict: 'as-built' }).withGraphFetched('casting').orderBy(['positionId', 'id']);
  const byPosition = new Map(fitments.map(({ positionId, casting }) => [positionId, casting]));
  return [...byPosition].flatMap(([positionId, casting]) => (casting ? [{ positionId, casting }] : [])).slice(0, 8);
}

function textsIn(cipher: CompiledCipher, chance: Chance): (casting: Casting) => string {
  return ({ made }) => {
    const from = dayOf(made?.from ?? '1938-01-01') - 200;
    const to = dayOf(made?.to ?? '1948-12-31') + 200;
    for (;;) {
      const [mark] = write(chance.between(from, to), cipher, { asOf: AS_OF, most: 1 });
      if (mark) return normal(asSeen(mark.text, chance));
    }
  };
}

function asSeen(text: string, chance: Chance): string {
  const glyphs = [...text];
  const place = chance.between(0, glyphs.length - 1);
  const alike = [...lookAlikesOf(glyphs[place] ?? '')];
  const draw = chance.between(1, 100);
  if (draw <= 8) glyphs[place] = '?';
  else if (draw <= 14 && alike.length > 0) glyphs[place] = `[${glyphs[place] ?? ''}${chance.pick(alike)}]`;
  else if (draw <= 17 && alike.length > 0) glyphs[place] = chance.pick(alike);
  return glyphs.join('');
}

function normal(text: string): string {
  const reading = parseReading(text);
  if (!reading.ok) throw new Error(reading.fault.message);
  return writeReading(reading.value);
}

function dayOf(iso: string): number {
  const day = parseDay(iso);
  if (!day.ok) throw new Error(day.fault.message);
  return day.value;
}
