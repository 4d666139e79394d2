/** A reading as parsed from the mark notation. */
export type Glyph =
  | { readonly kind: 'sure'; readonly glyph: string }
  | { readonly kind: 'oneOf'; readonly glyphs: readonly string[] }
  | { readonly kind: 'unread' }
  | { readonly kind: 'run' };

export type Reading = {
  readonly glyphs: readonly Glyph[];
  /** Places where a field must end: a break after n glyphs is n; ascending, each strictly inside the mark. */
  readonly breaks: readonly number[];
};
