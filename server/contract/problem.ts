import { z } from 'zod';

/**
 * The one table of what can go wrong: kind → status and title. Services raise a kind; only the last middleware knows HTTP.
 * Answers are RFC 9457 `application/problem+json`.
 */
export const PROBLEMS = {
  malformed: { status: 400, title: 'The request could not be read' },
  'not-signed-in': { status: 401, title: 'Sign in first' },
  'not-allowed': { status: 403, title: 'You may not do this' },
  'identity-not-confirmed': { status: 403, title: 'Prove once more who you are' },
  'second-factor-owed': { status: 403, title: 'A second factor is needed first' },
  'not-found': { status: 404, title: 'Nothing here' },
  'method-not-allowed': { status: 405, title: 'This address does not take that method' },
  conflict: { status: 409, title: 'It changed in the meantime' },
  'too-large': { status: 413, title: 'Too large' },
  'unsupported-media-type': { status: 415, title: 'This kind of content is not taken here' },
  invalid: { status: 422, title: 'A value is wrong' },
  'too-many-requests': { status: 429, title: 'Too many requests' },
  internal: { status: 500, title: 'Something broke on our side' },
  unavailable: { status: 503, title: 'The register is away for a moment' },
  'no-room': { status: 507, title: 'There is no room left' },
} as const satisfies Record<string, { readonly status: number; readonly title: string }>;

export type ProblemKind = keyof typeof PROBLEMS;
export const PROBLEM_KINDS = Object.keys(PROBLEMS) as [ProblemKind, ...ProblemKind[]];

/**
 * One wrong value. `path` runs from the outside in and begins with the field's own name, whether that stands in the body, the query or the
 * address; a number is a place in a list, counted from 0. An empty path means the body as a whole.
 */
export const FieldFault = z
  .object({ path: z.array(z.union([z.string(), z.number()])), message: z.string() })
  .meta({ id: 'FieldFault' });
export type FieldFault = z.infer<typeof FieldFault>;

export const Problem = z
  .object({
    type: z.string(),
    title: z.string(),
    status: z.number().int(),
    detail: z.string(),
    requestId: z.string(),
    errors: z.array(FieldFault).optional(),
  })
  .meta({ id: 'Problem', description: 'RFC 9457 problem details' });
export type Problem = z.infer<typeof Problem>;

/** The `type` member of a problem: an address on this site that explains it. */
export function problemType(kind: ProblemKind): string {
  return `/problems/${kind}`;
}
