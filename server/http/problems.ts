import { PROBLEMS, PROBLEM_KINDS, problemType } from '#contract/problem.ts';
import type { Problem, ProblemKind } from '#contract/problem.ts';
import { GateFullError } from '#server/files/gate.ts';
import { PhotoStoreError } from '#server/files/photo-store.ts';
import type { StoreFault } from '#server/files/photo-store.ts';
import { UnusablePictureError } from '#server/files/unusable-picture-error.ts';
import { ProblemError } from '#server/services/problem-error.ts';

/** Seconds a client is asked to wait before it tries again while the database is away. */
const RETRY_AFTER = 2;

/** More faults than anybody mends at one go; the rest are counted in `detail`, so that an answer stays small. */
const MOST_FAULTS = 100;

/** PostgreSQL error codes, exact or by class (their first two characters), and what they mean to a caller. */
const DATABASE_PROBLEMS: Readonly<Record<string, ProblemKind>> = {
  '23502': 'invalid',
  '23503': 'conflict',
  '23505': 'conflict',
  '23514': 'invalid',
  '23P01': 'conflict',
  '22': 'invalid',
  '40001': 'unavailable',
  '40P01': 'unavailable',
  '53': 'unavailable',
  '55P03': 'unavailable',
  '57014': 'unavailable',
  '57P': 'unavailable',
  '08': 'unavailable',
};

const DETAILS: Partial<Record<ProblemKind, string>> = {
  conflict: 'What is on record has changed, or already says otherwise.',
  invalid: 'The register refuses a value.',
  unavailable: 'The database does not answer just now. Try again in a moment.',
  internal: 'It is written down with the request id; try again, or tell us the id.',
  malformed: 'The request could not be read.',
  'not-found': 'Nothing of this name is on record.',
  'too-large': 'What was sent is larger than is taken here.',
  'unsupported-media-type': 'Send it as application/json, UTF-8, not compressed.',
};

/** System calls of a connection; a file that is missing fails in others. */
const NETWORK_CALLS = new Set<unknown>(['connect', 'read', 'write', 'getaddrinfo']);

const SQLSTATE = /^[0-9A-Z]{5}$/;

/** Failures to reach the database that the driver reports without any code; Knex puts the statement before them. */
const LOST_CONNECTION =
  /(?:^| - )(?:Connection terminated(?: unexpectedly| due to connection timeout)?|timeout expired|Client (?:has encountered a connection error|was closed) and is not queryable)$/;

/** Any error as a problem; what nobody expected becomes a bare `internal`. */
export function problemOf(error: unknown): ProblemError {
  if (error instanceof ProblemError) return error;
  const ofPhotos = photoProblemOf(error);
  if (ofPhotos !== undefined) return ofPhotos;
  const kind = kindOf(error);
  return new ProblemError(kind, DETAILS[kind] ?? PROBLEMS[kind].title, { cause: error });
}

const STORE_PROBLEMS: Readonly<Record<StoreFault, readonly [ProblemKind, string]>> = {
  missing: ['not-found', 'There is nothing at this address.'],
  full: ['no-room', 'The register can keep no more photos just now. What is on record stays as it is.'],
  corrupt: ['unavailable', 'The photo did not arrive in the store as it was sent. Try again in a moment.'],
  away: ['unavailable', 'The photo store does not answer just now. Try again in a moment.'],
};

/** Files and pictures that could not be taken, kept or had. */
function photoProblemOf(error: unknown): ProblemError | undefined {
  if (error instanceof UnusablePictureError) {
    return new ProblemError(error.unusable === 'kind' ? 'unsupported-media-type' : 'invalid', error.reason, { cause: error });
  }
  if (error instanceof GateFullError) {
    return new ProblemError('unavailable', 'Too many photos are being looked at just now. Try again in a moment.', { cause: error });
  }
  if (!(error instanceof PhotoStoreError)) return undefined;
  const [kind, detail] = STORE_PROBLEMS[error.fault];
  return new ProblemError(kind, detail, { cause: error });
}

/** The answer's body. */
export function writeProblem(problem: ProblemError, requestId: string): Problem {
  const { status, title } = PROBLEMS[problem.kind];
  const errors = problem.errors?.slice(0, MOST_FAULTS).map(({ path, message }) => ({ path: [...path], message }));
  const more = (problem.errors?.length ?? 0) - (errors?.length ?? 0);
  return {
    type: problemType(problem.kind),
    title,
    status,
    detail: more > 0 ? `${problem.detail} ${more} more faults are not listed.` : problem.detail,
    requestId,
    ...(errors ? { errors } : {}),
  };
}

/** Seconds to name in `Retry-After`, for the kinds that pass by themselves. */
export function retryAfter(kind: ProblemKind): number | undefined {
  return kind === 'unavailable' || kind === 'too-many-requests' ? RETRY_AFTER : undefined;
}

function kindOf(error: unknown): ProblemKind {
  if (!(error instanceof Error)) return 'internal';
  if (error.name === 'NotFoundError') return 'not-found';
  if (isOutOfConnections(error)) return 'unavailable';

  const native = 'nativeError' in error && error.nativeError instanceof Error ? error.nativeError : error;
  const code = 'code' in native && typeof native.code === 'string' ? native.code : '';
  const ofDatabase = SQLSTATE.test(code)
    ? (DATABASE_PROBLEMS[code] ?? DATABASE_PROBLEMS[code.slice(0, 3)] ?? DATABASE_PROBLEMS[code.slice(0, 2)])
    : undefined;
  if (ofDatabase) return ofDatabase;
  if ('syscall' in native && NETWORK_CALLS.has(native.syscall)) return 'unavailable';
  if (native instanceof AggregateError && native.errors.some((one) => kindOf(one) === 'unavailable')) return 'unavailable';
  return 'status' in error && typeof error.status === 'number' ? kindOfStatus(error.status) : 'internal';
}

function isOutOfConnections(error: Error): boolean {
  return error.name === 'KnexTimeoutError' || LOST_CONNECTION.test(error.message);
}

/** Errors of the body parser and the router carry an HTTP status of their own. */
function kindOfStatus(status: number): ProblemKind {
  return PROBLEM_KINDS.find((kind) => PROBLEMS[kind].status === status) ?? (status >= 400 && status < 500 ? 'malformed' : 'internal');
}
