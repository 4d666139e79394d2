import type { Day } from '../dates/day.ts';

/** Small, because most marks mean one day: arrays of this size cost next to nothing to make. */
const FIRST_CAPACITY = 8;
const GROWTH = 4;
const EMPTY = -1;

/**
 * Spans with what has been found for each: likelihoods added up, and the likeliest single spelling. An open-addressing table
 * over typed arrays, because a badly worn mark can mean a hundred thousand days.
 */
export class SpanTable {
  size = 0;
  from = new Int32Array(FIRST_CAPACITY);
  to = new Int32Array(FIRST_CAPACITY);
  likelihood = new Float64Array(FIRST_CAPACITY);
  best = new Float64Array(FIRST_CAPACITY);
  /** Which combination of choices the best spelling belongs to. */
  combination = new Float64Array(FIRST_CAPACITY);
  #slots = new Int32Array(FIRST_CAPACITY * 2).fill(EMPTY);

  /** Adds a spelling's likelihood to a span. Of two equally likely spellings, the first one found stays the best. */
  add(from: Day, to: Day, likelihood: number, best: number, combination: number): void {
    const mask = this.#slots.length - 1;
    let slot = hash(from, to) & mask;
    for (;;) {
      const index = this.#slots[slot] ?? EMPTY;
      if (index === EMPTY) break;
      if (this.from[index] === from && this.to[index] === to) {
        this.likelihood[index] = (this.likelihood[index] ?? 0) + likelihood;
        if (best > (this.best[index] ?? 0)) {
          this.best[index] = best;
          this.combination[index] = combination;
        }
        return;
      }
      slot = (slot + 1) & mask;
    }
    if (this.size === this.from.length) {
      this.#grow();
      this.add(from, to, likelihood, best, combination);
      return;
    }
    this.#slots[slot] = this.size;
    this.from[this.size] = from;
    this.to[this.size] = to;
    this.likelihood[this.size] = likelihood;
    this.best[this.size] = best;
    this.combination[this.size] = combination;
    this.size += 1;
  }

  /** Days of a span times its likelihood: its part of the total. */
  weight(index: number): number {
    return ((this.to[index] ?? 0) - (this.from[index] ?? 0) + 1) * (this.likelihood[index] ?? 0);
  }

  /** The weight of a span; 0 for one that is not there. */
  weightOf(from: Day, to: Day): number {
    const mask = this.#slots.length - 1;
    for (let slot = hash(from, to) & mask; ; slot = (slot + 1) & mask) {
      const index = this.#slots[slot] ?? EMPTY;
      if (index === EMPTY) return 0;
      if (this.from[index] === from && this.to[index] === to) return this.weight(index);
    }
  }

  #grow(): void {
    const capacity = this.from.length * GROWTH;
    this.from = widened(new Int32Array(capacity), this.from);
    this.to = widened(new Int32Array(capacity), this.to);
    this.likelihood = widened(new Float64Array(capacity), this.likelihood);
    this.best = widened(new Float64Array(capacity), this.best);
    this.combination = widened(new Float64Array(capacity), this.combination);
    this.#slots = new Int32Array(capacity * 2).fill(EMPTY);
    const mask = this.#slots.length - 1;
    for (let index = 0; index < this.size; index += 1) {
      let slot = hash(this.from[index] ?? 0, this.to[index] ?? 0) & mask;
      while (this.#slots[slot] !== EMPTY) slot = (slot + 1) & mask;
      this.#slots[slot] = index;
    }
  }
}

/** Spans of one length lie in the order of their days, so that finding them in that order stays near in memory. */
function hash(from: Day, to: Day): number {
  return from + Math.imul(to - from, 0x9e3779b1);
}

function widened<Numbers extends Int32Array | Float64Array>(wide: Numbers, narrow: Numbers): Numbers {
  wide.set(narrow);
  return wide;
}
