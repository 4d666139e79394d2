// @vitest-environment node
import { describe, expect, it } from 'vitest';
import { answerWords, matchWords } from '#client/features/decode/answer-words.ts';
import { answer, BBOCB, C147, candidate, result, span } from './samples.ts';

const ONE = candidate('1939-07-25', 1, [span('month', 0, 1, 'R', 7), span('day', 1, 3, 'LK', 25), span('year', 3, 5, 'ON', 1939)]);

describe('answerWords', () => {
  it('says which boundary is open and which gap would close it', () => {
    expect(answerWords(answer('BBOCB', [BBOCB]), BBOCB, 'one maker')).toEqual({
      stands: 'Two dates.',
      why: 'Nothing on this plate says whether the month is one letter or two. A visible gap after the first or second letter would settle it.',
    });
  });
  it('says the only date there is', () => {
    const dated = result({ candidates: [ONE] });
    expect(answerWords(answer('RLKON', [dated]), dated, 'one maker')).toEqual({ stands: '25 Jul 1939.', why: 'It can mean no other day under this cipher.' });
  });
  it('names the one cipher that can make it where all were tried', () => {
    const dated = result({ candidates: [ONE] });
    expect(answerWords(answer('RLKON', [dated], { triedCiphers: 9 }), dated, 'all').why).toBe(
      'It can mean no other day under this cipher. Of the nine ciphers tried, only the ten-letter key can make this mark.',
    );
  });
  it('says which glyph would settle it', () => {
    const open = result({ candidates: C147.candidates, settle: [{ position: 1, bits: 0 }] });
    expect(answerWords(answer('C?7', [open]), open, 'one maker').why).toBe('If the second glyph were read for certain, one date would be left.');
    const wide = result({ candidates: C147.candidates, settle: [{ position: 1, bits: 2 }] });
    expect(answerWords(answer('C?7', [wide]), wide, 'one maker').why).toBe('If the second glyph were read for certain, about four would be left.');
  });
  it('says which of two glyphs it could be', () => {
    const open = result({ candidates: BBOCB.candidates, settle: [{ position: 2, bits: 0 }] });
    const asked = answer('BBOCB', [open], { glyphs: ['B', 'B', 'OD', 'C', 'B'].map((glyphs, position) => ({ position, kind: glyphs.length > 1 ? 'oneOf' : 'sure', glyphs: [...glyphs] })) });
    expect(answerWords(asked, open, 'one maker').why).toBe(
      'We can’t tell yet, because the third letter could be O or D. If the third letter were read for certain, one date would be left.',
    );
  });
  it('says that the same mark came round again', () => {
    const { stands, why } = answerWords(answer('C147', [C147]), C147, 'one maker');
    expect(stands).toBe('Four dates.');
    expect(why).toMatch(/^The same mark came round again/);
  });
  it('says that the answer went with the broken glyphs', () => {
    expect(answerWords(answer('C14*', [C147]), C147, 'one maker').why).toMatch(/^What is broken away would have said which/);
  });
  it('calls weeks weeks', () => {
    const weeks = result({ candidates: C147.candidates.map((one) => ({ ...one, to: one.from, precision: 'week' as const })) });
    expect(answerWords(answer('C147', [weeks]), weeks, 'one maker').stands).toBe('Four weeks.');
  });
  it('says the nearest failure where there is no date', () => {
    const none = result({ candidates: [], reasons: [{ code: 'no-such-month', message: 'TK·KOI: no month 0' }] });
    const { stands, why } = answerWords(answer('TKKOI', [none]), none, 'one maker');
    expect(stands).toBe('No date.');
    expect(why).toContain('The nearest reading fails: TK·KOI: no month 0.');
  });
  it('says that not all are listed', () => {
    const many = result({ candidates: C147.candidates, total: 431 });
    expect(answerWords(answer('C147', [many]), many, 'one maker')).toMatchObject({ stands: '431 dates.' });
    expect(answerWords(answer('C147', [many]), many, 'one maker').why).toContain('The 200 likeliest are listed');
  });
});

describe('matchWords', () => {
  it('counts the ciphers that can make it', () => {
    const several = answer('C147', [C147, BBOCB], { triedCiphers: 12 });
    expect(matchWords(several, 'all').stands).toBe('Two of twelve ciphers can make this mark.');
    expect(matchWords({ ...several, matchedCiphers: 70 }, 'all').why).toContain('The 2 likeliest are listed.');
  });
  it('says whose ciphers can’t', () => {
    const none = answer('QQQ', [], { triedCiphers: 3, matchedCiphers: 0 });
    expect(matchWords(none, 'all').stands).toBe('No cipher on record can make this mark.');
    expect(matchWords(none, 'one maker').stands).toBe('No cipher of this maker can make this mark.');
  });
});
