import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import { faultsOf } from '#contract/faults.ts';

function faultsIn(schema: z.ZodType, value: unknown): unknown {
  const parsed = schema.safeParse(value);
  return parsed.success ? [] : faultsOf(parsed.error).map(({ path, message }) => [path.join('.'), message]);
}

const Shape = z.strictObject({
  name: z.string().max(3, 'Too long'),
  list: z.array(z.strictObject({ count: z.int('Not a whole number') })),
  width: z.union([z.int(), z.tuple([z.int().min(1, 'Too little'), z.int()])]),
  letters: z.record(z.string().max(1, 'One letter'), z.int('Not a whole number')).optional(),
});

describe('faults of a parse', () => {
  test('are one for each wrong value, each with its path', () => {
    expect(faultsIn(Shape, { name: 'long', list: [{ count: 1 }, { count: 0.5 }], width: 1 })).toEqual([
      ['name', 'Too long'],
      ['list.1.count', 'Not a whole number'],
    ]);
  });

  test('say of what is not there that it is missing', () => {
    expect(faultsIn(Shape, { list: [], width: 1 })).toEqual([['name', 'Missing']]);
  });

  test('name each key that is not taken by its own path', () => {
    const value = { name: 'a', list: [{ count: 1, extra: 1 }], width: 1, one: 1, two: 2 };
    expect(faultsIn(Shape, value)).toEqual([
      ['list.0.extra', 'Nothing of this name is taken here'],
      ['one', 'Nothing of this name is taken here'],
      ['two', 'Nothing of this name is taken here'],
    ]);
  });

  test('of several shapes are those of the nearest', () => {
    expect(faultsIn(Shape, { name: 'a', list: [], width: [0, 2] })).toEqual([['width.0', 'Too little']]);
    expect(faultsIn(Shape, { name: 'a', list: [], width: 'wide' })).toEqual([['width', 'Invalid input']]);
  });

  test('name the key of a record', () => {
    expect(faultsIn(Shape, { name: 'a', list: [], width: 1, letters: { ab: 1, c: 0.5 } })).toEqual([
      ['letters.ab', 'One letter'],
      ['letters.c', 'Not a whole number'],
    ]);
  });
});
