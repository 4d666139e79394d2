import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { outlineSchema, sayType } from '#client/pages/developers/schema-outline.ts';

/** As the description is made: from the very schemas that validate. */
const jsonSchema = (schema: z.ZodType) => z.json().parse(z.toJSONSchema(schema, { io: 'input' }));
const lines = (schema: z.ZodType) =>
  outlineSchema(jsonSchema(schema)).map(({ depth, name, isOptional, type }) =>
    `${'  '.repeat(depth)}${name}${isOptional ? '?' : ''} ${type}`.trimEnd(),
  );

describe('outlineSchema', () => {
  it('goes through an object from top to bottom', () => {
    expect(lines(z.object({ mark: z.string(), limits: z.object({ from: z.iso.date() }).optional() }))).toEqual([
      ' object',
      '  mark text',
      '  limits? object',
      '    from day',
    ]);
  });
  it('unfolds the entries of a list', () => {
    expect(lines(z.object({ items: z.array(z.object({ share: z.number() })) }))).toEqual([
      ' object',
      '  items list of object',
      '    share number',
    ]);
  });
  it('says each shape a value may have', () => {
    expect(lines(z.union([z.object({ a: z.string() }), z.object({ b: z.string() })]))).toEqual([
      ' object',
      '  either object',
      '    a text',
      '  either object',
      '    b text',
    ]);
  });
  it('looks through null', () => {
    expect(lines(z.object({ a: z.int() }).nullable())).toEqual([' object or null', '  a whole number']);
  });
  it('says bounds and what stands where a value is left out', () => {
    const [, limit] = outlineSchema(jsonSchema(z.object({ limit: z.int().min(1).max(100).default(25) })));
    expect(limit?.note).toBe('from 1; up to 100; 25 where it is left out');
  });
  it('points to a named shape instead of unfolding it', () => {
    expect(outlineSchema({ $ref: '#/components/schemas/Provenance' })).toEqual([
      { depth: 0, name: '', isOptional: false, type: 'Provenance', shape: 'Provenance', note: '' },
    ]);
  });
  it('ends on a shape that holds itself', () => {
    expect(outlineSchema({ type: 'array', items: { $ref: '#/components/schemas/__schema0' } })[0]).toMatchObject({
      type: 'list of any JSON',
      shape: null,
    });
  });
});

describe('sayType', () => {
  it.each([
    [z.enum(['a', 'b']), '"a" | "b"'],
    [z.uuid(), 'UUID'],
    [z.tuple([z.int(), z.int()]), '[whole number, whole number]'],
    [z.record(z.string(), z.string()), 'object of text'],
    [z.literal('month'), '"month"'],
    [z.boolean(), 'true or false'],
  ])('%#: %2$s', (schema, said) => {
    expect(sayType(jsonSchema(schema))).toBe(said);
  });
  it('says anything of a schema that says nothing', () => {
    expect(sayType({})).toBe('anything');
    expect(sayType(undefined)).toBe('anything');
  });
});
