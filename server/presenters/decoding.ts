import type { z } from 'zod';
import type { CandidateAnswer, DecodeAnswer, DecodeResult } from '#contract/decode.ts';
import type { Candidate } from '#domain/ciphers/decoding.ts';
import { writeDay } from '#domain/dates/day.ts';
import type { Glyph } from '#domain/marks/reading.ts';
import type { DecodedMark, DecodedUnder } from '#server/services/decode-mark.ts';

type GlyphAnswer = z.input<typeof DecodeAnswer>['glyphs'][number];

export function presentDecodedMark({ reading, results, triedCiphers, matchedCiphers }: DecodedMark): DecodeAnswer {
  return {
    glyphs: reading.glyphs.map(presentGlyph),
    breaks: [...reading.breaks],
    results: results.map(presentResult),
    triedCiphers,
    matchedCiphers,
  };
}

function presentGlyph(glyph: Glyph, position: number): GlyphAnswer {
  return { position, kind: glyph.kind, glyphs: glyphsOf(glyph) };
}

function glyphsOf(glyph: Glyph): string[] {
  switch (glyph.kind) {
    case 'sure':
      return [glyph.glyph];
    case 'oneOf':
      return [...glyph.glyphs];
    case 'unread':
    case 'run':
      return [];
  }
}

function presentResult({ stored, cipher, decoding }: DecodedUnder): DecodeResult {
  return {
    cipher: stored && { id: stored.id, slug: stored.slug, title: stored.title, makerId: stored.makerId, version: stored.version },
    status: decoding.status,
    total: decoding.total,
    candidates: decoding.candidates.map(presentCandidate),
    reasons: decoding.reasons.map(({ code, message }) => ({ code, message })),
    settle: decoding.settle.map(({ position, bits }) => ({ position, bits })),
    splits: decoding.splits.map(({ after, bits }) => ({ after, bits })),
    likelihood: decoding.likelihood,
    used: { from: writeDay(cipher.usedFrom), to: cipher.usedTo === null ? null : writeDay(cipher.usedTo) },
  };
}

function presentCandidate({ from, to, precision, share, spans, details }: Candidate): CandidateAnswer {
  return {
    from: writeDay(from),
    to: writeDay(to),
    precision,
    share,
    spans: spans.map(({ field, start, end, text, value }) => ({ field, start, end, text, value })),
    details: { ...details },
  };
}
