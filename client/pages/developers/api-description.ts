import { queryOptions } from '@tanstack/react-query';
import { z } from 'zod';
import { endpoint } from '#contract/endpoint.ts';
import { call } from '../../lib/call.ts';

const Operation = z.object({
  operationId: z.string(),
  summary: z.string(),
  parameters: z
    .array(z.object({ name: z.string(), in: z.enum(['path', 'query', 'header']), required: z.boolean(), schema: z.json() }))
    .default([]),
  requestBody: z.object({ content: z.record(z.string(), z.object({ schema: z.json() })) }).optional(),
  responses: z.record(
    z.string(),
    z.object({ $ref: z.string().optional(), content: z.record(z.string(), z.object({ schema: z.json() })).optional() }),
  ),
});

/** As much of an OpenAPI 3.1 document as this page shows. */
export const ApiDescription = z.object({
  info: z.object({ title: z.string(), version: z.string(), description: z.string().optional() }),
  paths: z.record(z.string(), z.record(z.string(), Operation)),
  components: z.object({ schemas: z.record(z.string(), z.json()).default({}) }),
});
export type ApiDescription = z.infer<typeof ApiDescription>;

const readApiDescription = endpoint({
  method: 'GET',
  path: '/openapi.json',
  summary: 'This interface, as OpenAPI 3.1',
  answer: ApiDescription,
});

export const apiDescription = () =>
  queryOptions({
    queryKey: ['api description'],
    queryFn: ({ signal }) => call(readApiDescription, { signal }),
    staleTime: Infinity,
  });

/** A JSON Schema, as parsed. */
export type JsonSchema = z.infer<ReturnType<typeof z.json>>;

export type ApiOperation = {
  readonly id: string;
  readonly method: string;
  readonly path: string;
  readonly summary: string;
  readonly parameters: z.infer<typeof Operation>['parameters'];
  /** JSON Schemas; undefined where there is none. */
  readonly body: JsonSchema | undefined;
  readonly answer: JsonSchema | undefined;
  /** Kinds of problem it can answer with. */
  readonly problems: readonly string[];
};

/** The operations in the order of the document, flattened. */
export function operationsOf({ paths }: ApiDescription): ApiOperation[] {
  return Object.entries(paths).flatMap(([path, methods]) =>
    Object.entries(methods).map(([method, { operationId, summary, parameters, requestBody, responses }]) => {
      const success = Object.entries(responses).find(([status]) => status.startsWith('2'));
      return {
        id: operationId,
        method: method.toUpperCase(),
        path,
        summary,
        parameters,
        body: firstSchema(requestBody?.content),
        answer: firstSchema(success?.[1].content),
        problems: Object.values(responses).flatMap(({ $ref }) => ($ref === undefined ? [] : [lastPart($ref)])),
      };
    }),
  );
}

/** What a group of operations is about: the first part of the path below /api. */
export function areaOf({ path }: Pick<ApiOperation, 'path'>): string {
  return path.replace(/^\/api\//, '').split('/')[0] ?? path;
}

function firstSchema(content: Readonly<Record<string, { readonly schema: JsonSchema }>> | undefined): JsonSchema | undefined {
  return Object.values(content ?? {})[0]?.schema;
}

function lastPart(reference: string): string {
  return reference.split('/').at(-1) ?? reference;
}
