import type { DecodeAnswer, DecodeResult } from '#contract/decode.ts';
import type { CompiledCipher } from '#domain/ciphers/compiled-cipher.ts';
import { decode } from '#domain/ciphers/decode.ts';
import type { DecodeOptions } from '#domain/ciphers/decode.ts';
import { writeDay } from '#domain/dates/day.ts';
import type { Glyph, Reading } from '#domain/marks/reading.ts';

/** A reading decoded in the browser under a draft, in the shape the register answers in, so that the same tables show it. */
export function decodeUnderDraft(reading: Reading, cipher: CompiledCipher, options: DecodeOptions): { readonly answer: DecodeAnswer; readonly result: DecodeResult } {
  const decoding = decode(reading, cipher, options);
  const result: DecodeResult = {
    cipher: null,
    status: decoding.status,
    total: decoding.total,
    candidates: decoding.candidates.map(({ from, to, precision, share, spans, details }) => ({
      from: writeDay(from),
      to: writeDay(to),
      precision,
      share,
      spans: [...spans],
      details: { ...details },
    })),
    reasons: [...decoding.reasons],
    settle: [...decoding.settle],
    splits: [...decoding.splits],
    likelihood: decoding.likelihood,
    used: { from: writeDay(cipher.usedFrom), to: cipher.usedTo === null ? null : writeDay(cipher.usedTo) },
  };
  return {
    result,
    answer: {
      glyphs: reading.glyphs.map((glyph, position) => ({ position, kind: glyph.kind, glyphs: glyphsOf(glyph) })),
      breaks: [...reading.breaks],
      results: [result],
      triedCiphers: 1,
      matchedCiphers: decoding.total === 0 ? 0 : 1,
    },
  };
}

function glyphsOf(glyph: Glyph): string[] {
  if (glyph.kind === 'sure') return [glyph.glyph];
  return glyph.kind === 'oneOf' ? [...glyph.glyphs] : [];
}
