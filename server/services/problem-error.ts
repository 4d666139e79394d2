import type { FieldFault, ProblemKind } from '#contract/problem.ts';

type More = {
  /** Wrong values, each with its path. */
  readonly errors?: readonly FieldFault[];
  /** For the log alone: why, in words no visitor sees. */
  readonly internal?: string;
  /** Seconds after which it may be tried again, where they are known. */
  readonly retryAfter?: number;
  readonly cause?: unknown;
};

/**
 * An expected failure, by kind. `detail` is what a person reads, so it names no table, no file and nobody's data.
 * Services raise it; only the last middleware turns it into an answer.
 */
export class ProblemError extends Error {
  readonly kind: ProblemKind;
  readonly detail: string;
  readonly errors: readonly FieldFault[] | undefined;
  readonly internal: string | undefined;
  readonly retryAfter: number | undefined;

  constructor(kind: ProblemKind, detail: string, { errors, internal, retryAfter, cause }: More = {}) {
    super(internal ?? detail, { cause });
    this.name = 'ProblemError';
    this.kind = kind;
    this.detail = detail;
    this.errors = errors;
    this.internal = internal;
    this.retryAfter = retryAfter;
  }
}
