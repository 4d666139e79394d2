import type { Glyph, Reading } from '#domain/marks/reading.ts';
import { MarkTile, sayGlyph } from './mark-tile.tsx';
import { PlateBrackets } from './plate-brackets.tsx';
import type { Division } from './plate-brackets.tsx';
import { plateColumns } from './plate-columns.ts';

declare module 'react' {
  interface CSSProperties {
    /** How many tiles wide a plate is; the stylesheet makes the tile's width from it. */
    '--units'?: number;
  }
}

type Props = {
  readonly reading: Reading;
  /** `line` sits in a line of text or a heading; `plate` is a block as wide as its glyphs. */
  readonly size?: 'line' | 'plate';
  readonly divisions?: readonly Division[];
  /** The glyph the text speaks of. */
  readonly lit?: number | null;
};

/** A mark as a plate of glyph tiles: raised figures on iron, read out as one phrase. */
export function MarkPlate({ reading, size = 'plate', divisions = [], lit = null }: Props) {
  const columns = plateColumns(reading.glyphs.length, reading.breaks);
  return (
    <span className={`plate-holder plate-holder-${size}`} style={{ '--units': columns.units }}>
      <span role="img" aria-label={sayMark(reading)} className="plate">
        <span aria-hidden="true" className="plate-row" style={{ gridTemplateColumns: columns.template }}>
          {reading.glyphs.map((glyph, position) => (
            <span
              key={position}
              className={`plate-tile ${position === lit ? 'is-lit' : ''}`}
              style={{ gridColumn: columns.lineBefore(position) }}
            >
              <MarkTile glyph={glyph} />
            </span>
          ))}
        </span>
      </span>
      {divisions.length > 0 && <PlateBrackets divisions={divisions} columns={columns} />}
    </span>
  );
}

/** A plain run of glyphs, a casting number say, as a reading: every glyph sure, hyphens and spaces as gaps. */
export function readingOf(text: string): Reading {
  const glyphs: Glyph[] = [];
  const breaks: number[] = [];
  for (const character of text) {
    if (/[\s./-]/.test(character)) {
      if (glyphs.length > 0 && breaks.at(-1) !== glyphs.length) breaks.push(glyphs.length);
    } else glyphs.push({ kind: 'sure', glyph: character });
  }
  return { glyphs, breaks: breaks.filter((place) => place < glyphs.length) };
}

function sayMark({ glyphs, breaks }: Reading): string {
  const said = glyphs.map((glyph, position) => (breaks.includes(position + 1) ? `${sayGlyph(glyph)}, gap` : sayGlyph(glyph)));
  return `Mark ${said.join(', ')}`;
}
