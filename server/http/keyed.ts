import { createHash } from 'node:crypto';
import type { Request } from 'express';
import { z } from 'zod';
import type { Viewer } from '#server/policies/viewer.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import type { KeyedRequest } from '#server/services/only-once.ts';

export const KEY_HEADER = 'Idempotency-Key';

/**
 * What a request says of being sent again: a member's, with an `Idempotency-Key`. A request without one is done as often as it is sent.
 *
 * @throws ProblemError `malformed` for a key that is no UUID.
 */
export function keyedRequest(request: Request, viewer: Viewer): KeyedRequest | undefined {
  const given = request.get(KEY_HEADER);
  if (given === undefined || viewer.kind === 'visitor') return undefined;
  const key = z.uuid().safeParse(given);
  if (!key.success) throw new ProblemError('malformed', `${KEY_HEADER} is a UUID, a new one for each thing to be made.`);
  const digest = createHash('sha256').update(`${request.method}\n${request.originalUrl}\n`);
  const body: unknown = request.body;
  if (Buffer.isBuffer(body)) digest.update(body);
  return { memberId: viewer.id, key: key.data, request: digest.digest() };
}
