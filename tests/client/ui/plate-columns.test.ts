// @vitest-environment node
import { describe, expect, it } from 'vitest';
import { GAP_PART, plateColumns } from '#client/ui/plate-columns.ts';

describe('plateColumns', () => {
  it('has one column a glyph where there is no gap', () => {
    const columns = plateColumns(3, []);
    expect(columns.template).toBe('var(--tile) var(--tile) var(--tile)');
    expect(columns.units).toBe(3);
    expect([0, 1, 2].map(columns.lineBefore)).toEqual([1, 2, 3]);
    expect(columns.lineAfter(2)).toBe(4);
  });
  it('moves the glyphs after a gap one column on', () => {
    const columns = plateColumns(5, [1, 3]);
    expect([0, 1, 2, 3, 4].map(columns.lineBefore)).toEqual([1, 3, 4, 6, 7]);
    expect(columns.lineAfter(0)).toBe(2);
    expect(columns.units).toBeCloseTo(5 + 2 * GAP_PART);
  });
  it('keeps a gap at either end while it is being typed', () => {
    expect(plateColumns(1, [0, 1]).lineBefore(0)).toBe(2);
    expect(plateColumns(0, []).lineBefore(0)).toBe(1);
  });
});
