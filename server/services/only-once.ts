import { AsyncLocalStorage } from 'node:async_hooks';
import type { Knex } from 'knex';
import { IdempotencyKey } from '#db/models/idempotency-key.ts';
import { ProblemError } from './problem-error.ts';

/** A request that may be sent again, by its sender's own key. */
export type KeyedRequest = {
  readonly memberId: string;
  /** UUID. */
  readonly key: string;
  /** SHA-256 of method, address and body. */
  readonly request: Buffer;
};

type Pending = { readonly keyed: KeyedRequest; isTaken: boolean };

/** SQLSTATE of a row that is there already. */
const THERE_ALREADY = '23505';

/** How long a key is remembered. */
const KEPT = '48 hours';

const pendings = new AsyncLocalStorage<Pending>();

/**
 * Does what a keyed request asks for, once: sent again it is answered as before, and a twin that runs meanwhile waits for the first. The key
 * is written by the first transaction of the work (`takeKey`), so that it stands if and only if what was asked for was done.
 *
 * @throws ProblemError `invalid` where the key stood for another request, `conflict` where it was done and its answer is not known (the server
 *   stopped in between); whatever the work throws, after which the key is free.
 */
export async function onlyOnce(keyed: KeyedRequest, work: () => Promise<unknown>, knex: Knex): Promise<unknown> {
  const before = await answeredBefore(keyed, knex);
  if (before !== undefined) return before.answer;
  let answer: unknown;
  try {
    answer = await pendings.run({ keyed, isTaken: false }, work);
  } catch (error) {
    if (!(error instanceof KeyTakenError)) throw error;
    const twins = await answeredBefore(keyed, knex);
    if (twins === undefined) throw new ProblemError('conflict', 'The same request is under way. Ask again in a moment.');
    return twins.answer;
  }
  await IdempotencyKey.query(knex).findById([keyed.memberId, keyed.key]).patch({ answer: JSON.stringify(answer) });
  return answer;
}

/** The key that the transaction about to begin has to write; nothing where the request named none or an earlier transaction wrote it. */
export function takeKey(): KeyedRequest | undefined {
  const pending = pendings.getStore();
  if (pending === undefined || pending.isTaken) return undefined;
  pending.isTaken = true;
  return pending.keyed;
}

/** @throws KeyTakenError where a twin wrote it first; the row's own index makes this wait for a twin that is under way. */
export async function writeKey({ memberId, key, request }: KeyedRequest, trx: Knex.Transaction): Promise<void> {
  try {
    await IdempotencyKey.query(trx).insert({ memberId, key, request });
  } catch (error) {
    if (error instanceof Error && 'nativeError' in error && isThereAlready(error.nativeError)) throw new KeyTakenError();
    throw error;
  }
}

/** Forgets keys nobody sends again. */
export async function forgetOldKeys(knex: Knex): Promise<void> {
  await IdempotencyKey.query(knex).whereRaw('at < now() - ?::interval', [KEPT]).delete();
}

async function answeredBefore({ memberId, key, request }: KeyedRequest, knex: Knex): Promise<{ readonly answer: unknown } | undefined> {
  const known = await IdempotencyKey.query(knex).findById([memberId, key]);
  if (known === undefined) return undefined;
  if (!known.request.equals(request)) {
    throw new ProblemError('invalid', 'See which, and why, under errors.', {
      errors: [{ path: ['Idempotency-Key'], message: 'Was sent before with another request; make a new one' }],
    });
  }
  if (known.answer === null) throw new ProblemError('conflict', 'This was done already. Look for what it made.');
  return { answer: JSON.parse(known.answer) as unknown };
}

function isThereAlready(native: unknown): boolean {
  return typeof native === 'object' && native !== null && 'code' in native && native.code === THERE_ALREADY;
}

class KeyTakenError extends Error {
  constructor() {
    super('The key is taken');
    this.name = 'KeyTakenError';
  }
}
