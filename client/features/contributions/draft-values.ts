import type { LoosePayload } from '#contract/contributions.ts';
import type { FactField } from '#contract/kinds/kind.ts';

/** Anything a draft may hold at one place. */
export type Value = LoosePayload[string];
export type Path = readonly (string | number)[];

/** What a contribution says while it is written: payload, sources and the word to the moderators, whole or half. */
export type Draft = { readonly payload: LoosePayload; readonly citations: readonly LoosePayload[]; readonly note: string | null };

/** What a field holds before anybody touched it. */
export function blankOf(field: FactField): Value {
  switch (field.control) {
    case 'yes-no':
      return false;
    case 'rows':
      return [];
    case 'numbers':
      return field.open === 'both' ? { from: null, to: null } : { from: '', to: null };
    case 'days':
      return field.open ? null : { from: '', to: '' };
    case 'line':
      return field.blank ?? (field.optional ? null : '');
    case 'prose':
      return field.optional ? null : '';
    case 'whole':
      return '';
    case 'number':
    case 'choice':
    case 'counts':
    case 'fact':
    case 'account':
    case 'cipher':
      return null;
  }
}

export function blankPayload(fields: readonly FactField[]): LoosePayload {
  return Object.fromEntries(fields.map((field) => [field.key, blankOf(field)]));
}

/** The text of a box; nothing where something else is held. */
export function textOf(value: Value | undefined): string {
  return typeof value === 'string' ? value : typeof value === 'number' ? String(value) : '';
}

/** The two ends of a span. */
export function endsOf(value: Value | undefined): { readonly from: Value; readonly to: Value } {
  const ends = objectOf(value);
  return { from: ends?.['from'] ?? null, to: ends?.['to'] ?? null };
}

export function rowsOf(value: Value | undefined): readonly LoosePayload[] {
  return Array.isArray(value) ? value.map((row) => objectOf(row) ?? {}) : [];
}

export function objectOf(value: Value | undefined): LoosePayload | null {
  return typeof value === 'object' && value !== null && !Array.isArray(value) ? value : null;
}

export function isBlank(value: Value | undefined): boolean {
  if (value === undefined || value === null || value === '') return true;
  if (Array.isArray(value)) return value.length === 0;
  return typeof value === 'object' && Object.values(value).every(isBlank);
}

/** Whether two values say the same, in whatever order their names stand. */
export function isSame(one: Value | undefined, other: Value | undefined): boolean {
  if (Array.isArray(one) && Array.isArray(other)) return one.length === other.length && one.every((value, place) => isSame(value, other[place]));
  const [first, second] = [objectOf(one), objectOf(other)];
  if (first === null || second === null) return one === other;
  return [...new Set([...Object.keys(first), ...Object.keys(second)])].every((name) => isSame(first[name], second[name]));
}

export function isSameDraft(one: Draft, other: Draft): boolean {
  return isSame(one.payload, other.payload) && isSame([...one.citations], [...other.citations]) && one.note === other.note;
}
