import type { z } from 'zod';
import { DecodeAnswer, DecodeResult } from '#contract/decode.ts';
import type { CandidateAnswer } from '#contract/decode.ts';
import { BuildAnswer } from '#contract/models.ts';

/** Answers in the contract's shapes for tests of what is said about them. Dates are those of the worked examples in the decoder's specification. */

const CIPHER = { id: '018d994d-f6c0-759e-9388-3e9cb54a1357', slug: 'ten', title: 'ten-letter key', makerId: '018d5bbd-2920-72c2-a4c4-26dc0063c791', version: 3 };

type Spans = CandidateAnswer['spans'];

export function candidate(from: string, share: number, spans: Spans, more: Partial<CandidateAnswer> = {}): CandidateAnswer {
  return { from, to: from, precision: 'day', share, spans, details: {}, ...more };
}

export function span(field: Spans[number]['field'], start: number, end: number, text: string, value: number): Spans[number] {
  return { field, start, end, text, value };
}

export function result(given: Partial<z.input<typeof DecodeResult>> & Pick<z.input<typeof DecodeResult>, 'candidates'>): DecodeResult {
  const total = given.candidates.length;
  return DecodeResult.parse({
    cipher: CIPHER,
    status: total === 0 ? 'none' : total === 1 ? 'dated' : 'several',
    total,
    reasons: [],
    settle: [],
    splits: [],
    likelihood: 0.001,
    used: { from: '1928-01-01', to: '1954-12-31' },
    ...given,
  });
}

/** The answer to a mark written with sure glyphs, `?` and `*` only. */
export function answer(mark: string, results: DecodeResult[], more: Partial<z.input<typeof DecodeAnswer>> = {}): DecodeAnswer {
  const kinds = { '?': 'unread', '*': 'run' } as const;
  return DecodeAnswer.parse({
    glyphs: [...mark].map((glyph, position) => ({ position, kind: glyph === '?' || glyph === '*' ? kinds[glyph] : 'sure', glyphs: glyph === '?' || glyph === '*' ? [] : [glyph] })),
    breaks: [],
    results,
    triedCiphers: results.length,
    matchedCiphers: results.filter(({ candidates }) => candidates.length > 0).length,
    ...more,
  });
}

/** `BBOCB` under the ten-letter key: 13 Jan or 3 Nov 1941. */
export const BBOCB = result({
  candidates: [
    candidate('1941-01-13', 0.5, [span('month', 0, 1, 'B', 1), span('day', 1, 3, 'BO', 13), span('year', 3, 5, 'CB', 1941)]),
    candidate('1941-11-03', 0.5, [span('month', 0, 2, 'BB', 11), span('day', 2, 3, 'O', 3), span('year', 3, 5, 'CB', 1941)]),
  ],
  splits: [
    { after: 1, bits: 0 },
    { after: 2, bits: 0 },
  ],
});

/** `C147` under a cipher whose year is one figure. */
export const C147 = result({
  candidates: ['1927', '1937', '1947', '1957'].map((year) =>
    candidate(`${year}-03-14`, 0.25, [span('month', 0, 1, 'C', 3), span('day', 1, 3, '14', 14), span('year', 3, 4, '7', Number(year))]),
  ),
});

const PLACED = {
  window: { from: '1941-02-10', to: '1941-03-10' },
  likely: { day: '1941-02-22', from: '1941-02-10', to: '1941-03-10' },
  range: null,
  standing: 'in-range',
  neighbours: [],
  sources: [],
} as const;

export function build(given: Partial<z.input<typeof BuildAnswer>> = {}): BuildAnswer {
  return BuildAnswer.parse({
    serial: { asStamped: '3C 1207', prefix: '3C', number: '1207', suffix: '', substitutions: [] },
    ...PLACED,
    neighbours: [],
    sources: [],
    accounts: [],
    readsAlike: [],
    ...given,
  });
}

export function neighbour(first: string, last: string | null, from: string, to: string): z.input<typeof BuildAnswer>['neighbours'][number] {
  return {
    id: '0191849d-7f80-7310-bfa5-79cb7558c421',
    slug: `range-${first}`,
    first,
    last,
    dates: { from, to },
    precision: 'month',
    meaning: 'built',
    standing: 'solid',
    inOrder: true,
  };
}
