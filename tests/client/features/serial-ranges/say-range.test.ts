import { describe, expect, it } from 'vitest';
import { sayRangeDates } from '#client/features/serial-ranges/say-range.ts';

const dates = { from: '1939-03-03', to: '1939-03-09' };

describe('sayRangeDates', () => {
  it('says days of building without more ado', () => {
    expect(sayRangeDates({ meaning: 'built', dates })).toBe('3–9 Mar 1939');
  });
  it.each([
    ['dispatched', 'dispatched 3–9 Mar 1939'],
    ['sold', 'sold 3–9 Mar 1939'],
    ['model-year', 'of model year 3–9 Mar 1939'],
  ] as const)('never passes %s off as built', (meaning, said) => {
    expect(sayRangeDates({ meaning, dates })).toBe(said);
  });
});
