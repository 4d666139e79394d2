import type { Glyph } from '#domain/marks/reading.ts';

/** Says a glyph aloud. */
export function sayGlyph(glyph: Glyph): string {
  switch (glyph.kind) {
    case 'sure':
      return glyph.glyph;
    case 'oneOf':
      return glyph.glyphs.join(' or ');
    case 'unread':
      return 'one that can’t be read';
    case 'run':
      return 'some broken away';
  }
}

/** The inside of one tile: a raised figure, alternatives across a diagonal, hatching, or a broken edge. */
export function MarkTile({ glyph }: { readonly glyph: Glyph }) {
  switch (glyph.kind) {
    case 'sure':
      return <span className="plate-figure">{glyph.glyph}</span>;
    case 'oneOf':
      return <Alternatives glyphs={glyph.glyphs} />;
    case 'unread':
      return (
        <svg viewBox="0 0 40 56" className="plate-drawing" focusable="false">
          <path d="M6 20 20 8M6 32 34 10M6 44 34 21M8 52 34 32M20 52 34 42" className="fill-none stroke-scribe" strokeWidth="2" />
          <path d="M6 8h28v44H6z" className="fill-none stroke-scribe" strokeWidth="1" strokeDasharray="3 3" />
        </svg>
      );
    case 'run':
      return (
        <svg viewBox="0 0 40 56" className="plate-drawing" focusable="false" preserveAspectRatio="none">
          <path d="M8-8 14 6 9 16 16 27 10 38 15 48 8 64H33L27 50 32 40 25 29 31 18 26 7 32-8z" className="fill-sand stroke-relief-shade" strokeWidth="1.5" />
        </svg>
      );
  }
}

function Alternatives({ glyphs }: { readonly glyphs: readonly string[] }) {
  const [first, second, ...others] = glyphs;
  if (others.length > 0 || second === undefined) {
    return (
      <span className="plate-crowd">
        {glyphs.slice(0, 4).map((glyph) => (
          <span key={glyph}>{glyph}</span>
        ))}
        {glyphs.length > 4 && <span className="plate-count">+{glyphs.length - 4}</span>}
      </span>
    );
  }
  return (
    <span className="plate-pair">
      <svg viewBox="0 0 40 56" className="plate-drawing" focusable="false" preserveAspectRatio="none">
        <path d="M36 4V52H4z" className="fill-relief-shade" opacity="0.45" />
        <path d="M4 4H36V52H4zM4 52 36 4" className="fill-none stroke-scribe" strokeWidth="1" />
      </svg>
      <span className="plate-first">{first}</span>
      <span className="plate-second">{second}</span>
    </span>
  );
}
