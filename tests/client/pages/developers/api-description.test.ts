import { describe, expect, it } from 'vitest';
import { ApiDescription, areaOf, operationsOf } from '#client/pages/developers/api-description.ts';
import { writeJson } from '#client/pages/developers/example-requests.tsx';

const DOCUMENT = ApiDescription.parse({
  info: { title: 'Pourbook', version: '1' },
  paths: {
    '/api/castings/{slug}': {
      get: {
        operationId: 'readCasting',
        summary: 'One casting',
        parameters: [{ name: 'slug', in: 'path', required: true, schema: { type: 'string' } }],
        responses: {
          200: { content: { 'application/json': { schema: { type: 'object' } } } },
          404: { $ref: '#/components/responses/not-found' },
        },
      },
    },
  },
  components: { schemas: {} },
});

describe('operationsOf', () => {
  it('flattens the document', () => {
    expect(operationsOf(DOCUMENT)).toEqual([
      {
        id: 'readCasting',
        method: 'GET',
        path: '/api/castings/{slug}',
        summary: 'One casting',
        parameters: [{ name: 'slug', in: 'path', required: true, schema: { type: 'string' } }],
        body: undefined,
        answer: { type: 'object' },
        problems: ['not-found'],
      },
    ]);
  });
  it('has nothing to say of a document without paths', () => {
    expect(operationsOf({ ...DOCUMENT, paths: {} })).toEqual([]);
  });
});

it('groups operations by what they are about', () => {
  expect(areaOf({ path: '/api/castings/{slug}/history' })).toBe('castings');
});

describe('writeJson', () => {
  it('keeps short lists and objects on one line, and stays the same JSON', () => {
    const value = { width: [1, 2], spans: [{ from: '1941-01-13', share: 0.5 }], text: 'a [b] {c}' };
    expect(writeJson(value)).toContain('"width": [ 1, 2 ]');
    expect(JSON.parse(writeJson(value))).toEqual(value);
  });
});
