import type { DaySpan } from '../dates/day.ts';
import type { CompiledCipher } from './compiled-cipher.ts';
import type { Settle, Split } from './decoding.ts';
import { narrowRow, type Row } from './lattice.ts';
import type { SpanTable } from './span-table.ts';
import { workOut } from './work-out.ts';

/** What is left to find out about a reading: its rows and breaks, its cipher and the days in question. */
export type Question = {
  readonly rows: readonly (Row | null)[];
  readonly breaks: readonly number[];
  readonly cipher: CompiledCipher;
  readonly days: DaySpan;
};

/** Parts of a candidate's weight smaller than this are what subtraction leaves of nothing. */
const NOTHING = 1e-12;

/** Places whose glyph is uncertain. */
export function uncertainPositions(rows: readonly (Row | null)[]): readonly number[] {
  return rows.flatMap((row, position) => (row !== null && row.glyphs.length > 1 ? [position] : []));
}

/**
 * For each uncertain glyph, the expected entropy left over the candidates if it were read for certain, the most telling first:
 * the reading is worked out again with each glyph it may be, and the entropies are weighed by how likely that glyph is.
 */
export function whatSettles(question: Question): { readonly settle: readonly Settle[]; readonly steps: number } {
  let steps = 0;
  const settle = uncertainPositions(question.rows).map((position): Settle => {
    const entropy = new Entropy();
    const row = question.rows[position];
    for (const glyph of row?.glyphs ?? []) {
      const rows = question.rows.map((other, index) => (index === position && other !== null ? narrowRow(other, glyph) : other));
      const working = workOut(rows, question.breaks, question.cipher, question.days);
      steps += working.steps;
      if (working.found !== null) entropy.addOutcome(weightsOf(working.found.spans));
    }
    return { position, bits: entropy.bits() };
  });
  return { settle: settle.sort((one, other) => one.bits - other.bits || one.position - other.position), steps };
}

/**
 * For each place where some spellings end a field and others do not, the expected entropy left if it could be seen whether a
 * gap is there, the most telling first.
 */
export function whichGapsSettle(
  question: Question,
  spans: SpanTable,
): { readonly splits: readonly Split[]; readonly steps: number } {
  let steps = 0;
  const splits: Split[] = [];
  for (let after = 1; after < question.rows.length; after += 1) {
    if (question.breaks.includes(after)) continue;
    const breaks = [...question.breaks, after].sort((one, other) => one - other);
    const working = workOut(question.rows, breaks, question.cipher, question.days);
    steps += working.steps;
    if (working.found === null) continue;
    const withGap = working.found.spans;
    const without: number[] = [];
    for (let index = 0; index < spans.size; index += 1) {
      const whole = spans.weight(index);
      const rest = whole - withGap.weightOf(spans.from[index] ?? 0, spans.to[index] ?? 0);
      if (rest > whole * NOTHING) without.push(rest);
    }
    if (withGap.size === 0 || without.length === 0) continue;
    const entropy = new Entropy();
    entropy.addOutcome(weightsOf(withGap));
    entropy.addOutcome(without);
    splits.push({ after, bits: entropy.bits() });
  }
  return { splits: splits.sort((one, other) => one.bits - other.bits || one.after - other.after), steps };
}

function weightsOf(spans: SpanTable): readonly number[] {
  return Array.from({ length: spans.size }, (_, index) => spans.weight(index));
}

/** Entropy over candidates, in bits, expected over the outcomes of a look at the mark. Weights need not sum to 1. */
class Entropy {
  #total = 0;
  #outcomes = 0;
  #parts = 0;

  addOutcome(weights: readonly number[]): void {
    let total = 0;
    for (const weight of weights) {
      total += weight;
      this.#parts += timesLog(weight);
    }
    this.#total += total;
    this.#outcomes += timesLog(total);
  }

  bits(): number {
    return this.#total === 0 ? 0 : Math.max(0, (this.#outcomes - this.#parts) / this.#total);
  }
}

function timesLog(weight: number): number {
  return weight > 0 ? weight * Math.log2(weight) : 0;
}
