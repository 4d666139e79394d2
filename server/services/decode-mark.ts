import type { Knex } from 'knex';
import type { CipherFault } from '#domain/ciphers/cipher-fault.ts';
import type { CompiledCipher } from '#domain/ciphers/compiled-cipher.ts';
import { compileCipher } from '#domain/ciphers/compile.ts';
import { decode } from '#domain/ciphers/decode.ts';
import type { Decoding } from '#domain/ciphers/decoding.ts';
import { identify } from '#domain/ciphers/identify.ts';
import type { CipherDefinition } from '#domain/ciphers/definition.ts';
import type { Day } from '#domain/dates/day.ts';
import { parseReading } from '#domain/marks/reading.ts';
import type { Reading } from '#domain/marks/reading.ts';
import { LIMITS } from '#contract/limits.ts';
import type { FieldFault } from '#contract/problem.ts';
import { Maker } from '#db/models/maker.ts';
import type { CipherCache } from './cipher-cache.ts';
import { dayOnRecord } from './day-on-record.ts';
import { ProblemError } from './problem-error.ts';
import { storedCiphers } from './stored-ciphers.ts';
import type { StoredCipher } from './stored-ciphers.ts';

export type DecodeQuestion = {
  /** In the mark notation. */
  readonly mark: string;
  /** At most one of these three; none of them means every cipher on record. */
  readonly cipher?: CipherDefinition | undefined;
  readonly cipherId?: string | undefined;
  readonly makerId?: string | undefined;
  readonly limits?: { readonly from?: string | undefined; readonly to?: string | undefined } | undefined;
  readonly lookAlikes: boolean;
  /** The day the question is asked of, ISO; today where it is left out. */
  readonly asOf?: string | undefined;
};

/** A cipher to try. */
type Offered = {
  /** `null`: the caller's own definition. */
  readonly stored: StoredCipher | null;
  readonly cipher: CompiledCipher;
};

export type DecodedUnder = Offered & { readonly decoding: Decoding };

export type DecodedMark = {
  readonly reading: Reading;
  readonly results: readonly DecodedUnder[];
  readonly triedCiphers: number;
  /** Ciphers that can make the mark, listed or not. */
  readonly matchedCiphers: number;
};

type Means = { readonly knex: Knex; readonly ciphers: CipherCache; readonly clock: () => Day };

/**
 * Every date a mark can mean. A cipher that was asked for is answered with its reasons even if it cannot make the mark; of all ciphers
 * on record only those that can are listed, the likeliest first.
 *
 * @throws ProblemError `invalid` for a mark that is no reading, a cipher or a maker that is not on record.
 */
export async function decodeMark(question: DecodeQuestion, { knex, ciphers, clock }: Means): Promise<DecodedMark> {
  const parsed = parseReading(question.mark);
  if (!parsed.ok) throw wrong('mark', parsed.fault.message);
  const reading = parsed.value;
  const { limits } = question;
  const options = {
    asOf: question.asOf === undefined ? clock() : dayOnRecord(question.asOf),
    lookAlikes: question.lookAlikes,
    limits: {
      from: limits?.from === undefined ? undefined : dayOnRecord(limits.from),
      to: limits?.to === undefined ? undefined : dayOnRecord(limits.to),
    },
  };

  const toTry = await ciphersToTry(question, ciphers, knex);
  const isIdentifying = question.cipher === undefined && question.cipherId === undefined && question.makerId === undefined;
  if (isIdentifying) {
    const { ranked, able, tried } = identify(reading, toTry, { ...options, most: LIMITS.results });
    const results = ranked.map(({ entry, decoding }) => ({ ...entry, decoding }));
    return { reading, results, triedCiphers: tried, matchedCiphers: able };
  }
  const results = toTry
    .map((entry) => ({ ...entry, decoding: decode(reading, entry.cipher, options) }))
    .toSorted((one, other) => other.decoding.likelihood - one.decoding.likelihood);
  return {
    reading,
    results: results.slice(0, LIMITS.results),
    triedCiphers: results.length,
    matchedCiphers: results.filter(({ decoding }) => decoding.status !== 'none').length,
  };
}

async function ciphersToTry(
  { cipher, cipherId, makerId }: DecodeQuestion,
  cache: CipherCache,
  knex: Knex,
): Promise<readonly Offered[]> {
  if (cipher !== undefined) {
    const compiled = compileCipher(cipher);
    if (!compiled.ok) throw new ProblemError('invalid', 'See which, and why, under errors.', { errors: faultsOfCipher(compiled.fault) });
    return [{ stored: null, cipher: compiled.value }];
  }
  const choice = cipherId !== undefined ? { cipherId } : makerId !== undefined ? { makerId } : 'all';
  const chosen = await storedCiphers(choice, cache, knex);
  if (chosen.length === 0 && cipherId !== undefined) throw wrong('cipherId', 'No cipher in force that can be used has this id');
  if (chosen.length === 0 && makerId !== undefined && !(await Maker.query(knex).findById(makerId))) {
    throw wrong('makerId', 'No maker has this id');
  }
  return chosen.map((stored) => ({ stored, cipher: stored.compiled }));
}

function faultsOfCipher(faults: readonly CipherFault[]): FieldFault[] {
  return faults.map(({ path, message }) => ({ path: ['cipher', ...path], message }));
}

function wrong(field: string, message: string): ProblemError {
  return new ProblemError('invalid', 'See which, and why, under errors.', { errors: [{ path: [field], message }] });
}
