import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import { endpoint } from '#contract/endpoint.ts';
import type { Endpoint } from '#contract/endpoint.ts';
import { ENDPOINTS } from '#contract/endpoints.ts';
import { describeApi } from '#server/http/open-api.ts';

const description = describeApi(ENDPOINTS);

const Operation = z.looseObject({
  operationId: z.string(),
  summary: z.string().min(1),
  parameters: z.array(
    z.strictObject({ name: z.string(), in: z.enum(['path', 'query', 'header']), required: z.boolean(), description: z.string().optional(), schema: z.looseObject({}) }),
  ),
  requestBody: z.looseObject({ required: z.literal(true) }).optional(),
  responses: z.record(z.string().regex(/^[2-5]\d\d$/), z.looseObject({})),
});
const operations = Object.entries(description.paths).flatMap(([path, item]) =>
  Object.entries(item).map(([method, operation]) => ({ path, method, operation: Operation.parse(operation) })),
);

/** Every reference anywhere in a value. */
function referencesIn(value: unknown): readonly string[] {
  if (typeof value !== 'object' || value === null) return [];
  return Object.entries(value).flatMap(([key, inner]) => (key === '$ref' && typeof inner === 'string' ? [inner] : referencesIn(inner)));
}

describe('the description of the interface', () => {
  test('has one operation for each endpoint, under its path and method', () => {
    expect(operations.map(({ path, method, operation }) => [operation.operationId, method, path])).toEqual(
      expect.arrayContaining(
        Object.entries(ENDPOINTS).map(([name, { method, path }]) => [name, method.toLowerCase(), `/api${path.replaceAll(/:(\w+)/g, '{$1}')}`]),
      ),
    );
    expect(operations).toHaveLength(Object.keys(ENDPOINTS).length);
  });

  test('names in each path the parameters it takes there, and no others', () => {
    for (const { path, operation } of operations) {
      const inPath = [...path.matchAll(/\{(\w+)\}/g)].map(([, name]) => name);
      expect(operation.parameters.filter((one) => one.in === 'path').map(({ name }) => name)).toEqual(inPath);
      expect(operation.parameters.filter((one) => one.in === 'path').every(({ required }) => required)).toBe(true);
    }
  });

  test('says of what makes something, uploads apart, that it may come with a key', () => {
    const keyed = operations.filter(({ operation }) => operation.parameters.some(({ name, required }) => name === 'Idempotency-Key' && !required));
    const making = Object.entries(ENDPOINTS).filter(([name, { status }]) => status === 201 && name !== 'uploadPhoto');
    expect(keyed.map(({ operation }) => operation.operationId).toSorted()).toEqual(making.map(([name]) => name).toSorted());
  });

  test('asks for no parameter that has a default', () => {
    const listing = operations.find(({ operation }) => operation.operationId === 'listCastings');
    expect(listing?.operation.parameters.filter(({ required }) => required)).toEqual([]);
    expect(listing?.operation.parameters.map(({ name }) => name)).toEqual(
      expect.arrayContaining(['q', 'sort', 'limit', 'after', 'number', 'maker', 'partType', 'model']),
    );
  });

  test('refers to nothing that is not there', () => {
    for (const reference of referencesIn(description)) {
      const found = reference
        .replace(/^#\//, '')
        .split('/')
        .reduce<unknown>((value, step) => z.record(z.string(), z.unknown()).parse(value)[step], description);
      expect(found, reference).toBeDefined();
    }
    expect(JSON.stringify(description)).not.toContain('$defs');
  });

  test('says of a body what is asked for', () => {
    const schema = z
      .looseObject({ requestBody: z.looseObject({ content: z.record(z.string(), z.looseObject({ schema: z.looseObject({}) })) }) })
      .parse(operations.find(({ operation }) => operation.operationId === 'decodeMark')?.operation).requestBody.content['application/json']?.schema;
    expect(schema).toMatchObject({ type: 'object', required: ['mark'], additionalProperties: false });
  });

  test('says of a form with a file which field it goes in', () => {
    const content = z
      .looseObject({ requestBody: z.looseObject({ content: z.record(z.string(), z.looseObject({ schema: z.looseObject({}) })) }) })
      .parse(operations.find(({ operation }) => operation.operationId === 'uploadPhoto')?.operation).requestBody.content;
    expect(Object.keys(content)).toEqual(['multipart/form-data']);
    expect(content['multipart/form-data']?.schema).toMatchObject({
      required: ['photo'],
      properties: { photo: { contentMediaType: 'application/octet-stream' }, keepDate: { enum: ['true', 'false'] } },
      additionalProperties: false,
    });
  });

  test('lets an answer gain fields', () => {
    const answers = JSON.stringify(operations.map(({ operation }) => operation.responses));
    expect(answers).not.toContain('"additionalProperties":false');
  });

  test('gives every kind of problem the one shape', () => {
    expect(description.components.schemas['Problem']).toMatchObject({
      required: expect.arrayContaining(['type', 'title', 'status', 'detail', 'requestId']) as unknown,
    });
    expect(referencesIn(description.components.responses)).toContain('#/components/schemas/Problem');
  });

  test('cannot be made of two schemas of one name', () => {
    const reader = (answer: z.ZodType): Endpoint => endpoint({ method: 'GET', path: '/x', summary: 'x', answer });
    const first = reader(z.object({ a: z.string().meta({ id: 'Same' }) }));
    const second = reader(z.object({ a: z.number().meta({ id: 'Same' }) }));
    expect(() => describeApi({ first, second })).toThrow('Same');
  });
});
