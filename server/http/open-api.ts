import { z } from 'zod';
import { Nothing } from '#contract/endpoint.ts';
import type { Endpoint } from '#contract/endpoint.ts';
import { Problem, PROBLEMS } from '#contract/problem.ts';
import type { ProblemKind } from '#contract/problem.ts';
import { KEY_HEADER } from './keyed.ts';

type Json = null | boolean | number | string | readonly Json[] | { readonly [name: string]: Json };
type JsonObject = { readonly [name: string]: Json };

/** The description of an interface, OpenAPI 3.1. */
export type ApiDescription = {
  readonly openapi: '3.1.1';
  readonly info: JsonObject;
  readonly servers: readonly JsonObject[];
  readonly paths: Readonly<Record<string, JsonObject>>;
  readonly components: { readonly schemas: Readonly<Record<string, Json>>; readonly responses: JsonObject };
};

const BASE = '/api';
const JSON_TYPE = 'application/json';
const FORM_TYPE = 'multipart/form-data';
const PROBLEM_TYPE = 'application/problem+json';

/**
 * Describes endpoints from the very schemas that validate them. Checks that JSON Schema has no words for (a real day, a cipher that makes
 * sense) stay with the server, which names the path of each fault.
 *
 * @throws when two schemas of one name differ.
 */
export function describeApi(endpoints: Readonly<Record<string, Endpoint>>): ApiDescription {
  const schemas = new SchemaCollection();
  const paths: Record<string, Record<string, Json>> = {};
  const kinds = new Set<ProblemKind>();
  for (const [operationId, endpoint] of Object.entries(endpoints)) {
    const problems = problemsOf(endpoint);
    for (const kind of problems) kinds.add(kind);
    const path = BASE + endpoint.path.replaceAll(/:(\w+)/g, '{$1}');
    (paths[path] ??= {})[endpoint.method.toLowerCase()] = {
      operationId,
      summary: endpoint.summary,
      parameters: [...parametersIn('path', endpoint.params, schemas), ...parametersIn('query', endpoint.query, schemas), ...keyOf(endpoint)],
      ...(takesBody(endpoint) ? { requestBody: { required: true, content: contentOf(endpoint, schemas) } } : {}),
      responses: {
        [String(endpoint.status)]: {
          description: 'The answer',
          content: { [JSON_TYPE]: { schema: schemas.add(endpoint.answer, 'output') } },
        },
        ...Object.fromEntries(problems.map((kind) => [String(PROBLEMS[kind].status), { $ref: `#/components/responses/${kind}` }])),
      },
    };
  }
  const problem = schemas.add(Problem, 'output');
  return {
    openapi: '3.1.1',
    info: {
      title: 'Pourbook',
      version: '1',
      description: 'The open register of cast marks. Public reads need no account. Dates are ISO 8601; serials and range bounds travel as text.',
    },
    servers: [{ url: '/' }],
    paths,
    components: {
      schemas: schemas.named,
      responses: Object.fromEntries(
        [...kinds].map((kind) => [kind, { description: PROBLEMS[kind].title, content: { [PROBLEM_TYPE]: { schema: problem } } }]),
      ),
    },
  };
}

/** Uploads need none: the bytes themselves say that it is the same photo. */
function keyOf({ status, file }: Endpoint): Json[] {
  if (status !== 201 || file !== undefined) return [];
  const description = 'A UUID, new for each thing to be made: sent again with the same request, it is answered as before and nothing is made twice';
  return [{ name: KEY_HEADER, in: 'header', required: false, description, schema: { type: 'string', format: 'uuid' } }];
}

function takesBody(endpoint: Endpoint): boolean {
  return endpoint.body !== Nothing;
}

function contentOf({ body, file }: Endpoint, schemas: SchemaCollection): JsonObject {
  const schema = schemas.add(body, 'input');
  if (file === undefined) return { [JSON_TYPE]: { schema } };
  const { properties, required } = ObjectSchema.parse(schema);
  // Bytes as they are: JSON Schema has no type for them.
  const bytes = { contentMediaType: 'application/octet-stream' };
  return {
    [FORM_TYPE]: { schema: { type: 'object', properties: { ...properties, [file]: bytes }, required: [...required, file], additionalProperties: false } },
  };
}

function problemsOf(endpoint: Endpoint): readonly ProblemKind[] {
  return [
    'malformed',
    ...(endpoint.params === Nothing ? [] : (['not-found'] as const)),
    ...(takesBody(endpoint) ? (['too-large', 'unsupported-media-type'] as const) : []),
    'invalid',
    'internal',
    'unavailable',
    ...(endpoint.file === undefined ? [] : (['no-room'] as const)),
  ];
}

function parametersIn(place: 'path' | 'query', schema: z.ZodType, schemas: SchemaCollection): Json[] {
  const { properties, required } = ObjectSchema.parse(schemas.add(schema, 'input'));
  return Object.entries(properties).map(([name, one]) => ({
    name,
    in: place,
    required: place === 'path' || required.includes(name),
    schema: one,
  }));
}

const ObjectSchema = z.object({
  properties: z.record(z.string(), z.json()).default({}),
  required: z.array(z.string()).default([]),
});
const Definitions = z.looseObject({ $defs: z.record(z.string(), z.json()).default({}) });

/** JSON Schemas with the parts that have a name gathered in one place, as OpenAPI wants them. */
class SchemaCollection {
  readonly named: Record<string, Json> = {};

  /** The schema, its named parts by reference. Answers may gain fields, so a reader must not refuse those it does not know. */
  add(schema: z.ZodType, direction: 'input' | 'output'): Json {
    const { $schema: _dialect, $defs, ...rest } = Definitions.parse(
      z.toJSONSchema(schema, {
        io: direction,
        override: ({ jsonSchema }) => {
          // A part with a name is described once for both ways.
          const isOpen = direction === 'output' || jsonSchema.id !== undefined;
          if (isOpen && jsonSchema.additionalProperties === false) delete jsonSchema.additionalProperties;
        },
      }),
    );
    for (const [name, part] of Object.entries($defs)) {
      const known = this.named[name];
      const pointed = pointAtComponents(part);
      if (known !== undefined && JSON.stringify(known) !== JSON.stringify(pointed)) throw new Error(`Two schemas want the name ${name}`);
      this.named[name] = pointed;
    }
    return pointAtComponents(z.json().parse(rest));
  }
}

function pointAtComponents(schema: Json): Json {
  if (Array.isArray(schema)) return schema.map(pointAtComponents);
  if (typeof schema !== 'object' || schema === null) return schema;
  return Object.fromEntries(
    Object.entries(schema).map(([key, value]) => [
      key,
      key === '$ref' && typeof value === 'string' ? value.replace('#/$defs/', '#/components/schemas/') : pointAtComponents(value),
    ]),
  );
}
