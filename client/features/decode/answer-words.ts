import type { DecodeAnswer, DecodeResult } from '#contract/decode.ts';
import { capital, sayCount, sayList, sayPlace } from '../../lib/say-number.ts';
import { saySpan } from '../../lib/say-date.ts';
import { fieldWord } from './divisions.ts';

/** What stands, in a few words, and then why and what would settle it. */
export type Answer = { readonly stands: string; readonly why: string };

/** Below this many bits nothing is left to settle. */
const SETTLED_BITS = 0.005;
const MOST_LISTED = 200;

/** Whose ciphers were tried. */
export type Tried = 'all' | 'one maker';

/** Says what one cipher makes of a mark; where every cipher was tried, which of them it is. */
export function answerWords(answer: DecodeAnswer, result: DecodeResult, tried: Tried): Answer {
  const said = wordsOfResult(answer, result);
  if (tried === 'one maker' || result.cipher === null || answer.matchedCiphers !== 1) return said;
  return { ...said, why: `${said.why} Of the ${sayCount(answer.triedCiphers)} ciphers tried, only the ${result.cipher.title} can make this mark.` };
}

function wordsOfResult(answer: DecodeAnswer, result: DecodeResult): Answer {
  const { status, total, candidates } = result;
  const [first] = candidates;
  if (status === 'none' || first === undefined) return { stands: 'No date.', why: whyNone(result) };
  if (total === 1) {
    const width = first.from === first.to ? 'It can mean no other day' : 'It can mean no other days';
    return { stands: `${saySpan(first)}.`, why: `${width} under this cipher.` };
  }
  const stands = `${capital(sayCount(total))} ${datesWord(candidates)}.`;
  const tooMany = total > MOST_LISTED ? ` The ${MOST_LISTED} likeliest are listed; years the casting can be from would narrow them.` : '';
  return { stands, why: `${whySeveral(answer, result)}${tooMany}` };
}

/** What the candidates are: all of them weeks, say, or dates. */
function datesWord(candidates: DecodeResult['candidates']): string {
  const [precision, ...others] = new Set(candidates.map((candidate) => candidate.precision));
  return precision === undefined || precision === 'day' || precision === 'span' || others.length > 0 ? 'dates' : `${precision}s`;
}

function whyNone({ reasons }: DecodeResult): string {
  const [first] = reasons;
  const nearest = first === undefined ? 'This cipher can’t have cast it.' : `The nearest reading fails: ${withStop(first.message)}`;
  return `${nearest} Look at the mark again, allow for look-alikes, or try without a maker.`;
}

function whySeveral(answer: DecodeAnswer, result: DecodeResult): string {
  const [best] = result.settle;
  if (best !== undefined) return whyUnread(answer, best);
  const unsplit = whyUnsplit(result);
  if (unsplit !== null) return unsplit;
  const settles = 'The years the casting was made, or another mark, would settle it.';
  if (answer.glyphs.some(({ kind }) => kind === 'run')) return `What is broken away would have said which. ${settles}`;
  return sameGlyphs(result) ? `The same mark came round again, and nothing on this plate says which time it was. ${settles}` : `Nothing on this plate says which. ${settles}`;
}

function whyUnread({ glyphs }: DecodeAnswer, best: DecodeResult['settle'][number]): string {
  const glyph = glyphs[best.position];
  const noun = `the ${sayPlace(best.position)} ${nounOf(glyphs.flatMap((one) => one.glyphs).join(''))}`;
  const cause = glyph?.kind === 'oneOf' ? `We can’t tell yet, because ${noun} could be ${sayList(glyph.glyphs, 'or')}. ` : '';
  return `${cause}If ${noun} were read for certain, ${sayLeft(best.bits)} would be left.`;
}

/** What `bits` of doubt are, as a number of dates equally likely. */
function sayLeft(bits: number): string {
  const dates = 2 ** bits;
  if (bits < SETTLED_BITS) return 'one date';
  return dates < 1.5 ? 'one date, seldom more,' : `about ${sayCount(Math.round(dates))}`;
}

/** The sentence for a mark whose glyphs are sure and whose field boundaries are not; null where no gap would help. */
function whyUnsplit(result: DecodeResult): string | null {
  const least = Math.min(...result.splits.map(({ bits }) => bits));
  const places = result.splits.filter(({ bits }) => bits - least < SETTLED_BITS).map(({ after }) => sayPlace(after - 1));
  if (places.length === 0) return null;
  const noun = nounOf(result.candidates[0]?.spans.map(({ text }) => text).join('') ?? '');
  const open = openField(result);
  const cause =
    open === null
      ? 'Nothing on this plate says where one field ends and the next begins.'
      : `Nothing on this plate says whether the ${fieldWord(open.field)} is ${sayWidths(open.widths, noun)}.`;
  return `${cause} A visible gap after the ${sayList(places, 'or')} ${noun} would ${least < SETTLED_BITS ? 'settle it' : 'leave fewer'}.`;
}

/** `one letter or two`. */
function sayWidths([first, ...others]: readonly number[], noun: string): string {
  if (first === undefined) return '';
  return sayList([`${sayCount(first)} ${first === 1 ? noun : `${noun}s`}`, ...others.map(sayCount)], 'or');
}

/** The first field that candidates give different widths. */
function openField({ candidates }: DecodeResult): { readonly field: DecodeResult['candidates'][number]['spans'][number]['field']; readonly widths: readonly number[] } | null {
  const fields = candidates[0]?.spans ?? [];
  for (const [place, { field }] of fields.entries()) {
    const widths = [...new Set(candidates.flatMap(({ spans }) => (spans[place] === undefined ? [] : [spans[place].end - spans[place].start])))].sort((a, b) => a - b);
    if (widths.length > 1) return { field, widths };
  }
  return null;
}

function sameGlyphs({ candidates }: DecodeResult): boolean {
  const readings = new Set(candidates.map(({ spans }) => spans.map(({ start, end, text }) => `${start} ${end} ${text}`).join(', ')));
  return readings.size === 1;
}

/** What to call a glyph of this mark. */
function nounOf(text: string): 'letter' | 'figure' | 'glyph' {
  if (/^[A-Z]+$/.test(text)) return 'letter';
  return /^\d+$/.test(text) ? 'figure' : 'glyph';
}

function withStop(sentence: string): string {
  return /[.?]$/.test(sentence) ? sentence : `${sentence}.`;
}

/** Says what several ciphers make of a mark: those of one maker, or all on record. */
export function matchWords({ matchedCiphers, triedCiphers, results }: DecodeAnswer, tried: Tried): Answer {
  const count = `${capital(sayCount(triedCiphers))} ${triedCiphers === 1 ? 'was' : 'were'} tried.`;
  if (matchedCiphers === 0) {
    return tried === 'all'
      ? {
          stands: 'No cipher on record can make this mark.',
          why: `${count} Look at the glyphs again, say “can’t be read” where you are not sure, or allow for look-alikes.`,
        }
      : { stands: 'No cipher of this maker can make this mark.', why: `${count} Choose one to see where it fails, look at the glyphs again, or try without a maker.` };
  }
  const listed = results.length < matchedCiphers ? ` The ${results.length} likeliest are listed.` : '';
  return {
    stands: `${capital(sayCount(matchedCiphers))} of ${sayCount(triedCiphers)} ciphers can make this mark.`,
    why: `Use the one that belongs to this casting; the likeliest stands first.${listed}`,
  };
}
