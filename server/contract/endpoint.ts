import { z } from 'zod';

export const HTTP_METHODS = ['GET', 'POST', 'PUT', 'PATCH', 'DELETE'] as const;
export type HttpMethod = (typeof HTTP_METHODS)[number];

/** What an endpoint without params, query or body takes there. */
export const Nothing = z.strictObject({});
export type Nothing = typeof Nothing;

/**
 * One route of the interface, as a value. The server mounts it, the client calls it and the OpenAPI description is made from it,
 * so the three cannot drift apart. Paths are relative to `/api` and write parameters as `:name`.
 */
export type Endpoint<
  Params extends z.ZodType = z.ZodType,
  Query extends z.ZodType = z.ZodType,
  Body extends z.ZodType = z.ZodType,
  Answer extends z.ZodType = z.ZodType,
> = {
  readonly method: HttpMethod;
  readonly path: `/${string}`;
  readonly status: 200 | 201;
  /** One line for the description page. */
  readonly summary: string;
  /** The form's field that holds a file; then the body travels as `multipart/form-data`, its other fields beside it. */
  readonly file?: string;
  readonly params: Params;
  readonly query: Query;
  readonly body: Body;
  readonly answer: Answer;
};

type Route = { readonly method: HttpMethod; readonly path: `/${string}`; readonly status?: 200 | 201; readonly summary: string; readonly file?: string };
type Parts = { readonly params?: z.ZodType; readonly query?: z.ZodType; readonly body?: z.ZodType; readonly answer: z.ZodType };
type PartOf<Given, Name extends keyof Parts> = Given extends Readonly<Record<Name, infer Schema extends z.ZodType>> ? Schema : Nothing;

/** Makes an endpoint; params, query and body that are not given accept nothing. */
export function endpoint<const Given extends Route & Parts>(
  given: Given,
): Endpoint<PartOf<Given, 'params'>, PartOf<Given, 'query'>, PartOf<Given, 'body'>, Given['answer']>;
export function endpoint(given: Route & Parts): Endpoint {
  return { status: 200, params: Nothing, query: Nothing, body: Nothing, ...given };
}

/** What a caller hands over: the schemas' input side. */
export type CallInput<E extends Endpoint> = {
  readonly params: z.input<E['params']>;
  readonly query: z.input<E['query']>;
  readonly body: z.input<E['body']>;
};

/** What a handler works with: parsed values only. */
export type HandlerInput<E extends Endpoint> = {
  readonly params: z.output<E['params']>;
  readonly query: z.output<E['query']>;
  readonly body: z.output<E['body']>;
};

export type AnswerOf<E extends Endpoint> = z.output<E['answer']>;
/** What a handler returns, before the answer schema drops what it does not name. */
export type AnswerInput<E extends Endpoint> = z.input<E['answer']>;
