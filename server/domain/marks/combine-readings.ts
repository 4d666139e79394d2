import { alignReadings, isRunPlace } from './align-readings.ts';
import type { AlignedPlace, Cell } from './align-readings.ts';
import { NOTATION, writeGlyph, writeReading } from './reading.ts';
import type { Glyph, Reading } from './reading.ts';
import { wilsonLimits } from './wilson.ts';

/** What one reader makes of a mark. */
export type ReadersReading = { readonly reader: string; readonly reading: Reading };

/** `agree` of `readers`, with the 95 % limits on the share. */
export type Agreement = { readonly agree: number; readonly readers: number; readonly low: number; readonly high: number };

type CombinedPlace = Agreement & {
  /** What is taken to stand here, in the mark notation; empty: nothing. */
  readonly settled: string;
  /** Which glyph of the whole it is, counted from 0; `null` where nothing is taken to stand. */
  readonly position: number | null;
  /** What was read here and by whom, most readers first; empty text: nothing. Whose `*` covers the place is not named. */
  readonly said: readonly { readonly text: string; readonly readers: readonly string[] }[];
};

export type CombinedReading = {
  readonly reading: Reading;
  /** The same in the mark notation. */
  readonly text: string;
  /** Who reads every place of it so. */
  readonly whole: Agreement;
  readonly places: readonly CombinedPlace[];
};

/** Votes closer than this are as many: alternatives count shares of one, which are summed with rounding. */
const EQUAL = 1e-9;

/** What is taken to stand where no one reading comes out of all of them. */
const ANYTHING: Glyph = { kind: 'run' };

/**
 * One reading out of those of several readers, glyph by glyph, the same whatever their order.
 *
 * Readings are set beside each other (`alignReadings`), and each place is settled by those who read something there:
 * - at a place where more see nothing than something, nothing is taken to stand; where as many do, `?`;
 * - the glyph most of them name stands, `[OD]` counting half for each; `?` names none, and where nobody names one it is `?`;
 * - glyphs that as many name stand as alternatives;
 * - whoever has a `*` there doesn’t count; a `*` stands where more than half of all readers have it, or half do while nobody reads glyphs
 *   in its stead;
 * - a break stands where more than half see it, for one that is wrong rules dates out and one that is missing does not.
 *
 * Readings so far apart that no glyph comes out, or more than a reading holds, combine to `*`.
 *
 * @throws RangeError for no readings at all.
 */
export function combineReadings(readings: readonly ReadersReading[]): CombinedReading {
  if (readings.length === 0) throw new RangeError('There is nothing to combine');
  const sorted = readings
    .map((one) => ({ ...one, text: writeReading(one.reading) }))
    .sort((one, other) => compare(one.text, other.text) || compare(one.reader, other.reader));
  const readers = sorted.map(({ reader }) => reader);
  const aligned = alignReadings(sorted.map(({ reading }) => reading.glyphs));
  const settled = aligned.map((cells) => settle(cells, aligned));
  const glyphs = settled.flatMap((glyph) => glyph ?? []);
  const comesOut = glyphs.length > 0 && glyphs.length <= NOTATION.glyphs;

  const reading: Reading = comesOut ? { glyphs, breaks: settledBreaks(sorted, aligned, settled) } : { glyphs: [ANYTHING], breaks: [] };
  const places = aligned.map((cells, place) => presentPlace(cells, settled[place] ?? null, readers));
  return {
    reading,
    text: writeReading(reading),
    whole: agreement(sorted.filter((one) => sameGlyphs(one.reading, reading)).length, sorted.length),
    places: comesOut ? numbered(places) : places.map((place) => ({ ...place, position: null })),
  };
}

/** Whether two readings say the same at every glyph; where fields end does not matter. */
export function sameGlyphs(one: Reading, other: Reading): boolean {
  return one.glyphs.length === other.glyphs.length && one.glyphs.every((glyph, place) => wording(glyph) === wording(other.glyphs[place] ?? { kind: 'nothing' }));
}

/** A cell as text, alternatives in one order. */
function wording(cell: Cell): string {
  if (cell.kind === 'nothing' || cell.kind === 'gone') return '';
  return cell.kind === 'oneOf' ? writeGlyph({ kind: 'oneOf', glyphs: cell.glyphs.toSorted(compare) }) : writeGlyph(cell);
}

/** The glyph taken to stand at a place; `null`: none. */
function settle(cells: AlignedPlace, all: readonly AlignedPlace[]): Glyph | null {
  if (isRunPlace(cells)) return settleRun(cells, all) ? ANYTHING : null;
  const seen = cells.flatMap((cell) => (cell.kind === 'nothing' || cell.kind === 'gone' ? [] : [cell]));
  const missed = cells.filter(({ kind }) => kind === 'nothing').length;
  if (seen.length < missed) return null;
  const named = seen.length === missed ? [] : mostNamed(seen);
  const [only, ...others] = named;
  if (only === undefined) return { kind: 'unread' };
  return others.length === 0 ? { kind: 'sure', glyph: only } : { kind: 'oneOf', glyphs: named };
}

function settleRun(cells: AlignedPlace, all: readonly AlignedPlace[]): boolean {
  const having = cells.filter(({ kind }) => kind === 'run').length;
  if (having * 2 !== cells.length) return having * 2 > cells.length;
  const isReadThere = all.some((place) => cells.some(({ kind }, reader) => kind === 'run' && place[reader]?.kind === 'gone'));
  const isAlone = all.filter((place) => isRunPlace(place)).length === 1;
  return isAlone && !isReadThere;
}

/** The glyphs with the most votes, in the order in which they were first named. */
function mostNamed(seen: readonly Glyph[]): readonly string[] {
  const votes = new Map<string, number>();
  for (const glyph of seen) {
    const named = glyph.kind === 'sure' ? [glyph.glyph] : glyph.kind === 'oneOf' ? glyph.glyphs : [];
    for (const one of named) votes.set(one, (votes.get(one) ?? 0) + 1 / named.length);
  }
  const most = Math.max(0, ...votes.values());
  return [...votes].filter(([, count]) => count > most - EQUAL).map(([glyph]) => glyph);
}

function settledBreaks(
  readings: readonly { readonly reading: Reading }[],
  aligned: readonly AlignedPlace[],
  settled: readonly (Glyph | null)[],
): readonly number[] {
  const seen = new Map<number, number>();
  for (const [reader, { reading }] of readings.entries()) {
    const own = aligned.flatMap((cells, place) => (wording(cells[reader] ?? { kind: 'nothing' }) === '' ? [] : [place]));
    const before = new Set(reading.breaks.map((after) => positionAt(own[after] ?? 0, settled)));
    for (const position of before) seen.set(position, (seen.get(position) ?? 0) + 1);
  }
  const last = positionAt(settled.length, settled);
  return [...seen]
    .filter(([position, count]) => count * 2 > readings.length && position > 0 && position < last)
    .map(([position]) => position)
    .sort((one, other) => one - other);
}

/** How many glyphs stand before a place. */
function positionAt(place: number, settled: readonly (Glyph | null)[]): number {
  return settled.slice(0, place).filter((glyph) => glyph !== null).length;
}

function presentPlace(cells: AlignedPlace, settled: Glyph | null, readers: readonly string[]): Omit<CombinedPlace, 'position'> {
  const said = new Map<string, { readonly text: string; readonly readers: string[] }>();
  for (const [index, cell] of cells.entries()) {
    const reader = readers[index];
    if (cell.kind === 'gone' || reader === undefined) continue;
    const key = wording(cell);
    const text = cell.kind === 'nothing' ? '' : writeGlyph(cell);
    const told = said.get(key);
    if (told === undefined) said.set(key, { text, readers: [reader] });
    else told.readers.push(reader);
  }
  const key = settled === null ? '' : wording(settled);
  // Who can't read it or has it broken away takes no side, unless that is what comes out.
  const sides = [...said].filter(([wordingOf]) => wordingOf !== '?' || key === '?').map(([, told]) => told.readers.length);
  const agree = said.get(key)?.readers.length ?? 0;
  return {
    settled: settled === null ? '' : writeGlyph(settled),
    ...agreement(agree, sides.reduce((sum, count) => sum + count, 0)),
    said: [...said.values()]
      .map((told) => ({ text: told.text, readers: told.readers.toSorted(compare) }))
      .sort((one, other) => other.readers.length - one.readers.length || compare(one.text, other.text)),
  };
}

function numbered(places: readonly Omit<CombinedPlace, 'position'>[]): readonly CombinedPlace[] {
  let position = -1;
  return places.map((place) => {
    if (place.settled === '') return { ...place, position: null };
    position += 1;
    return { ...place, position };
  });
}

function agreement(agree: number, readers: number): Agreement {
  return { agree, readers, ...wilsonLimits(agree, readers) };
}

function compare(one: string, other: string): number {
  return one < other ? -1 : one > other ? 1 : 0;
}
