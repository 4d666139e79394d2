import express from 'express';
import type { Request, RequestHandler } from 'express';
import { LIMITS } from '#contract/limits.ts';
import type { FieldFault } from '#contract/problem.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { isPlainText } from '../plain-text.ts';

const JSON_TYPE = 'application/json';

/** Deeper than anything the interface takes, a cipher with its exceptions included. */
const MOST_NESTING = 32;

const refuseOtherTypes: RequestHandler = (request, _response, next) => {
  if (request.headers['content-type'] !== undefined && request.is(JSON_TYPE) === false) {
    throw new ProblemError('unsupported-media-type', 'Send it as application/json.');
  }
  next();
};

/** Reads the bytes of a JSON body, up to the limit; `parseJsonBody` makes something of them. */
export const readJsonBody: readonly RequestHandler[] = [
  refuseOtherTypes,
  express.raw({ type: JSON_TYPE, limit: LIMITS.jsonBody, inflate: false }),
];

/** The JSON a request carries. Anything but well-formed UTF-8 and JSON is malformed, and so is text that cannot be carried on. */
export function parseJsonBody(request: Request): unknown {
  const bytes: unknown = request.body;
  if (!Buffer.isBuffer(bytes) || bytes.length === 0) {
    throw new ProblemError('malformed', 'A body of application/json is expected here.');
  }
  let value: unknown;
  try {
    value = JSON.parse(new TextDecoder('utf-8', { fatal: true }).decode(bytes));
  } catch (cause) {
    throw new ProblemError('malformed', 'The body is not JSON in UTF-8.', { cause });
  }
  const errors = faultsOfText(value);
  if (errors.length > 0) throw new ProblemError('malformed', 'The body holds text that cannot be kept.', { errors });
  return value;
}

type Node = { readonly value: unknown; readonly path: FieldFault['path'] };

function faultsOfText(body: unknown): FieldFault[] {
  const faults: FieldFault[] = [];
  const waiting: Node[] = [{ value: body, path: [] }];
  for (let node = waiting.pop(); node; node = waiting.pop()) {
    const { value, path } = node;
    if (path.length > MOST_NESTING) throw new ProblemError('malformed', 'The body is nested too deeply.');
    if (typeof value === 'string' && !isPlainText(value)) faults.push({ path, message: 'Holds a NUL or half a character' });
    if (typeof value !== 'object' || value === null) continue;
    for (const [key, inner] of Object.entries(value)) {
      if (key === '__proto__' || !isPlainText(key)) faults.push({ path, message: 'Holds a name that is not taken' });
      else waiting.push({ value: inner, path: [...path, Array.isArray(value) ? Number(key) : key] });
    }
  }
  return faults;
}
