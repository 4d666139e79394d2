import { describe, expect, it } from 'vitest';
import { saySize, saySizes } from '#client/features/part-types/say-measure.ts';

// An inch is 25.4 mm exactly: international yard and pound agreement of 1959 (from memory).
describe('saySize', () => {
  it.each([
    [101.6, 'mm', '101.6 mm (4.000 in)'],
    [4, 'in', '4 in (101.60 mm)'],
    [0.015, 'in', '0.015 in (0.38 mm)'],
    [-1.5, 'degree', '−1.5°'],
    [40, 'newton-metre', '40 N m'],
    [12.5, 'gram', '12.5 g'],
  ] as const)('%s %s is %s', (value, unit, said) => {
    expect(saySize(value, unit)).toBe(said);
  });
});

describe('saySizes', () => {
  it('names both ends', () => expect(saySizes({ from: 2, to: 3 }, 'gram')).toBe('2 g to 3 g'));
  it('names one where there is one', () => {
    expect(saySizes({ from: 2, to: null }, 'gram')).toBe('2 g');
    expect(saySizes({ from: 2, to: 2 }, 'gram')).toBe('2 g');
  });
});
