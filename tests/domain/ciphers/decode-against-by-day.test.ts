import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { decode } from '#domain/ciphers/decode.ts';
import type { Decoding } from '#domain/ciphers/decoding.ts';
import { write } from '#domain/ciphers/write.ts';
import type { Reading } from '#domain/marks/reading.ts';
import { arbitraryCase, arbitraryCipher, type Case } from '#tests/support/day-by-day/arbitrary-case.ts';
import { dayNumber } from '#tests/support/day-by-day/calendar-by-day.ts';
import { decodeByDay, endsAt, entropyLeft, glyphCastAt, type ByDay } from '#tests/support/day-by-day/decode-by-day.ts';
import { spellingsOn } from '#tests/support/day-by-day/spellings-by-day.ts';
import { compiled, parsed } from './worked-ciphers.ts';

/** Going through the days is slow; a failure reports the seed it can be repeated with. */
const CASES = 120;
const TIME_ALLOWED = 120_000;
const LISTED = 200;
/** Weights added up in another order differ by less than this. */
const ROUNDING = 1e-9;

type Answers = { readonly one: Case; readonly reading: Reading; readonly quick: Decoding; readonly slow: ByDay };

function expectSameCandidates({ quick, slow }: Answers): void {
  expect(quick.total).toBe(slow.shares.size);
  expect(quick.status).toBe(['none', 'dated'][slow.shares.size] ?? 'several');
  expect(quick.candidates).toHaveLength(Math.min(LISTED, slow.shares.size));
  for (const { from, to, share } of quick.candidates) expect(share).toBeCloseTo(slow.shares.get(`${from} ${to}`) ?? -1, 9);
  if (quick.total > 0 && quick.total <= LISTED) {
    expect(quick.candidates.reduce((sum, { share }) => sum + share, 0)).toBeCloseTo(1, 9);
  }
  expect(Math.abs(quick.likelihood - slow.likelihood)).toBeLessThanOrEqual(slow.likelihood * ROUNDING);
}

function expectGreatestThenEarliestFirst({ quick, slow }: Answers): void {
  const listed = quick.candidates;
  listed.slice(1).forEach((candidate, index) => {
    const before = listed[index]!;
    expect(before.share).toBeGreaterThanOrEqual(candidate.share * (1 - ROUNDING));
    if (before.share > candidate.share * (1 + ROUNDING)) return;
    expect(before.from < candidate.from || (before.from === candidate.from && before.to < candidate.to)).toBe(true);
  });
  const shown = new Set(listed.map(({ from, to }) => `${from} ${to}`));
  for (const [span, share] of slow.shares) if (!shown.has(span)) expect(share).toBeLessThanOrEqual(listed.at(-1)!.share * (1 + ROUNDING));
}

function expectLikeliestSpellingShown({ quick, slow }: Answers): void {
  for (const { from, to, spans, details } of quick.candidates) {
    const covering = slow.spellings.filter(({ runs }) => runs.some((run) => run.from === from && run.to === to));
    const shown = covering.find(({ texts }) => texts.join('|') === spans.map(({ text }) => text).join('|'));
    const likeliest = Math.max(...covering.map(({ likelihood }) => likelihood));
    expect(shown?.likelihood ?? 0).toBeGreaterThanOrEqual(likeliest * (1 - ROUNDING));
    expect(spans.map(({ end }) => end)).toEqual(spans.map(({ start, text }) => start + text.length));
    expect(Object.values(details)).toEqual(spans.filter(({ field }) => field === 'other').map(({ text }) => text));
  }
}

function expectSameEntropies({ one, reading, quick, slow }: Answers): void {
  for (const { position, bits } of quick.settle) expect(bits).toBeCloseTo(entropyLeft(slow, glyphCastAt(position, reading)), 7);
  for (const { after, bits } of quick.splits) expect(bits).toBeCloseTo(entropyLeft(slow, endsAt(after, reading)), 7);
  if (quick.total <= 1 || one.lookAlikes) return;
  const uncertain = reading.glyphs.flatMap(({ kind }, position) => (kind === 'unread' || kind === 'oneOf' ? [position] : []));
  const places = Array.from({ length: reading.glyphs.length - 1 }, (_, index) => index + 1);
  const open = places.filter((place) => new Set(slow.spellings.map(({ texts }) => endsAt(place, reading)(texts))).size > 1);
  if (uncertain.length === 0) expect(quick.splits.map(({ after }) => after).sort((a, b) => a - b)).toEqual(open);
  else {
    expect(quick.splits).toEqual([]);
    // So much may be open that what would settle it is not worked out.
    if (quick.total < 50) expect(quick.settle.length).toBe(uncertain.length);
  }
}

function expectTruthFound({ one, quick, slow }: Answers): void {
  const { from = -Infinity, to = Infinity } = one.limits;
  if (!one.honest || one.day < from || one.day > to || quick.total > LISTED || slow.days === 0) return;
  expect(quick.candidates.some((candidate) => candidate.from <= one.day && one.day <= candidate.to)).toBe(true);
}

describe('decode, against going through the days', () => {
  it('answers the same for any cipher, day and damage', { timeout: TIME_ALLOWED }, () => {
    fc.assert(
      fc.property(arbitraryCase, (one) => {
        const reading = parsed(one.mark);
        const options = { asOf: one.asOf, limits: one.limits, lookAlikes: one.lookAlikes };
        const quick = decode(reading, compiled(one.definition), options);
        const answers = { one, reading, quick, slow: decodeByDay(reading, one.definition, options) };
        expectSameCandidates(answers);
        expectGreatestThenEarliestFirst(answers);
        expectLikeliestSpellingShown(answers);
        expectSameEntropies(answers);
        expectTruthFound(answers);
      }),
      { numRuns: CASES },
    );
  });
});

describe('write, against going through the days', () => {
  it('writes every mark of a day and no other', { timeout: TIME_ALLOWED }, () => {
    fc.assert(
      fc.property(arbitraryCipher, fc.nat(), ({ definition, last }, pick) => {
        const day = dayOfLife(dayNumber(definition.usedFrom), last, pick);
        const written = write(day, compiled(definition), { asOf: last, most: 100_000 });
        const expected = spellingsOn(day, definition).map((texts) => texts.join('|'));
        expect(written.map(({ spans }) => spans.map(({ text }) => text).join('|')).sort()).toEqual(expected.sort());
      }),
      { numRuns: CASES },
    );
  });

  it('is undone by decode', { timeout: TIME_ALLOWED }, () => {
    fc.assert(
      fc.property(arbitraryCipher, fc.nat(), ({ definition, last }, pick) => {
        const cipher = compiled(definition);
        const day = dayOfLife(dayNumber(definition.usedFrom), last, pick);
        for (const { text } of write(day, cipher, { asOf: last }).slice(0, 20)) {
          const { candidates } = decode(parsed(text), cipher, { asOf: last, limits: { from: day - 700, to: day + 700 } });
          expect(candidates.some(({ from, to }) => from <= day && day <= to), text).toBe(true);
        }
      }),
      { numRuns: CASES },
    );
  });
});

function dayOfLife(first: number, last: number, pick: number): number {
  return first + (pick % (last - first + 1));
}
