import type { z } from 'zod';
import { Citations } from '#contract/citations.ts';
import { saveContribution } from '#contract/contributions.ts';
import type { LoosePayload } from '#contract/contributions.ts';
import { faultsOf } from '#contract/faults.ts';
import { formOf } from '#contract/kinds.ts';
import type { FactField } from '#contract/kinds/kind.ts';
import type { FieldFault } from '#contract/problem.ts';
import type { FactKind } from '#domain/vocabulary.ts';
import { objectOf } from './draft-values.ts';
import type { Draft, Path } from './draft-values.ts';
import { fieldsOfSource, kindOfSource } from './source-fields.ts';

/**
 * Everything the contract finds wrong with a draft, by path as the register tells it (`payload.number`, `citations.0.locator`). `told` are
 * the register's own findings at the last saving: they count for a part of the draft (payload, citations) whose shape is right.
 */
export function draftFaults(kind: FactKind, draft: Draft, told: readonly FieldFault[]): readonly FieldFault[] {
  const own = [
    ...faultsIn(formOf(kind).payload, draft.payload, 'payload'),
    ...faultsIn(Citations, draft.citations, 'citations'),
    ...faultsIn(saveContribution.body.shape.note, draft.note, 'note'),
  ];
  const parts = new Set(own.map(({ path }) => path[0]));
  return [...own, ...told.filter(({ path }) => !parts.has(path[0] ?? ''))];
}

function faultsIn(schema: z.ZodType, value: unknown, name: string): FieldFault[] {
  const parsed = schema.safeParse(value, { error: sayIssue });
  if (parsed.success) return [];
  // Of a box left blank, how it should have been written is not the first thing to say.
  return faultsOf(parsed.error).map(({ path, message }) => ({ path: [name, ...path], message: valueAt(value, path) === '' ? 'Missing' : message }));
}

function valueAt(value: unknown, path: Path): unknown {
  return path.reduce<unknown>((inner, step) => (typeof inner === 'object' && inner !== null ? Object.entries(inner).find(([name]) => name === String(step))?.[1] : undefined), value);
}

/** Words for what a schema has none of its own for. */
function sayIssue(issue: z.core.$ZodRawIssue): string {
  const isMissing = issue.input === undefined || issue.input === null;
  switch (issue.code) {
    case 'invalid_type':
      return isMissing ? 'Missing' : issue.expected === 'int' ? 'A whole number' : issue.expected === 'number' ? 'A number' : 'This can’t stand here';
    case 'invalid_value':
      return 'Choose one';
    case 'invalid_format':
      return isMissing ? 'Missing' : 'This is not written as it should be';
    case 'too_small':
      return issue.origin === 'string' ? 'Missing' : `At least ${String(issue.minimum)}`;
    case 'too_big':
      return issue.origin === 'string' ? `At most ${String(issue.maximum)} characters` : `At most ${String(issue.maximum)}`;
    case 'not_multiple_of':
      return `In steps of ${String(issue.divisor)}`;
    case 'custom':
    case 'invalid_element':
    case 'invalid_key':
    case 'invalid_union':
    case 'unrecognized_keys':
      return 'This can’t stand here';
  }
}

/** The id of the control at a path of the draft. There is one draft on a page. */
export function controlId(path: Path): string {
  return ['draft', ...path].join('-');
}

export type DraftControl = { readonly id: string; readonly label: string };

/** The control a fault is about, for a summary to point to; null for one of the whole. */
export function controlOf(kind: FactKind, draft: Draft, path: Path): DraftControl | null {
  const [part, at, ...rest] = path;
  if (part === 'note') return { id: controlId(['note']), label: 'To the moderators' };
  if (part === 'payload') {
    const field = formOf(kind).fields.find(({ key }) => key === at);
    return field === undefined ? null : within(field, ['payload', field.key], rest);
  }
  if (part === 'citations') return typeof at === 'number' ? ofCitation(at, draft.citations[at] ?? {}, rest) : { id: controlId(['citations']), label: 'Sources' };
  return null;
}

function within(field: FactField, base: Path, rest: Path): DraftControl {
  switch (field.control) {
    case 'days':
    case 'numbers':
    case 'counts':
      return ofSpan(field, base, rest[0]);
    case 'rows': {
      const [place, key, ...inner] = rest;
      const column = field.columns.find((one) => one.key === key);
      if (typeof place !== 'number' || column === undefined) return { id: controlId(base), label: field.label };
      const { id, label } = within(column, [...base, place, column.key], inner);
      return { id, label: `${field.label}, ${place + 1}: ${label.toLowerCase()}` };
    }
    case 'line':
    case 'prose':
    case 'number':
    case 'whole':
    case 'yes-no':
    case 'choice':
    case 'fact':
    case 'account':
    case 'cipher':
      return { id: controlId(base), label: field.label };
  }
}

/** A fault of the span as a whole points to its first box. */
function ofSpan({ label, control }: FactField, base: Path, end: Path[number] | undefined): DraftControl {
  const [first, last] = control === 'counts' ? ['least', 'most'] : ['first', 'last'];
  if (end === 'to') return { id: controlId([...base, 'to']), label: `${label}, ${last}` };
  return { id: controlId([...base, 'from']), label: end === 'from' ? `${label}, ${first}` : label };
}

const CITATION_LABELS: Readonly<Record<string, string>> = { sourceId: 'source', field: 'stands behind', locator: 'where in it', note: 'remark' };

function ofCitation(place: number, citation: LoosePayload, [key, inner, ...rest]: Path): DraftControl {
  const name = `Source ${place + 1}`;
  const source = objectOf(citation['newSource']);
  if (key === 'newSource' && source !== null) {
    const field = fieldsOfSource(kindOfSource(source)).find((one) => one.key === inner);
    if (field !== undefined) {
      const { id, label } = within(field, ['citations', place, 'newSource', field.key], rest);
      return { id, label: `${name}, ${label.toLowerCase()}` };
    }
  }
  const own = typeof key === 'string' && key in CITATION_LABELS ? key : 'sourceId';
  return { id: controlId(['citations', place, own]), label: `${name}, ${CITATION_LABELS[own] ?? own}` };
}
