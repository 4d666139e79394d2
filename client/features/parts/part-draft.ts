import { z } from 'zod';
import { faultsOf } from '#contract/faults.ts';
import { changePart, recordPart } from '#contract/parts.ts';
import type { PartForm, PartPage } from '#contract/parts.ts';
import type { FieldFault } from '#contract/problem.ts';
import { parseReading } from '#domain/marks/reading.ts';
import { capital } from '../../lib/say-number.ts';

const Chosen = z.object({ id: z.string(), title: z.string() }).nullable();

/** What is typed of a part. Entries of the catalogue are kept with their names, so that a reload shows them at once. */
export const PartDraft = z.object({
  partType: Chosen,
  called: z.string(),
  maker: Chosen,
  /** The casting number as read; only of a new part: later it is a mark of its own. */
  number: z.string(),
  foundModel: Chosen,
  foundSerial: z.string(),
  condition: z.string(),
  note: z.string(),
  visibility: z.enum(['private', 'public']),
  photoIds: z.array(z.string()),
});
export type PartDraft = z.infer<typeof PartDraft>;

export const NEW_PART: PartDraft = {
  partType: null,
  called: '',
  maker: null,
  number: '',
  foundModel: null,
  foundSerial: '',
  condition: '',
  note: '',
  visibility: 'private',
  photoIds: [],
};

/** What the boxes are called, on the form and in the summary of what is wrong with it. */
export const FIELD_LABELS: Readonly<Record<keyof PartForm | 'number', string>> = {
  photoIds: 'Photos',
  partTypeId: 'Part type',
  called: 'In your own words',
  makerId: 'Maker',
  number: 'Casting number',
  foundModelId: 'Found on model',
  foundSerial: 'Its serial',
  condition: 'Condition',
  note: 'Note for yourself',
  visibility: 'Who sees it',
};

/** A part as it stands, to be changed. */
export function draftOfPart(part: PartPage): PartDraft {
  const { partTypeId, partType, makerId, maker, foundOn } = part;
  return {
    partType: choiceOf(partTypeId, partType?.name),
    called: part.called ?? '',
    maker: choiceOf(makerId, maker?.name),
    number: '',
    foundModel: choiceOf(foundOn?.modelId ?? null, foundOn?.model?.name),
    foundSerial: foundOn?.serial ?? '',
    condition: part.condition ?? '',
    note: part.note ?? '',
    visibility: part.visibility === 'public' ? 'public' : 'private',
    photoIds: part.photos.map(({ id }) => id),
  };
}

function choiceOf(id: string | null, name: string | undefined): PartDraft['partType'] {
  return id === null ? null : { id, title: name ?? 'An entry the register no longer has' };
}

function formOf(draft: PartDraft): PartForm {
  return {
    partTypeId: draft.partType?.id ?? null,
    called: orNull(draft.called),
    makerId: draft.maker?.id ?? null,
    foundModelId: draft.foundModel?.id ?? null,
    foundSerial: orNull(draft.foundSerial),
    condition: orNull(draft.condition),
    note: orNull(draft.note),
    visibility: draft.visibility,
    photoIds: draft.photoIds,
  };
}

function orNull(text: string): string | null {
  const trimmed = text.trim();
  return trimmed === '' ? null : trimmed;
}

type Checked<Body> = { readonly ok: true; readonly body: Body } | { readonly ok: false; readonly faults: readonly FieldFault[] };

/** What the register is asked to put on record; or what is wrong with it, before it is asked. */
export function newPartOf(draft: PartDraft): Checked<z.output<typeof recordPart.body>> {
  const number = orNull(draft.number);
  const reading = number === null ? null : parseReading(number);
  const own: FieldFault[] = reading === null || reading.ok ? [] : [{ path: ['number'], message: capital(reading.fault.message) }];
  const parsed = recordPart.body.safeParse({ ...formOf(draft), number });
  if (parsed.success && own.length === 0) return { ok: true, body: parsed.data };
  return { ok: false, faults: [...own, ...(parsed.success ? [] : faultsOf(parsed.error))] };
}

export function changedPartOf(draft: PartDraft, revision: number): Checked<z.output<typeof changePart.body>> {
  const parsed = changePart.body.safeParse({ ...formOf(draft), revision });
  return parsed.success ? { ok: true, body: parsed.data } : { ok: false, faults: faultsOf(parsed.error) };
}

/** What somebody, or another window, changed between two states of a part: the box, and what it says now. */
export function changesBetween(before: PartDraft, now: PartDraft): readonly { readonly label: string; readonly now: string }[] {
  const said = (draft: PartDraft): readonly (readonly [keyof typeof FIELD_LABELS, string])[] => [
    ['photoIds', draft.photoIds.length === 1 ? 'one photo' : `${draft.photoIds.length} photos`],
    ['partTypeId', draft.partType?.title ?? ''],
    ['called', draft.called],
    ['makerId', draft.maker?.title ?? ''],
    ['foundModelId', draft.foundModel?.title ?? ''],
    ['foundSerial', draft.foundSerial],
    ['condition', draft.condition],
    ['note', draft.note],
    ['visibility', draft.visibility],
  ];
  const earlier = new Map(said(before));
  const samePhotos = before.photoIds.join() === now.photoIds.join();
  return said(now)
    .filter(([field, text]) => (field === 'photoIds' ? !samePhotos : earlier.get(field) !== text))
    .map(([field, text]) => ({ label: FIELD_LABELS[field], now: text === '' ? 'left open' : text }));
}
