import { describe, expect, test } from 'vitest';
import type { CipherDefinition } from '#domain/ciphers/definition.ts';
import { createCipherCache } from '#server/services/cipher-cache.ts';

const DEFINITION: CipherDefinition = {
  fields: [{ field: 'year', symbols: 'numerals', width: 4 }],
  symbolSets: {},
  usedFrom: '1900-01-01',
  usedTo: '1950-12-31',
};

const neverUnusable = (): never => {
  throw new Error('The definition was meant to compile');
};

describe('the cipher cache', () => {
  test('keeps what it compiled, version by version', () => {
    const cache = createCipherCache({ onUnusable: neverUnusable });
    const first = cache.add({ cipherId: 'a', version: 1 }, DEFINITION);
    expect(first).not.toBeNull();
    expect(cache.get({ cipherId: 'a', version: 1 })).toBe(first);
    expect(cache.get({ cipherId: 'a', version: 2 })).toBeUndefined();
  });

  test('gives up the least lately used', () => {
    const cache = createCipherCache({ onUnusable: neverUnusable, mostKept: 2 });
    cache.add({ cipherId: 'a', version: 1 }, DEFINITION);
    cache.add({ cipherId: 'b', version: 1 }, DEFINITION);
    cache.get({ cipherId: 'a', version: 1 });
    cache.add({ cipherId: 'c', version: 1 }, DEFINITION);
    expect(['a', 'b', 'c'].filter((cipherId) => cache.get({ cipherId, version: 1 }))).toEqual(['a', 'c']);
  });

  test('tells of a definition that makes no sense, and remembers', () => {
    const unusable: unknown[] = [];
    const cache = createCipherCache({ onUnusable: (key, faults) => unusable.push([key, faults.map(({ path }) => path)]) });
    const key = { cipherId: 'a', version: 1 };
    expect(cache.add(key, { ...DEFINITION, usedTo: '1899-12-31' })).toBeNull();
    expect(cache.get(key)).toBeNull();
    expect(unusable).toEqual([[key, [['usedTo']]]]);
  });
});
