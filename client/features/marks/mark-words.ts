import type { MarkPage } from '#contract/marks.ts';
import { MARK_KINDS } from '#domain/vocabulary.ts';
import type { EvidenceStrength, MarkKind, MarkTechnique } from '#domain/vocabulary.ts';
import type { MarkInShort } from '#contract/parts.ts';
import { saySpan, sayYears } from '../../lib/say-date.ts';
import { sayCount } from '../../lib/say-number.ts';

const KINDS: Readonly<Record<MarkKind, string>> = {
  'casting-number': 'Casting number',
  'date-code': 'Date mark',
  'foundry-mark': 'Foundry mark',
  serial: 'Serial',
  plate: 'Plate',
  other: 'Mark',
};

const TECHNIQUES: Readonly<Record<MarkTechnique, string>> = { cast: 'cast when poured', stamped: 'stamped after machining' };

/** `Date mark, cast when poured`. */
export function sayMarkKind({ kind, technique }: Pick<MarkPage, 'kind' | 'technique'>): string {
  return `${KINDS[kind]}, ${TECHNIQUES[technique]}`;
}

export function sayKind(kind: MarkKind): string {
  return KINDS[kind];
}

/** Kinds of mark, for a filter or a form to choose from. */
export const KIND_CHOICES = MARK_KINDS.map((kind) => ({ value: kind, text: KINDS[kind].toLowerCase() }));

const EVIDENCE: Readonly<Record<EvidenceStrength, { readonly word: string; readonly means: string }>> = {
  claimed: { word: 'Claimed', means: 'Somebody says so; there is no photo of it.' },
  photographed: { word: 'Photographed', means: 'There is a photo of it that others can read.' },
  confirmed: { word: 'Confirmed', means: 'Photographed, and two members read every glyph of it alike, each without having seen what the other read; one of them at least does not hold the part.' },
  documented: { word: 'Documented', means: 'A document of the time says the same.' },
};

export function sayEvidence(evidence: EvidenceStrength): string {
  return EVIDENCE[evidence].word;
}

export function sayEvidenceMeans(evidence: EvidenceStrength): string {
  return EVIDENCE[evidence].means;
}

/** What would make the evidence stronger; null where nothing that is done here would. */
export function sayWhatRaises(evidence: EvidenceStrength): string | null {
  switch (evidence) {
    case 'claimed':
      return 'A photo of the mark would raise it.';
    case 'photographed':
      return 'Another member who reads the same, without having seen this, would raise it. What its holder reads counts, and confirms nothing by itself.';
    case 'confirmed':
    case 'documented':
      return null;
  }
}

/** What the mark was worked out to mean, in a sentence. */
export function sayDates({ status, total }: Pick<NonNullable<MarkPage['dates']>, 'status' | 'total'>): string {
  if (status === 'none') return 'No cipher on record can date it.';
  return total === 1 ? 'It can mean one date.' : `It can mean ${sayCount(total)} dates.`;
}

/** The same in a few words, for a list: `12 Mar 1939`, `13 Jan 1941 or 3 Nov 1941`, `five dates, 1938–1941`, `no cipher on record can date it`. */
export function sayDatesInShort({ status, total, candidates }: NonNullable<MarkInShort['dates']>): string {
  if (status === 'none') return 'no cipher on record can date it';
  const isWhole = candidates.length === total;
  if (isWhole && total <= 2) return candidates.map(saySpan).join(' or ');
  const count = `${sayCount(total)} dates`;
  const [first] = candidates.map(({ from }) => from).sort();
  const last = candidates.map(({ to }) => to).sort().at(-1);
  return isWhole && first !== undefined && last !== undefined ? `${count}, ${sayYears({ from: first, to: last })}` : count;
}

/** Why no dates of a mark can be told. */
export function sayNoDates({ kind, hidden, reading }: Pick<MarkInShort, 'kind' | 'hidden' | 'reading'>): string {
  if (kind !== 'date-code') return 'not a date';
  if (hidden) return 'kept until then';
  return reading === null ? 'nothing read to date' : 'not worked out yet';
}
