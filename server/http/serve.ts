import type { Request, Router } from 'express';
import type { z } from 'zod';
import { Nothing } from '#contract/endpoint.ts';
import type { AnswerInput, Endpoint, HandlerInput, HttpMethod } from '#contract/endpoint.ts';
import { faultsOf } from '#contract/faults.ts';
import type { FieldFault } from '#contract/problem.ts';
import { withWorkFolder } from '#server/files/work-folder.ts';
import type { SentFile } from '#server/services/photos/take-photo.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { identityOf } from './auth/identify.ts';
import { keyedRequest } from './keyed.ts';
import { parseJsonBody, readJsonBody } from './middleware/read-json-body.ts';
import { receiveForm } from './receive-form.ts';

/** What an endpoint does: parsed values and who is asking in, an answer out; it sees neither request nor response. */
export type Handler<E extends Endpoint> = (input: HandlerInput<E>, context: RequestContext) => AnswerInput<E> | Promise<AnswerInput<E>>;

const MATCHERS = { GET: 'get', POST: 'post', PUT: 'put', PATCH: 'patch', DELETE: 'delete' } as const satisfies Record<HttpMethod, keyof Router>;

/**
 * Mounts one endpoint. Params, query and body are parsed before anything else, every fault of all three told at once; the answer is
 * parsed on the way out, so that a column nobody named never leaves. What a member sees no cache keeps. What makes something is done once for
 * each `Idempotency-Key`.
 */
export function serve<E extends Endpoint>(router: Router, endpoint: E, handle: Handler<E>): void {
  const takesBody = endpoint.body !== Nothing;
  router[MATCHERS[endpoint.method]](endpoint.path, ...(takesBody ? readJsonBody : []), async (request, response) => {
    const input = parseInput(endpoint, request, takesBody ? parseJsonBody(request) : {});
    const { context, writeCookie, once } = identityOf(request);
    const keyed = endpoint.status === 201 ? keyedRequest(request, context.viewer) : undefined;
    const work = async (): Promise<unknown> => endpoint.answer.parse(await handle(input, context));
    const answer = keyed === undefined ? await work() : await once(keyed, work);
    writeCookie(response);
    const mayBeKept = endpoint.method === 'GET' && context.viewer.kind === 'visitor';
    response
      .status(endpoint.status)
      .set('Cache-Control', mayBeKept ? 'no-cache' : 'no-store')
      .json(answer);
  });
}

/** How an endpoint that takes a file receives it. */
export type Receiving<E extends Endpoint> = {
  /** Where files are received; each is gone from there once its request is over. */
  readonly workDirectory: string;
  /** Refuses before a byte is kept. */
  readonly admit: (context: RequestContext) => Promise<void>;
  readonly handle: (input: HandlerInput<E>, file: SentFile, context: RequestContext) => Promise<AnswerInput<E>>;
};

/** Mounts an endpoint that takes a form with one file, in the field the endpoint names. Its body is the form's other fields. */
export function serveUpload<E extends Endpoint>(router: Router, endpoint: E, { workDirectory, admit, handle }: Receiving<E>): void {
  router[MATCHERS[endpoint.method]](endpoint.path, async (request, response) => {
    const { context, writeCookie } = identityOf(request);
    await admit(context);
    const answer = await withWorkFolder(workDirectory, async (folder) => {
      const { fields, file } = await receiveForm(request, response, endpoint.file ?? 'file', folder);
      return endpoint.answer.parse(await handle(parseInput(endpoint, request, fields), file, context));
    });
    writeCookie(response);
    response.status(endpoint.status).set('Cache-Control', 'no-store').json(answer);
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
