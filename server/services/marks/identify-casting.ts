import { canBe, isPlain } from './can-be.ts';
import { readingOnRecord, remembering } from './mark-dating.ts';

/** What tells castings apart by their numbers. */
export type NumberedCasting = {
  readonly id: string;
  readonly makerId: string;
  readonly partTypeId: string;
  readonly numberKey: string;
};

export type PartToIdentify = {
  readonly makerId: string | null;
  readonly partTypeId: string | null;
  /** What it was identified as so far. */
  readonly castingId: string | null;
  /** The register's readings of its casting numbers. */
  readonly numbers: readonly string[];
};

/**
 * Identifies parts by their casting numbers: a part is the one casting that every number read on it can be, among those of its maker and
 * type as far as these are known. Where several castings have the number it stays what it was, as somebody told them apart by more than
 * the number. A number with glyphs that were not read for certain leads to no casting by itself, but does not take one away that it can be.
 */
export function identifyingCastings(castings: readonly NumberedCasting[]): (part: PartToIdentify) => string | null {
  const numbered = remembering((text: string) => {
    const reading = readingOnRecord(text);
    return { castings: castings.filter(({ numberKey }) => canBe(reading, numberKey)), isPlain: isPlain(reading) };
  });
  return ({ makerId, partTypeId, castingId, numbers }) => {
    if (numbers.length === 0) return castingId;
    const found = numbers.map(numbered);
    const [first, ...others] = found;
    const able = (first?.castings ?? []).filter(
      (casting) =>
        (makerId === null || casting.makerId === makerId) &&
        (partTypeId === null || casting.partTypeId === partTypeId) &&
        others.every((other) => other.castings.includes(casting)),
    );
    if (able.some(({ id }) => id === castingId)) return castingId;
    return able.length === 1 && found.every((one) => one.isPlain) ? (able[0]?.id ?? null) : null;
  };
}
