import { lookAlikesOf } from './look-alikes.ts';
import type { Glyph } from './reading.ts';

/**
 * What one reader has at a place: a glyph of theirs, `nothing`, or `gone` where it lies within their `*`, of which they can't tell.
 */
export type Cell = Glyph | { readonly kind: 'nothing' } | { readonly kind: 'gone' };

/** A place of the mark, with the cell of every reader in the order in which the readings were given. */
export type AlignedPlace = readonly Cell[];

const NOTHING = { kind: 'nothing' } as const;
const GONE = { kind: 'gone' } as const;

/**
 * What it costs to set two readers’ cells beside each other. Two glyphs that differ are one and the same place sooner than two places, the
 * more so where one passes for the other; what lies within a `*` is hardly surprising.
 */
const COSTS = { differs: 1, looksAlike: 0.6, unread: 0.5, missing: 1, gone: 0.1, run: 0.15 } as const;

/** Costs closer than this are the same: they are summed with rounding. */
const EQUAL = 1e-9;

type Move = 'both' | 'place' | 'glyph';
type Step = { readonly cost: number; readonly move: Move | null };

/**
 * Sets readings of one mark beside each other, place by place: the one that differs least from all others first, then each against those
 * that stand already, by the dynamic programme of S. B. Needleman and C. D. Wunsch, J. Mol. Biol. 48, 1970, with the costs above. A `*` has
 * a place of its own; what others read in its stead lies beside that place, and for its reader is gone. The answer does not depend on the
 * order of readings but for equal ones, whose cells are equal.
 */
export function alignReadings(readings: readonly (readonly Glyph[])[]): readonly AlignedPlace[] {
  const order = closestFirst(readings);
  let places: readonly AlignedPlace[] = [];
  for (const [standing, index] of order.entries()) places = alignOne(places, readings[index] ?? [], standing);
  const placeOf = new Map(order.map((index, place) => [index, place]));
  return places.map((cells) => readings.map((_, index) => cells[placeOf.get(index) ?? -1] ?? NOTHING));
}

/** Indices of the readings: by how much each differs from all others together, then by their texts. */
function closestFirst(readings: readonly (readonly Glyph[])[]): readonly number[] {
  const texts = readings.map((glyphs) => JSON.stringify(glyphs));
  const apart = readings.map((one) => readings.reduce((sum, other) => sum + distance(one, other), 0));
  return readings
    .map((_, index) => index)
    .sort((one, other) => (apart[one] ?? 0) - (apart[other] ?? 0) || compareTexts(texts[one] ?? '', texts[other] ?? ''));
}

function compareTexts(one: string, other: string): number {
  return one < other ? -1 : one > other ? 1 : 0;
}

function distance(one: readonly Glyph[], other: readonly Glyph[]): number {
  // Either way round: the sum would otherwise hang on which of two comes first.
  return tabulate(alignOne([], one, 0), other).total + tabulate(alignOne([], other, 0), one).total;
}

/** Adds a reading to those that stand, `standing` of them. */
function alignOne(places: readonly AlignedPlace[], glyphs: readonly Glyph[], standing: number): readonly AlignedPlace[] {
  const { steps } = tabulate(places, glyphs);
  const added: AlignedPlace[] = [];
  let place = places.length;
  let glyph = glyphs.length;
  while (place > 0 || glyph > 0) {
    const move = steps[place]?.[glyph]?.move;
    const cells = places[place - 1] ?? [];
    const own = glyphs[glyph - 1] ?? NOTHING;
    if (move === 'both') added.push([...cells, own]);
    else if (move === 'place') added.push([...cells, isWithinRun(glyphs, glyph) ? GONE : NOTHING]);
    else added.push([...besideNew(places, place, standing), own]);
    if (move !== 'glyph') place -= 1;
    if (move !== 'place') glyph -= 1;
  }
  return added.reverse();
}

/** The cheapest way to each corner of the table, the same way always where several cost the same. */
function tabulate(places: readonly AlignedPlace[], glyphs: readonly Glyph[]): { readonly steps: readonly (readonly Step[])[]; readonly total: number } {
  const standing = places[0]?.length ?? 0;
  const beside = Array.from({ length: places.length + 1 }, (_, place) => besideNew(places, place, standing));
  const steps: Step[][] = [];
  for (let place = 0; place <= places.length; place += 1) {
    const row: Step[] = [];
    steps.push(row);
    for (let glyph = 0; glyph <= glyphs.length; glyph += 1) {
      const cells = places[place - 1];
      const own = glyphs[glyph - 1];
      const ways: Step[] = place === 0 && glyph === 0 ? [{ cost: 0, move: null }] : [];
      if (cells !== undefined && own !== undefined && isRunPlace(cells) === (own.kind === 'run')) {
        ways.push({ cost: (steps[place - 1]?.[glyph - 1]?.cost ?? 0) + costOf(cells, own), move: 'both' });
      }
      if (cells !== undefined) {
        ways.push({ cost: (steps[place - 1]?.[glyph]?.cost ?? 0) + costOf(cells, isWithinRun(glyphs, glyph) ? GONE : NOTHING), move: 'place' });
      }
      if (own !== undefined) ways.push({ cost: (row[glyph - 1]?.cost ?? 0) + costOf(beside[place] ?? [], own), move: 'glyph' });
      // What was read in the stead of a `*` comes before it, whichever of both stood first.
      if (own?.kind === 'run') ways.reverse();
      row.push(ways.reduce((best, way) => (way.cost < best.cost - EQUAL ? way : best)));
    }
  }
  return { steps, total: steps.at(-1)?.at(-1)?.cost ?? 0 };
}

/** A place some reader’s `*` stands at. */
export function isRunPlace(cells: AlignedPlace): boolean {
  return cells.some(({ kind }) => kind === 'run');
}

/** Whether what comes before `glyphs[glyph]` and after the glyph in front of it lies within the reading’s `*`. */
function isWithinRun(glyphs: readonly Glyph[], glyph: number): boolean {
  return glyphs[glyph - 1]?.kind === 'run' || glyphs[glyph]?.kind === 'run';
}

/** What those that stand have at a new place before `places[place]`. */
function besideNew(places: readonly AlignedPlace[], place: number, standing: number): AlignedPlace {
  return Array.from({ length: standing }, (_, reader) => {
    const own = (cells: AlignedPlace): boolean => isOwn(cells[reader] ?? NOTHING);
    const before = places.slice(0, place).findLast(own)?.[reader];
    const after = places.slice(place).find(own)?.[reader];
    return before?.kind === 'run' || after?.kind === 'run' ? GONE : NOTHING;
  });
}

function isOwn({ kind }: Cell): boolean {
  return kind !== 'nothing' && kind !== 'gone';
}

function costOf(cells: AlignedPlace, own: Cell): number {
  return cells.reduce((sum, cell) => sum + pairCost(cell, own), 0);
}

function pairCost(one: Cell, other: Cell): number {
  if (one.kind === 'run' || other.kind === 'run') return one.kind === other.kind ? 0 : COSTS.run;
  if (!isOwn(one) && !isOwn(other)) return 0;
  if (one.kind === 'gone' || other.kind === 'gone') return COSTS.gone;
  if (one.kind === 'nothing' || other.kind === 'nothing') return COSTS.missing;
  if (one.kind === 'unread' || other.kind === 'unread') return one.kind === other.kind ? 0 : COSTS.unread;
  return glyphCost(glyphsOf(one), glyphsOf(other));
}

/** How unlikely it is that both mean the same glyph, their alternatives equally likely. */
function glyphCost(one: readonly string[], other: readonly string[]): number {
  const shared = one.filter((glyph) => other.includes(glyph)).length;
  if (shared > 0) return COSTS.differs - shared / Math.max(one.length, other.length);
  return one.some((glyph) => other.some((alike) => passFor(glyph, alike))) ? COSTS.looksAlike : COSTS.differs;
}

function passFor(one: string, other: string): boolean {
  return lookAlikesOf(one).includes(other) || lookAlikesOf(other).includes(one);
}

function glyphsOf(glyph: Extract<Glyph, { readonly kind: 'sure' | 'oneOf' }>): readonly string[] {
  return glyph.kind === 'sure' ? [glyph.glyph] : glyph.glyphs;
}
