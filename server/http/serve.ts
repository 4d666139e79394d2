import type { Request, Router } from 'express';
import type { z } from 'zod';
import { Nothing } from '#contract/endpoint.ts';
import type { AnswerInput, Endpoint, HandlerInput, HttpMethod } from '#contract/endpoint.ts';
import { faultsOf } from '#contract/faults.ts';
import type { FieldFault } from '#contract/problem.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { identityOf } from './auth/identify.ts';
import { parseJsonBody, readJsonBody } from './middleware/read-json-body.ts';

/** What an endpoint does: parsed values and who is asking in, an answer out; it sees neither request nor response. */
export type Handler<E extends Endpoint> = (input: HandlerInput<E>, context: RequestContext) => AnswerInput<E> | Promise<AnswerInput<E>>;

const MATCHERS = { GET: 'get', POST: 'post', PUT: 'put', PATCH: 'patch', DELETE: 'delete' } as const satisfies Record<HttpMethod, keyof Router>;

/**
 * Mounts one endpoint. Params, query and body are parsed before anything else, every fault of all three told at once; the answer is
 * parsed on the way out, so that a column nobody named never leaves. What a member sees no cache keeps.
 */
export function serve<E extends Endpoint>(router: Router, endpoint: E, handle: Handler<E>): void {
  const takesBody = endpoint.body !== Nothing;
  router[MATCHERS[endpoint.method]](endpoint.path, ...(takesBody ? readJsonBody : []), async (request, response) => {
    const input = parseInput(endpoint, request, takesBody ? parseJsonBody(request) : {});
    const { context, writeCookie } = identityOf(request);
    const answer = endpoint.answer.parse(await handle(input, context));
    writeCookie(response);
    const mayBeKept = endpoint.method === 'GET' && context.viewer.kind === 'visitor';
    response
      .status(endpoint.status)
      .set('Cache-Control', mayBeKept ? 'no-cache' : 'no-store')
      .json(answer);
  });
}

function parseInput<E extends Endpoint>(endpoint: E, request: Request, body: unknown): HandlerInput<E> {
  const params = endpoint.params.safeParse(request.params);
  const query = endpoint.query.safeParse(request.query);
  const parsedBody = endpoint.body.safeParse(body);
  if (params.success && query.success && parsedBody.success) {
    // Each part is what its own schema made of it; that the three together are the endpoint's, the compiler cannot follow.
    return { params: params.data, query: query.data, body: parsedBody.data } as HandlerInput<E>;
  }
  throw new ProblemError('invalid', 'See which, and why, under errors.', {
    errors: [...faultsIn(params), ...faultsOfQuery(query, request.query), ...faultsIn(parsedBody)],
  });
}

function faultsIn(parsed: z.ZodSafeParseResult<unknown>): FieldFault[] {
  return parsed.success ? [] : faultsOf(parsed.error);
}

/** A key given twice arrives as a list; what is wrong with it is not its kind. */
function faultsOfQuery(parsed: z.ZodSafeParseResult<unknown>, query: Request['query']): FieldFault[] {
  return faultsIn(parsed).map((fault) =>
    typeof fault.path[0] === 'string' && Array.isArray(query[fault.path[0]]) ? { ...fault, message: 'Given more than once' } : fault,
  );
}
