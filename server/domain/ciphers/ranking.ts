import type { SpanTable } from './span-table.ts';

/** Weights that differ by less than one part in this many are the same weight added up in another order. */
const PARTS_TOLD_APART = 2 ** 32;

/**
 * Indexes of the spans that come first by weight, then by first day, then by last. A heap of the first so many, because there
 * can be far more spans than are listed.
 */
export function firstByWeight(spans: SpanTable, most: number): readonly number[] {
  const ranks = new Float64Array(spans.size);
  for (let index = 0; index < spans.size; index += 1) ranks[index] = Math.round(Math.log2(spans.weight(index)) * PARTS_TOLD_APART);
  const comesBefore = (one: number, other: number): number =>
    (ranks[other] ?? 0) - (ranks[one] ?? 0) ||
    (spans.from[one] ?? 0) - (spans.from[other] ?? 0) ||
    (spans.to[one] ?? 0) - (spans.to[other] ?? 0);

  const heap: number[] = [];
  for (let index = 0; index < spans.size; index += 1) {
    if (heap.length < most) {
      heap.push(index);
      siftUp(heap, comesBefore);
    } else if (comesBefore(index, heap[0] ?? 0) < 0) {
      heap[0] = index;
      siftDown(heap, comesBefore);
    }
  }
  return heap.sort(comesBefore);
}

/** The root of the heap is the one that comes last. */
function siftUp(heap: number[], comesBefore: (one: number, other: number) => number): void {
  let at = heap.length - 1;
  while (at > 0) {
    const parent = (at - 1) >> 1;
    if (comesBefore(heap[at] ?? 0, heap[parent] ?? 0) <= 0) return;
    swap(heap, at, parent);
    at = parent;
  }
}

function siftDown(heap: number[], comesBefore: (one: number, other: number) => number): void {
  let at = 0;
  for (;;) {
    let last = at;
    for (const child of [2 * at + 1, 2 * at + 2]) {
      if (child < heap.length && comesBefore(heap[child] ?? 0, heap[last] ?? 0) > 0) last = child;
    }
    if (last === at) return;
    swap(heap, at, last);
    at = last;
  }
}

function swap(heap: number[], one: number, other: number): void {
  const kept = heap[one] ?? 0;
  heap[one] = heap[other] ?? 0;
  heap[other] = kept;
}
