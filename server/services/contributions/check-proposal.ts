import type { Knex } from 'knex';
import { Citations } from '#contract/citations.ts';
import type { Citation } from '#contract/citations.ts';
import { faultsOf } from '#contract/faults.ts';
import { formOf } from '#contract/kinds.ts';
import type { PayloadOf } from '#contract/kinds.ts';
import type { FieldFault } from '#contract/problem.ts';
import { FactName } from '#db/models/fact-name.ts';
import { Source } from '#db/models/source.ts';
import { fail, succeed } from '#domain/result.ts';
import type { Result } from '#domain/result.ts';
import type { FactKind } from '#domain/vocabulary.ts';
import { refusalOf } from '#server/services/facts/refusal-of.ts';
import { writeVersion } from '#server/services/facts/write-version.ts';
import type { NewVersion } from '#server/services/facts/write-version.ts';
import { parsePayload } from '#server/services/kinds/parse-payload.ts';

/** What a draft would have the catalogue say, as it was typed. */
export type Draft<K extends FactKind = FactKind> = {
  readonly kind: K;
  /** The fact it changes; `null`: a new one. */
  readonly subjectId: string | null;
  readonly authorId: string;
  readonly payload: unknown;
  readonly citations: unknown;
};

/** The same once nothing stands in its way. */
export type Checked<K extends FactKind> = { readonly payload: PayloadOf<K>; readonly citations: readonly Citation[] };

/**
 * Checks a draft as far as it goes: that it is as its kind's form has it, then that what it refers to is there, then that the catalogue
 * would take it, which is tried and undone. Paths begin with `payload` or `citations`.
 */
export async function checkProposal<K extends FactKind>(draft: Draft<K>, knex: Knex): Promise<Result<Checked<K>, readonly FieldFault[]>> {
  const payload = parsePayload(draft.kind, draft.payload);
  const citations = Citations.safeParse(draft.citations);
  const faults = [
    ...(payload.ok ? [] : within('payload', payload.fault)),
    ...(citations.success ? [] : within('citations', faultsOf(citations.error))),
  ];
  if (!payload.ok || !citations.success) return fail(faults);

  const checked = { payload: payload.value, citations: citations.data };
  const missing = [
    ...within('payload', await faultsOfReferences(draft.kind, checked.payload, knex)),
    ...within('citations', await faultsOfSources(checked.citations, knex)),
  ];
  if (missing.length > 0) return fail(missing);
  const refused = await rehearse(draft, checked, knex);
  return refused ? fail([refused]) : succeed(checked);
}

function within(part: 'payload' | 'citations', faults: readonly FieldFault[]): FieldFault[] {
  return faults.map(({ path, message }) => ({ path: [part, ...path], message }));
}

/** Fields of the form that name a fact, and name none of their kind. */
async function faultsOfReferences(kind: FactKind, payload: object, knex: Knex): Promise<FieldFault[]> {
  const values = new Map<string, unknown>(Object.entries(payload));
  const references = formOf(kind).fields.flatMap((field) => {
    const id = values.get(field.key);
    return field.control === 'fact' && typeof id === 'string' ? [{ key: field.key, of: field.of, id }] : [];
  });
  if (references.length === 0) return [];
  const known = await FactName.query(knex).whereIn('id', references.map(({ id }) => id));
  return references
    .filter(({ id, of }) => !known.some((fact) => fact.id === id && fact.kind === of))
    .map(({ key, of }) => ({ path: [key], message: `No ${formOf(of).name.toLowerCase()} of this id is in the catalogue` }));
}

async function faultsOfSources(citations: readonly Citation[], knex: Knex): Promise<FieldFault[]> {
  const ids = citations.flatMap(({ sourceId }) => sourceId ?? []);
  const known = new Set((await Source.query(knex).findByIds(ids)).map(({ id }) => id));
  return citations.flatMap(({ sourceId }, place) =>
    sourceId === null || known.has(sourceId) ? [] : [{ path: [place, 'sourceId'], message: 'No source of this id is on record' }],
  );
}

/** Thrown to undo what was only tried. */
const TRIED = new Error('Only tried');

/** Writes what would be entered and undoes it, so that every rule of the database is asked and none is told twice. */
async function rehearse<K extends FactKind>(
  { kind, subjectId, authorId }: Draft<K>,
  { payload, citations }: Checked<K>,
  knex: Knex,
): Promise<FieldFault | undefined> {
  const entry: NewVersion<K> = {
    kind,
    factId: subjectId,
    payload,
    citations,
    enteredById: authorId,
    decidedById: null,
    reason: 'Tried',
    contributionId: null,
    broughtBack: null,
  };
  try {
    await knex.transaction(async (trx) => {
      await writeVersion(entry, trx);
      await trx.raw('set constraints all immediate');
      throw TRIED;
    });
  } catch (error) {
    const refusal = refusalOf(error, kind);
    if (error !== TRIED && !refusal) throw error;
    return refusal;
  }
  return undefined;
}
