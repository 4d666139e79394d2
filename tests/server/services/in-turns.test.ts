import { expect, test } from 'vitest';
import { inTurns } from '#server/services/in-turns.ts';

function busyFor(milliseconds: number): void {
  const until = performance.now() + milliseconds;
  while (performance.now() < until);
}

test('a long calculation lets others have their turn, and does each item once in order', async () => {
  let turns = 0;
  let isOver = false;
  const other = (): void => {
    turns += 1;
    if (!isOver) setImmediate(other);
  };
  setImmediate(other);
  const done: number[] = [];
  await inTurns([1, 2, 3, 4, 5], (item) => {
    busyFor(20);
    done.push(item);
  });
  isOver = true;
  expect(done).toEqual([1, 2, 3, 4, 5]);
  expect(turns).toBeGreaterThanOrEqual(5);
});

test('what goes wrong with an item ends it', async () => {
  const done: number[] = [];
  await expect(
    inTurns([1, 2, 3], (item) => {
      if (item === 2) throw new Error('no');
      done.push(item);
    }),
  ).rejects.toThrow('no');
  expect(done).toEqual([1]);
});
