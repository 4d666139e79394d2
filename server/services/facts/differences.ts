import type { Difference } from '#contract/contributions.ts';
import type { FactField, KindForm } from '#contract/kinds/kind.ts';
import { civilOf, parseDay } from '#domain/dates/day.ts';

type Json = unknown;
type Payload = Readonly<Record<string, Json>>;
type Path = Difference['path'];

/** What a fact, a source or an account is called; nothing where it is not known. */
export type NameOf = (id: string) => string | undefined;

/** Something a payload says, as people read it. */
type Line = { readonly path: Path; readonly label: string; readonly text: string };

const NOTHING: Payload = {};

/**
 * What two payloads of a kind say differently, in the order of its form: labels for keys, words for choices, names for ids, and a row for
 * each entry of a list that came, went or changed. With nothing before, all that is said. A draft may say anything: what is no value of
 * its field is shown as it was sent.
 */
export function differencesOf(form: Pick<KindForm, 'fields'>, before: Payload | null, after: Payload, nameOf: NameOf): Difference[] {
  return form.fields.flatMap((field) =>
    isList(field)
      ? listDifferences(linesOf(field, (before ?? NOTHING)[field.key], nameOf), linesOf(field, after[field.key], nameOf))
      : lineDifferences(linesOf(field, (before ?? NOTHING)[field.key], nameOf), linesOf(field, after[field.key], nameOf)),
  );
}

function isList(field: FactField): boolean {
  return field.control === 'rows';
}

/** Lines that stand at the same place. */
function lineDifferences(before: readonly Line[], after: readonly Line[]): Difference[] {
  const labels = [...new Set([...before, ...after].map(({ label }) => label))];
  return labels.flatMap((label) => differing(before.find((one) => one.label === label), after.find((one) => one.label === label)));
}

/** Entries of a list: those that stand in both are the same wherever they stand; the rest are laid side by side in their order. */
function listDifferences(before: readonly Line[], after: readonly Line[]): Difference[] {
  const kept = [...after];
  const gone = before.filter((line) => {
    const place = kept.findIndex(({ text }) => text === line.text);
    if (place >= 0) kept.splice(place, 1);
    return place < 0;
  });
  return Array.from({ length: Math.max(gone.length, kept.length) }, (_, place) => differing(gone[place], kept[place])).flat();
}

function differing(before: Line | undefined, after: Line | undefined): Difference[] {
  const line = after ?? before;
  if (line === undefined || before?.text === after?.text) return [];
  return [{ path: line.path, label: line.label, before: before?.text ?? null, after: after?.text ?? null }];
}

/** What one field says: nothing, a line, or several. */
function linesOf(field: FactField, value: Json, nameOf: NameOf): Line[] {
  if (value === null || value === undefined) return [];
  if (field.control === 'rows' && Array.isArray(value)) {
    return value.map((row: Json, place) => ({ path: [field.key, place], label: `${field.label}, ${place + 1}`, text: sayRow(field.columns, row, nameOf) }));
  }
  if (field.control === 'cipher' && isRecord(value)) return cipherLines([field.key], value);
  const text = say(field, value, nameOf);
  return text === '' ? [] : [{ path: [field.key], label: field.label, text }];
}

function sayRow(columns: readonly FactField[], row: Json, nameOf: NameOf): string {
  if (!isRecord(row)) return asSent(row);
  return columns
    .flatMap((column) => {
      const value = row[column.key];
      return value === null || value === undefined || value === '' ? [] : [say(column, value, nameOf)];
    })
    .join(': ');
}

function say(field: FactField, value: Json, nameOf: NameOf): string {
  switch (field.control) {
    case 'choice':
      return field.choices.find((choice) => choice.value === value)?.label ?? asSent(value);
    case 'yes-no':
      return value === true ? 'Yes' : value === false ? 'No' : asSent(value);
    case 'number':
      return typeof value === 'number' && field.unit ? `${value} ${field.unit}` : asSent(value);
    case 'fact':
    case 'account':
      return typeof value === 'string' ? (nameOf(value) ?? 'not in the catalogue') : asSent(value);
    case 'days':
      return saySpan(value, sayDay, 'always');
    case 'numbers':
      return saySpan(value, asSent, 'every number');
    case 'counts': {
      const span = saySpan(value, asSent, '');
      return field.unit === '' || span === '' ? span : `${span} ${field.unit}`;
    }
    case 'line':
    case 'prose':
    case 'whole':
    case 'rows':
    case 'cipher':
      return asSent(value);
  }
}

/** `{ from, to }`, an open end as "on" or "up to". */
function saySpan(value: Json, sayEnd: (end: Json) => string, open: string): string {
  if (!isRecord(value)) return asSent(value);
  const ends = [value['from'], value['to']].map((end) => (end === null || end === undefined || end === '' ? null : sayEnd(end)));
  const [from = null, to = null] = ends;
  if (from === null) return to === null ? open : `up to ${to}`;
  if (to === null) return `${from} on`;
  return from === to ? from : `${from} to ${to}`;
}

const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];

function sayDay(iso: Json): string {
  const day = typeof iso === 'string' ? parseDay(iso) : undefined;
  if (!day?.ok) return asSent(iso);
  const { year, month, day: ofMonth } = civilOf(day.value);
  return `${ofMonth} ${MONTHS[month - 1] ?? ''} ${year}`;
}

/** A cipher's definition: the layout, each set of symbols, the days in use and each exception. */
function cipherLines(path: Path, definition: Payload): Line[] {
  const lines: Line[] = [];
  const add = (more: Path, label: string, text: string): void => {
    if (text !== '') lines.push({ path: [...path, ...more], label, text });
  };
  const { fields, symbolSets, yearStart, usedFrom, usedTo, exceptions } = definition;
  add(['fields'], 'Layout', Array.isArray(fields) ? fields.map(sayCipherField).join(', ') : asSent(fields));
  if (isRecord(symbolSets)) {
    for (const [name, set] of Object.entries(symbolSets)) add(['symbolSets', name], `Symbols “${name}”`, saySymbols(set));
  }
  if (yearStart !== undefined) add(['yearStart'], 'Year begins', asSent(yearStart));
  add(['usedFrom'], 'In use from', sayDay(usedFrom));
  add(['usedTo'], 'In use to', usedTo === null ? 'still in use' : sayDay(usedTo));
  if (Array.isArray(exceptions)) {
    for (const [place, exception] of exceptions.entries()) add(['exceptions', place], `Exception ${place + 1}`, sayException(exception));
  }
  return lines;
}

function sayCipherField(field: Json): string {
  if (!isRecord(field)) return asSent(field);
  if (field['field'] === 'literal') return `“${asSent(field['text'])}”`;
  const { field: name, symbols, width, week } = field;
  const wide = Array.isArray(width) ? width.map(asSent).join(' or ') : asSent(width);
  return `${asSent(field['name'] ?? name)} (${wide}, ${asSent(symbols)}${week === undefined ? '' : `, ${asSent(week)} weeks`})`;
}

function saySymbols(set: Json): string {
  if (!isRecord(set) || !isRecord(set['symbols'])) return asSent(set);
  const pairs = Object.entries(set['symbols']).map(([symbol, value]) => `${symbol} = ${Array.isArray(value) ? value.map(asSent).join(' or ') : asSent(value)}`);
  const repeater = set['repeater'] === undefined ? [] : [`${asSent(set['repeater'])} repeats the one before`];
  const cycle = set['repeatsEvery'] === undefined ? [] : [`again every ${asSent(set['repeatsEvery'])}`];
  return [...pairs, ...repeater, ...cycle].join(', ');
}

function sayException(exception: Json): string {
  if (!isRecord(exception)) return asSent(exception);
  const { fields, replaces } = exception;
  const said = isRecord(fields) ? Object.entries(fields).map(([name, symbol]) => `${name} ${asSent(symbol)}`).join(', ') : asSent(fields);
  return `${said} stands for ${saySpan(exception, sayDay, '')}${replaces === true ? ', and for nothing else' : ''}`;
}

function asSent(value: Json): string {
  if (typeof value === 'string') return value;
  return value === undefined ? '' : JSON.stringify(value);
}

function isRecord(value: Json): value is Payload {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}
