// @vitest-environment node
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { keysOf, recordOf, rowsOf } from '#client/features/workbench/symbol-rows.ts';
import { compileCipher } from '#domain/ciphers/compile.ts';
import { TEN } from './samples.ts';

const symbols = fc.constantFrom('A', 'B', '7', 'JAN', '', 'É');

describe('rows of symbols', () => {
  it('are kept under their symbols', () => {
    expect(recordOf([{ symbol: 'a', value: 1 }, { symbol: 'B', value: 2 }])).toEqual({ A: 1, B: 2 });
  });
  it('keep every row, however often its symbol stands there', () => {
    fc.assert(
      fc.property(fc.array(fc.record({ symbol: symbols, value: fc.integer() }), { maxLength: 12 }), (rows) => {
        expect(new Set(keysOf(rows)).size).toBe(rows.length);
        const byValue = (one: { value: number; symbol: string }, other: { value: number; symbol: string }) => one.value - other.value || one.symbol.localeCompare(other.symbol);
        expect(rowsOf(recordOf(rows)).toSorted(byValue)).toEqual(rows.toSorted(byValue));
      }),
    );
  });
  it.each(['B', '7'])('that hold “%s” two, three and four times are refused for it by the register, and one alone is not', (symbol) => {
    for (const times of [1, 2, 3, 4]) {
      const kept = recordOf(Array.from({ length: times }, (_, place) => ({ symbol, value: String(place + 1) })));
      const compiled = compileCipher({ ...TEN, symbolSets: { key: { kind: 'digits', symbols: kept } } });
      const refused = compiled.ok ? [] : compiled.fault.filter(({ code }) => code === 'same-symbol-twice' || code === 'not-a-symbol');
      expect(refused.map(({ path }) => path.at(-1))).toEqual(Object.keys(kept).slice(1));
    }
  });
});
