import { describe, expect, it } from 'vitest';
import { saySize, saySizes } from '#client/features/part-types/say-measure.ts';

/** A size and its unit stay on one line. */
const spaced = (text: string) => text.replaceAll('\u00a0', ' ');

// An inch is 25.4 mm exactly: international yard and pound agreement of 1959 (from memory).
describe('saySize', () => {
  it.each([
    [101.6, 'mm', '101.6 mm (4.000 in)'],
    [4, 'in', '4 in (101.600 mm)'],
    [0.015, 'in', '0.015 in (0.381 mm)'],
    [-1.5, 'degree', '−1.5°'],
    [40, 'newton-metre', '40 N m'],
    [12.5, 'gram', '12.5 g'],
  ] as const)('%s %s is %s', (value, unit, said) => {
    expect(spaced(saySize(value, unit))).toBe(said);
  });
});

describe('saySizes', () => {
  it('names both ends', () => expect(spaced(saySizes({ from: 2, to: 3 }, 'gram'))).toBe('2 g to 3 g'));
  it('names one where there is one', () => {
    expect(spaced(saySizes({ from: 2, to: null }, 'gram'))).toBe('2 g');
    expect(spaced(saySizes({ from: 2, to: 2 }, 'gram'))).toBe('2 g');
  });
});
