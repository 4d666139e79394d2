import { describe, expect, it } from 'vitest';
import { decode } from '#domain/ciphers/decode.ts';
import { identify } from '#domain/ciphers/identify.ts';
import { dayOf } from '#domain/dates/day.ts';
import { compiled, FEN, HES, parsed, TEN } from './worked-ciphers.ts';

const AS_OF = dayOf(2026, 12, 1);
const ENTRIES = [
  { name: 'ten', cipher: compiled(TEN) },
  { name: 'hes', cipher: compiled(HES) },
  { name: 'fen', cipher: compiled(FEN) },
  { name: 'short hes', cipher: compiled({ ...HES, usedFrom: '1937-01-01', usedTo: '1937-12-31' }) },
];

function namesFor(mark: string, options: { lookAlikes?: boolean; most?: number } = {}): string[] {
  return identify(parsed(mark), ENTRIES, { asOf: AS_OF, ...options }).ranked.map(({ entry }) => entry.name);
}

describe('identify', () => {
  it('lists the ciphers that can make the mark, the likeliest on a day first', () => {
    expect(namesFor('C147')).toEqual(['short hes', 'hes']);
    expect(namesFor('RLKON')).toEqual(['ten']);
    expect(namesFor('K07')).toEqual(['fen']);
  });

  it('counts the others', () => {
    expect(identify(parsed('C147'), ENTRIES, { asOf: AS_OF })).toMatchObject({ able: 2, tried: 4 });
    expect(identify(parsed('ZZZ'), ENTRIES, { asOf: AS_OF })).toEqual({ ranked: [], able: 0, tried: 4 });
    expect(identify(parsed('C147'), [], { asOf: AS_OF })).toEqual({ ranked: [], able: 0, tried: 0 });
  });

  it('answers each as decode does', { timeout: 60_000 }, () => {
    for (const mark of ['C147', 'B?OCB', '??1?', 'K*', 'A-?-7']) {
      for (const lookAlikes of [false, true]) {
        const options = { asOf: AS_OF, lookAlikes };
        const { ranked, able } = identify(parsed(mark), ENTRIES, options);
        const alone = ENTRIES.map((entry) => ({ entry, decoding: decode(parsed(mark), entry.cipher, options) }))
          .filter(({ decoding }) => decoding.likelihood > 0)
          .sort((one, other) => other.decoding.likelihood - one.decoding.likelihood);
        expect(ranked).toEqual(alone);
        expect(able).toBe(alone.length);
      }
    }
  });

  it('stops, and says how far it came, where so little is read that the work never ends', { timeout: 60_000 }, () => {
    const wide = compiled({ ...TEN, usedFrom: '1700-01-01', usedTo: '1999-12-31' });
    const many = Array.from({ length: 2_000 }, () => ({ cipher: wide }));
    const { tried, able } = identify(parsed('??????'), many, { asOf: AS_OF, most: 0 });
    expect(tried).toBeGreaterThan(10);
    expect(tried).toBeLessThan(2_000);
    expect(able).toBe(tried);
  });

  it('lists no more than it is asked for, and still counts all that can make it', () => {
    expect(namesFor('C147', { most: 1 })).toEqual(['short hes']);
    expect(identify(parsed('C147'), ENTRIES, { asOf: AS_OF, most: 0 })).toEqual({ ranked: [], able: 2, tried: 4 });
  });
});
