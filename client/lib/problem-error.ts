import { Problem, PROBLEM_KINDS, PROBLEMS, problemType } from '#contract/problem.ts';
import type { FieldFault, ProblemKind } from '#contract/problem.ts';

/** The register answered, and the answer is a problem. `kind` is one of the contract's table. */
export class ProblemError extends Error {
  readonly kind: ProblemKind;
  readonly status: number;
  /** What is wrong with which field; empty unless the kind is `invalid` or `malformed`. */
  readonly faults: readonly FieldFault[];
  /** Stands in the server's log too; null when something between us and the server answered in its place. */
  readonly requestId: string | null;
  /** Seconds to wait before asking again; null when the answer doesn't say. */
  readonly retryAfter: number | null;

  constructor(problem: {
    kind: ProblemKind;
    status: number;
    detail: string;
    faults: readonly FieldFault[];
    requestId: string | null;
    retryAfter: number | null;
  }) {
    super(problem.detail);
    this.name = 'ProblemError';
    this.kind = problem.kind;
    this.status = problem.status;
    this.faults = problem.faults;
    this.requestId = problem.requestId;
    this.retryAfter = problem.retryAfter;
  }
}

/** No answer came. `offline`: this device has no connection. `timeout`: none within the time allowed. `no-answer`: anything else on the way. */
export class UnreachableError extends Error {
  readonly reason: 'offline' | 'timeout' | 'no-answer';

  constructor(reason: UnreachableError['reason'], cause: unknown) {
    super(`The register could not be reached (${reason})`, { cause });
    this.name = 'UnreachableError';
    this.reason = reason;
  }
}

/** Turns an answer outside 200–299 into a `ProblemError`, whoever sent it. */
export async function problemFrom(response: Response): Promise<ProblemError> {
  const retryAfter = secondsToWait(response.headers.get('Retry-After'));
  const parsed = Problem.safeParse(await response.json().catch(() => null));
  if (parsed.success) {
    const { type, status, detail, requestId, errors } = parsed.data;
    const kind = PROBLEM_KINDS.find((known) => problemType(known) === type) ?? kindOfStatus(status);
    return new ProblemError({ kind, status, detail, faults: errors ?? [], requestId, retryAfter });
  }
  const kind = kindOfStatus(response.status);
  return new ProblemError({ kind, status: response.status, detail: PROBLEMS[kind].title, faults: [], requestId: null, retryAfter });
}

/** A problem known by its kind alone, for what is found out here and for explaining kinds. */
export function problemOfKind(kind: ProblemKind): ProblemError {
  const { status, title } = PROBLEMS[kind];
  return new ProblemError({ kind, status, detail: `${title}.`, faults: [], requestId: null, retryAfter: null });
}

/** Nothing stands at the address, or what it names can't be the name of anything. */
export function isNothingThere(error: unknown): boolean {
  return error instanceof ProblemError && (error.kind === 'not-found' || error.kind === 'invalid');
}

function kindOfStatus(status: number): ProblemKind {
  return PROBLEM_KINDS.find((kind) => PROBLEMS[kind].status === status) ?? (status >= 502 ? 'unavailable' : 'internal');
}

function secondsToWait(header: string | null): number | null {
  return header !== null && /^\d{1,6}$/.test(header) ? Number(header) : null;
}
