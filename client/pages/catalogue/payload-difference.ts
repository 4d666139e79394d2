import { parseDay } from '#domain/dates/day.ts';
import { sayDay, sayOpenSpan } from '../../lib/say-date.ts';

type Json = null | boolean | number | string | readonly Json[] | { readonly [name: string]: Json };
type JsonObject = { readonly [name: string]: Json };
export type Payload = JsonObject;

/** One thing that two versions say differently; null where a version says nothing of it. */
export type FieldChange = {
  readonly path: string;
  readonly field: string;
  readonly before: string | null;
  readonly after: string | null;
};

/** What changed from one version's payload to the next, field by field, down to the single value. */
export function payloadDifference(before: Payload, after: Payload): FieldChange[] {
  return difference(before, after, []);
}

/** All that a payload says, field by field; what it says nothing of is left out, and so are the register's own numbers for other entries. */
export function payloadLines(payload: Payload): { readonly path: string; readonly field: string; readonly value: string }[] {
  return difference({}, payload, []).flatMap(({ path, field, after }) =>
    after === null || after.startsWith(ENTRY) ? [] : [{ path, field, value: after }],
  );
}

function difference(before: Json | undefined, after: Json | undefined, path: readonly string[]): FieldChange[] {
  if (JSON.stringify(before ?? null) === JSON.stringify(after ?? null)) return [];
  const entries = sharedEntries(before, after, path.length === 0);
  if (entries !== null) return entries.flatMap(([name, was, is]) => difference(was, is, [...path, name]));
  const key = path.join('.');
  return [{ path: key, field: sayFieldName(key), before: sayValue(before), after: sayValue(after) }];
}

/** The parts of two values that can be told apart by name or place; null where they are compared as wholes. */
function sharedEntries(
  before: Json | undefined,
  after: Json | undefined,
  isTop: boolean,
): [name: string, was: Json | undefined, is: Json | undefined][] | null {
  if (isList(before) && isList(after) && [...before, ...after].some(isObject)) {
    return Array.from({ length: Math.max(before.length, after.length) }, (_, place) => [
      String(place + 1),
      before[place],
      after[place],
    ]);
  }
  if (!isObject(before) || !isObject(after)) return null;
  if (!isTop && (isRange(before) || isRange(after))) return null;
  return [...new Set([...Object.keys(before), ...Object.keys(after)])].sort().map((name) => [name, before[name], after[name]]);
}

/** A field as words: `partNumbers.2` → `part numbers, 2`; `makerId` → `maker`. */
export function sayFieldName(path: string): string {
  return path
    .split('.')
    .map((part) => (/^[A-Z0-9]+$/.test(part) ? part : wordsOf(part)))
    .join(', ');
}

function wordsOf(name: string): string {
  return name
    .replace(/^slug$/, 'address')
    .replace(/Ids?$/, '')
    .replaceAll(/([a-z])([A-Z])/g, '$1 $2')
    .replaceAll('-', ' ')
    .toLowerCase();
}

/** Stands before the end of an entry's own number, where a payload points to another entry. */
const ENTRY = 'entry …';
const UUID = /^[0-9a-f]{8}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{12}$/;

function sayValue(value: Json | undefined): string | null {
  if (value === undefined || value === null || value === '') return null;
  if (typeof value === 'boolean') return value ? 'yes' : 'no';
  if (typeof value === 'number') return String(value);
  if (typeof value === 'string') return sayText(value);
  if (isList(value))
    return value.length === 0 ? null : value.map((one) => sayValue(one) ?? 'nothing').join(isPlain(value) ? ', ' : '; ');
  if (isRange(value)) return sayRange(value);
  return sayObject(value);
}

/** What names an entry of a list, said first and without its field's name. */
const NAMES = ['place', 'number', 'name', 'field'];

/** `Rear web: three ribs`; with more to say, each part under its field's name. */
function sayObject(value: JsonObject): string | null {
  const named = NAMES.find((name) => typeof value[name] === 'string');
  const lead = named === undefined ? null : sayValue(value[named]);
  const said = Object.entries(value).flatMap(([name, one]) => {
    const text = name === 'ordinal' || name === named ? null : sayValue(one);
    return text === null ? [] : [{ name, text }];
  });
  const [only] = said;
  const rest =
    said.length === 1 && only !== undefined && lead !== null
      ? only.text
      : said.map(({ name, text }) => `${sayFieldName(name)} ${text}`).join(', ');
  if (lead === null) return rest === '' ? null : rest;
  return rest === '' ? lead : `${lead}: ${rest}`;
}

function sayText(text: string): string {
  if (UUID.test(text)) return `${ENTRY}${text.slice(-6)}`;
  return parseDay(text).ok ? sayDay(text) : text;
}

type Range = { readonly from: string | number | null; readonly to: string | number | null };

/** Days as people say them, numbers as first–last. */
function sayRange({ from, to }: Range): string {
  const ends = [from, to].filter((end) => end !== null);
  if (ends.every((end) => typeof end === 'string' && parseDay(end).ok))
    return sayOpenSpan({ from: from === null ? null : String(from), to: to === null ? null : String(to) });
  if (from === null) return `up to ${String(to)}`;
  return to === null ? `${String(from)} on` : `${String(from)}–${String(to)}`;
}

function isRange(value: Json | undefined): value is Range {
  if (!isObject(value)) return false;
  const names = Object.keys(value);
  return names.length === 2 && isEnd(value['from']) && isEnd(value['to']);
}

function isEnd(value: Json | undefined): value is string | number | null {
  return value === null || typeof value === 'string' || typeof value === 'number';
}

function isObject(value: Json | undefined): value is JsonObject {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}

function isList(value: Json | undefined): value is readonly Json[] {
  return Array.isArray(value);
}

function isPlain(list: readonly Json[]): boolean {
  return list.every((one) => typeof one !== 'object');
}
