/**
 * The columns of a plate: one for each glyph and a narrow one for each gap, so that the brackets below stand under their glyphs.
 * Lines are those of CSS grid, counted from 1.
 */
export type PlateColumns = {
  /** Value of `grid-template-columns`; the plate gives `--tile`, the width of a tile. */
  readonly template: string;
  /** Width of the whole in tiles, gaps counted as the part of a tile that they take. */
  readonly units: number;
  /** The line on the left of the glyph at a position. */
  readonly lineBefore: (position: number) => number;
  /** The line on its right. */
  readonly lineAfter: (position: number) => number;
};

export const GAP_PART = 0.4;

/** Columns for `count` glyphs with a gap after n glyphs for each n of `gaps`. A gap at the very end counts: it is being typed. */
export function plateColumns(count: number, gaps: readonly number[]): PlateColumns {
  const after = new Set(gaps);
  const widths: string[] = [];
  const lines: number[] = [];
  const addGap = (place: number) => {
    if (after.has(place)) widths.push(`calc(var(--tile) * ${GAP_PART})`);
  };
  addGap(0);
  for (let position = 0; position < count; position += 1) {
    lines.push(widths.length + 1);
    widths.push('var(--tile)');
    addGap(position + 1);
  }
  const lineBefore = (position: number) => lines[position] ?? widths.length + 1;
  return {
    template: widths.join(' '),
    units: count + GAP_PART * (widths.length - count),
    lineBefore,
    lineAfter: (position) => lineBefore(position) + 1,
  };
}
