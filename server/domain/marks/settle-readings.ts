import type { EvidenceStrength } from '../vocabulary.ts';
import { combineReadings, sameGlyphs } from './combine-readings.ts';
import type { CombinedReading } from './combine-readings.ts';
import type { Reading } from './reading.ts';

/** A reading on record, as far as it says whether it counts. */
export type MadeReading = {
  readonly id: string;
  readonly reader: string;
  readonly reading: Reading;
  /** ISO 8601, UTC. */
  readonly madeAt: string;
  /** Made before its reader was shown what others had read. */
  readonly independent: boolean;
  /** By whoever held the part then. */
  readonly asHolder: boolean;
  readonly isTakenBack: boolean;
};

/** Where a mark stands, as far as it matters to its readings. */
export type MarkPlace = {
  readonly hasPhoto: boolean;
  readonly isPublic: boolean;
};

/** What all readings of a mark together come to. */
export type SettledMark = {
  /** The reading in force, in the mark notation; `null` while there is none. */
  readonly text: string | null;
  /** When the newest reading that counts was made. */
  readonly readAt: string | null;
  readonly evidence: EvidenceStrength;
  readonly wantsReading: boolean;
  /** How it was worked out; `null` where no reading is independent. */
  readonly inForce: CombinedReading | null;
};

/** Independent readers that are wanted: so many, and more while they differ. */
const READERS_WANTED = { enough: 3, most: 5 } as const;

/**
 * The reading in force of a mark, how strong its evidence is, and whether another reader is wanted.
 *
 * Each reader has one reading: their latest independent one that was not taken back. Where nobody’s is independent, the latest of each reader
 * says what the mark is taken to say, and how sure that is can’t be told. With a photo a mark is `photographed`; it is `confirmed` once two
 * members read it independently and alike, glyph for glyph as the reading in force, of whom one did not hold the part.
 */
export function settleReadings(readings: readonly MadeReading[], { hasPhoto, isPublic }: MarkPlace): SettledMark {
  const counting = countingReadings(readings);
  if (counting.length === 0) {
    return { text: null, readAt: null, evidence: hasPhoto ? 'photographed' : 'claimed', wantsReading: hasPhoto && isPublic, inForce: null };
  }
  const combined = combineReadings(counting);
  const independent = counting.filter(({ independent: blind }) => blind);
  const isConfirmed = hasPhoto && isConfirmedBy(independent, combined);
  return {
    text: combined.text,
    readAt: counting.reduce((latest, { madeAt }) => (madeAt > latest ? madeAt : latest), ''),
    evidence: isConfirmed ? 'confirmed' : hasPhoto ? 'photographed' : 'claimed',
    wantsReading: hasPhoto && isPublic && independent.length < (agree(independent) ? READERS_WANTED.enough : READERS_WANTED.most),
    inForce: independent.length > 0 ? combined : null,
  };
}

/** Of each reader the one reading that counts, in the order in which they were made. */
export function countingReadings<Made extends Omit<MadeReading, 'reading' | 'asHolder'>>(readings: readonly Made[]): readonly Made[] {
  const standing = readings.filter(({ isTakenBack }) => !isTakenBack);
  const independent = standing.filter((one) => one.independent);
  const ofReader = new Map<string, Made>();
  for (const one of inOrder(independent.length > 0 ? independent : standing)) ofReader.set(one.reader, one);
  return inOrder([...ofReader.values()]);
}

function inOrder<Made extends Pick<MadeReading, 'id' | 'madeAt'>>(readings: readonly Made[]): readonly Made[] {
  return readings.toSorted((one, other) => (one.madeAt === other.madeAt ? (one.id < other.id ? -1 : 1) : one.madeAt < other.madeAt ? -1 : 1));
}

function isConfirmedBy(independent: readonly MadeReading[], { reading }: CombinedReading): boolean {
  const agreeing = independent.filter((one) => sameGlyphs(one.reading, reading));
  return agreeing.length >= 2 && agreeing.some(({ asHolder }) => !asHolder);
}

function agree([first, ...others]: readonly MadeReading[]): boolean {
  return first === undefined || others.every((other) => sameGlyphs(first.reading, other.reading));
}
