import { setImmediate as turn } from 'node:timers/promises';

/** Milliseconds. */
const LONGEST_TURN = 15;

/**
 * Does something for each item, as often as needed letting go of the process in between, so that a long calculation keeps no visitor
 * waiting.
 */
export async function inTurns<Item>(items: Iterable<Item>, work: (item: Item) => void): Promise<void> {
  let began = performance.now();
  for (const item of items) {
    work(item);
    if (performance.now() - began < LONGEST_TURN) continue;
    await turn();
    began = performance.now();
  }
}
