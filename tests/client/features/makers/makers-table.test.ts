import { describe, expect, it } from 'vitest';
import { sayHoldings } from '#client/features/makers/makers-table.tsx';

describe('sayHoldings', () => {
  it('counts what there is', () => {
    expect(sayHoldings({ models: 1, castings: 61, ciphers: 0 })).toBe('1 model, 61 castings');
  });
  it('says so where there is nothing', () => {
    expect(sayHoldings({ models: 0, castings: 0, ciphers: 0 })).toBe('nothing yet');
  });
});
