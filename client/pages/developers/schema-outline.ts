type Json = null | boolean | number | string | readonly Json[] | { readonly [name: string]: Json };
type JsonObject = { readonly [name: string]: Json };

/** One line of a shape: a name, indented by its depth, and what stands there. */
export type OutlineLine = {
  readonly depth: number;
  readonly name: string;
  readonly isOptional: boolean;
  readonly type: string;
  /** Name of a shape described elsewhere on the page; null where the line says all. */
  readonly shape: string | null;
  readonly note: string;
};

/** A JSON Schema as lines that can be read from top to bottom. Named shapes are pointed to, not unfolded, so it always ends. */
export function outlineSchema(schema: Json | undefined, name = '', depth = 0, isOptional = false): OutlineLine[] {
  if (!isObject(schema)) return [{ depth, name, isOptional, type: 'anything', shape: null, note: '' }];
  const inner = listItem(schema);
  const described = inner ?? schema;
  const line: OutlineLine = { depth, name, isOptional, type: sayType(schema), shape: shapeOf(described), note: sayNote(schema) };
  return [line, ...partsOf(described, depth + 1)];
}

function partsOf(schema: JsonObject, depth: number): OutlineLine[] {
  const { properties, anyOf, oneOf, additionalProperties, prefixItems } = schema;
  if (isObject(properties)) {
    const required = isList(schema['required']) ? schema['required'] : [];
    return Object.entries(properties).flatMap(([name, part]) => outlineSchema(part, name, depth, !required.includes(name)));
  }
  if (isObject(additionalProperties) && needsUnfolding(additionalProperties))
    return outlineSchema(additionalProperties, 'each', depth);
  if (isList(prefixItems))
    return prefixItems.filter(needsUnfolding).flatMap((part, place) => outlineSchema(part, `${place + 1}`, depth));
  const ways = isList(anyOf) ? anyOf : isList(oneOf) ? oneOf : [];
  const unfolded = ways.filter(needsUnfolding);
  const [only] = unfolded;
  if (unfolded.length === 1 && isObject(only)) return partsOf(listItem(only) ?? only, depth);
  return unfolded.flatMap((way) => outlineSchema(way, 'either', depth));
}

/** Whether a schema has parts that its type alone does not say. */
function needsUnfolding(schema: Json): boolean {
  if (!isObject(schema)) return false;
  const inner = listItem(schema) ?? schema;
  return isObject(inner['properties']) || ((isList(inner['anyOf']) || isList(inner['oneOf'])) && partsOf(inner, 0).length > 0);
}

function listItem(schema: JsonObject): JsonObject | null {
  const { items } = schema;
  return isObject(items) ? items : null;
}

/** `text`, `whole number`, `list of text`, `one of "a", "b"`, `text or null`. */
export function sayType(schema: Json | undefined): string {
  if (!isObject(schema)) return 'anything';
  const shape = ownShape(schema);
  if (shape !== null) return shape;
  if (schema['const'] !== undefined) return JSON.stringify(schema['const']);
  if (isList(schema['enum'])) return schema['enum'].map((one) => JSON.stringify(one)).join(' | ');
  const ways = isList(schema['anyOf']) ? schema['anyOf'] : isList(schema['oneOf']) ? schema['oneOf'] : null;
  if (ways !== null) return [...new Set(ways.map((way) => sayType(way)))].join(' or ');
  switch (textOf(schema['type'])) {
    case 'array':
      return sayList(schema);
    case 'object':
      return isObject(schema['additionalProperties']) && !isObject(schema['properties'])
        ? `object of ${sayType(schema['additionalProperties'])}`
        : 'object';
    case 'string':
      return TEXTS[textOf(schema['format'])] ?? 'text';
    case 'integer':
      return 'whole number';
    case 'number':
      return 'number';
    case 'boolean':
      return 'true or false';
    case 'null':
      return 'null';
    default:
      return 'anything';
  }
}

const TEXTS: Readonly<Partial<Record<string, string>>> = { date: 'day', 'date-time': 'moment', uuid: 'UUID' };

function sayList(schema: JsonObject): string {
  const places = schema['prefixItems'];
  return isList(places) ? `[${places.map((place) => sayType(place)).join(', ')}]` : `list of ${sayType(schema['items'])}`;
}

const BOUNDS: readonly (readonly [word: string, say: (value: number) => string])[] = [
  ['minLength', (value) => `${value} or more characters`],
  ['maxLength', (value) => `at most ${value} characters`],
  ['minItems', (value) => `${value} or more`],
  ['maxItems', (value) => `at most ${value}`],
  ['minimum', (value) => `from ${value}`],
  ['exclusiveMinimum', (value) => `above ${value}`],
  ['maximum', (value) => `up to ${value}`],
];

function sayNote(schema: JsonObject): string {
  const bounds = BOUNDS.flatMap(([word, say]) => {
    const value = schema[word];
    return typeof value === 'number' && Math.abs(value) < Number.MAX_SAFE_INTEGER ? [say(value)] : [];
  });
  const preset = schema['default'] === undefined ? [] : [`${JSON.stringify(schema['default'])} where it is left out`];
  const described = typeof schema['description'] === 'string' && ownShape(schema) === null ? [schema['description']] : [];
  return [...described, ...bounds, ...preset].join('; ');
}

/** The named shape a schema points to, itself or through `null`; names that zod made up stand for any JSON. */
function shapeOf(schema: JsonObject): string | null {
  const own = ownShape(schema);
  if (own !== null) return own === ANY_JSON ? null : own;
  const ways = isList(schema['anyOf']) ? schema['anyOf'] : [];
  const shapes = ways.flatMap((way) => (isObject(way) ? (ownShape(way) ?? []) : []));
  return shapes.length === 1 && shapes[0] !== ANY_JSON ? (shapes[0] ?? null) : null;
}

const ANY_JSON = 'any JSON';

function ownShape(schema: JsonObject): string | null {
  const reference = schema['$ref'];
  if (typeof reference !== 'string') return null;
  const name = reference.split('/').at(-1) ?? reference;
  return name.startsWith('__') ? ANY_JSON : name;
}

function textOf(value: Json | undefined): string {
  return typeof value === 'string' ? value : '';
}

function isObject(value: Json | undefined): value is JsonObject {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}

function isList(value: Json | undefined): value is readonly Json[] {
  return Array.isArray(value);
}
