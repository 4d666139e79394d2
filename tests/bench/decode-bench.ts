import { Bench } from 'tinybench';
import { compileCipher } from '#domain/ciphers/compile.ts';
import { decode, likelihoodOf } from '#domain/ciphers/decode.ts';
import type { CipherDefinition } from '#domain/ciphers/definition.ts';
import { identify } from '#domain/ciphers/identify.ts';
import { dayOf } from '#domain/dates/day.ts';
import { parseReading, type Reading } from '#domain/marks/reading.ts';
import { FEN, HES, TEN } from '#tests/domain/ciphers/worked-ciphers.ts';
import { decodeByDay } from '#tests/support/day-by-day/decode-by-day.ts';
import { generatedCiphers } from './decode-generated-ciphers.ts';
import { regexpAndParse } from './decode-regexp-and-parse.ts';
import { printTable } from './print-table.ts';

const AS_OF = dayOf(2026, 12, 1);
const CIPHERS_TRIED = 2_000;

const MARKS: readonly (readonly [name: string, definition: CipherDefinition, mark: string])[] = [
  ['ten', TEN, 'RLKON'],
  ['ten', TEN, 'BBOCB'],
  ['ten', TEN, '?BLOI'],
  ['ten', TEN, 'BLT*'],
  ['hes', HES, 'C147'],
  ['hes', HES, 'H?18'],
  ['fen', FEN, 'K07'],
];

/** All measurements of the decoder, each as a table. */
export async function benchDecode(): Promise<void> {
  await againstDayByDay();
  await againstRegexpAndParse();
  await unknownMaker();
  await growth();
}

/** The same readings worked out by going through the days. */
async function againstDayByDay(): Promise<void> {
  const rows: string[][] = [];
  for (const [name, definition, mark] of MARKS) {
    const reading = readingOf(mark);
    const cipher = cipherOf(definition);
    const quick = await microseconds(() => decode(reading, cipher, { asOf: AS_OF }));
    const ranking = await microseconds(() => likelihoodOf(reading, cipher, { asOf: AS_OF }));
    const slow = await microseconds(() => decodeByDay(reading, definition, { asOf: AS_OF }), true);
    rows.push([name, mark, shown(quick), shown(ranking), shown(slow), times(slow / quick), times(slow / ranking)]);
  }
  printTable(
    'One reading, one cipher (µs): decode in full, ranking only, day by day',
    ['cipher', 'mark', 'decode', 'ranking', 'day by day', 'decode is', 'ranking is'],
    rows,
  );
}

/** The same readings by regular expressions and a date parser, which give dates only. */
async function againstRegexpAndParse(): Promise<void> {
  const rows: string[][] = [];
  for (const [name, definition, mark] of MARKS) {
    if (name === 'fen' || mark.includes('*')) continue;
    const reading = readingOf(mark);
    const cipher = cipherOf(definition);
    const plain = regexpAndParse(definition);
    const total = decode(reading, cipher, { asOf: AS_OF }).total;
    if (plain(mark).length !== total) throw new Error(`${mark}: the two disagree`);
    const quick = await microseconds(() => decode(reading, cipher, { asOf: AS_OF }));
    const ranking = await microseconds(() => likelihoodOf(reading, cipher, { asOf: AS_OF }));
    const slow = await microseconds(() => plain(mark));
    rows.push([name, mark, String(total), shown(quick), shown(ranking), shown(slow), times(slow / quick), times(slow / ranking)]);
  }
  printTable(
    'Against RegExp and date-fns parse over the same splits (µs)',
    ['cipher', 'mark', 'dates', 'decode', 'ranking', 'RegExp + parse', 'decode is', 'ranking is'],
    rows,
  );
}

async function unknownMaker(): Promise<void> {
  const entries = generatedCiphers(CIPHERS_TRIED);
  const rows: string[][] = [];
  for (const mark of ['RLKON', 'C147', 'K07', 'BB-OC', 'R?KON', 'C1*', '????']) {
    for (const lookAlikes of [false, true]) {
      const reading = readingOf(mark);
      const options = { asOf: AS_OF, lookAlikes, most: 20 };
      const { able } = identify(reading, entries, options);
      const time = await microseconds(() => identify(reading, entries, options));
      rows.push([mark, lookAlikes ? 'yes' : 'no', String(able), shown(time / 1000), shown(time / CIPHERS_TRIED)]);
    }
  }
  printTable(
    `Maker unknown, ${CIPHERS_TRIED} ciphers, the first 20 decoded in full`,
    ['mark', 'look-alikes', 'able', 'ms in all', 'µs a cipher'],
    rows,
  );
}

async function growth(): Promise<void> {
  const other = cipherOf({ ...TEN, fields: [{ field: 'other', symbols: 'key', width: [1, 8] }, ...TEN.fields] });
  await growthTable(
    'How cost grows with glyphs (a field of 1 to 8 glyphs before the date)',
    ['KRLKON', 'KKKRLKON', 'KKKKKRLKON', 'KKKKKKKKRLKON'].map((mark) => [mark, () => decode(readingOf(mark), other, { asOf: AS_OF })]),
  );
  const ten = cipherOf(TEN);
  await growthTable(
    'How cost grows with uncertainty (cipher ten)',
    ['RLKON', 'RLK[OC]N', 'R[LC]K[OC]N', 'RLK?N', 'RL??N', 'RL???', 'R????', '?????', '*'].map((mark) => [
      mark,
      () => decode(readingOf(mark), ten, { asOf: AS_OF }),
    ]),
  );
  const entries = generatedCiphers(2 * CIPHERS_TRIED);
  const reading = readingOf('RLKON');
  await growthTable(
    'How cost grows with the number of ciphers (RLKON, maker unknown)',
    [500, 1000, 2000, 4000].map((count) => {
      const some = entries.slice(0, count);
      return [String(count), () => identify(reading, some, { asOf: AS_OF, most: 20 })];
    }),
  );
}

async function growthTable(title: string, cases: readonly (readonly [what: string, work: () => unknown])[]): Promise<void> {
  const rows: string[][] = [];
  let first: number | null = null;
  for (const [what, work] of cases) {
    const time = await microseconds(work);
    first ??= time;
    rows.push([what, shown(time), times(time / first)]);
  }
  printTable(title, ['', 'µs', 'of the first'], rows);
}

/** The median time of a call. Work that takes a good part of a second is done a few times only. */
async function microseconds(work: () => unknown, isSlow = false): Promise<number> {
  const bench = isSlow ? new Bench({ time: 0, iterations: 3, warmupTime: 0, warmupIterations: 1 }) : new Bench({ time: 150, warmupTime: 50, iterations: 8, warmupIterations: 4 });
  bench.add('work', work);
  const [task] = await bench.run();
  const result = task?.result;
  if (result?.state !== 'completed') throw new Error('the measurement did not complete');
  return result.latency.p50 * 1000;
}

function readingOf(mark: string): Reading {
  const result = parseReading(mark);
  if (!result.ok) throw new Error(result.fault.message);
  return result.value;
}

function cipherOf(definition: CipherDefinition): Parameters<typeof decode>[1] {
  const result = compileCipher(definition);
  if (!result.ok) throw new Error(JSON.stringify(result.fault));
  return result.value;
}

function shown(value: number): string {
  return value.toLocaleString('en', { maximumFractionDigits: value < 100 ? 2 : 0 });
}

function times(ratio: number): string {
  return `${ratio.toLocaleString('en', { maximumFractionDigits: ratio < 10 ? 2 : 0 })}×`;
}
