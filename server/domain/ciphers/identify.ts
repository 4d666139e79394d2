import type { Reading } from '../marks/reading.ts';
import type { CompiledCipher } from './compiled-cipher.ts';
import { decode, likelihoodOf, type DecodeOptions } from './decode.ts';
import type { Decoding } from './decoding.ts';
import { canSpell, outlineOf } from './outline.ts';

/** A cipher on offer, with whatever the caller knows it by. */
export type Entered = { readonly cipher: CompiledCipher };

export type Ranked<Entry extends Entered> = { readonly entry: Entry; readonly decoding: Decoding };

export type Identification<Entry extends Entered> = {
  /** Ciphers that can make the mark, by the likelihood of the reading averaged over their days in use. */
  readonly ranked: readonly Ranked<Entry>[];
  /** How many can make it, listed or not. */
  readonly able: number;
  /** How many were tried: all, unless so little is read that the work allowed ran out before. */
  readonly tried: number;
};

export type IdentifyOptions = DecodeOptions & {
  /** At most so many are decoded and listed; all where it is not said. */
  readonly most?: number | undefined;
};

/** Work allowed for ranking, over all ciphers: some half a second. */
const STEPS_TO_IDENTIFY = 20_000_000;

/**
 * Maker unknown: tries every cipher. Those that can't make the mark are counted, not listed; most of them are turned away by
 * their outline alone. Of equally likely ciphers the one offered first comes first.
 */
export function identify<Entry extends Entered>(
  reading: Reading,
  entries: readonly Entry[],
  options: IdentifyOptions,
): Identification<Entry> {
  const outline = outlineOf(reading, options.lookAlikes ?? false);
  const able: { readonly entry: Entry; readonly likelihood: number }[] = [];
  let stepsLeft = STEPS_TO_IDENTIFY;
  let tried = 0;
  for (const entry of entries) {
    if (stepsLeft <= 0) break;
    tried += 1;
    if (!canSpell(entry.cipher, outline)) continue;
    const { likelihood, steps } = likelihoodOf(reading, entry.cipher, options);
    stepsLeft -= steps;
    if (likelihood > 0) able.push({ entry, likelihood });
  }
  able.sort((one, other) => other.likelihood - one.likelihood);
  const ranked = able.slice(0, options.most).map(({ entry }) => ({ entry, decoding: decode(reading, entry.cipher, options) }));
  return { ranked, able: able.length, tried };
}
