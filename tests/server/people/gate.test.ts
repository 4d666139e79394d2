import { expect, test } from 'vitest';
import { createGate } from '#server/services/people/gate.ts';

function deferred(): { readonly promise: Promise<void>; readonly resolve: () => void } {
  let resolve = (): void => undefined;
  const promise = new Promise<void>((settle) => {
    resolve = settle;
  });
  return { promise, resolve };
}

test('lets so many in at once, the others in their order, and turns away whoever finds the queue full', async () => {
  const enter = createGate({ atOnce: 2, waiting: 2 });
  const started: number[] = [];
  const ends = Array.from({ length: 5 }, deferred);
  const outcomes = ends.map(({ promise }, place) =>
    enter(async () => {
      started.push(place);
      await promise;
      return place;
    }),
  );
  await expect(outcomes[4]).rejects.toMatchObject({ kind: 'unavailable' });
  expect(started).toEqual([0, 1]);
  ends[1]?.resolve();
  expect(await outcomes[1]).toBe(1);
  await Promise.resolve();
  expect(started).toEqual([0, 1, 2]);
  for (const { resolve } of ends) resolve();
  expect(await Promise.all(outcomes.slice(0, 4))).toEqual([0, 1, 2, 3]);
  expect(await enter(() => Promise.resolve('again'))).toBe('again');
});

test('gives the place of work that failed to the next', async () => {
  const enter = createGate({ atOnce: 1, waiting: 1 });
  const failing = enter(() => Promise.reject(new Error('broken')));
  const next = enter(() => Promise.resolve('next'));
  await expect(failing).rejects.toThrow('broken');
  expect(await next).toBe('next');
});
