import type { FieldFault } from '#contract/problem.ts';
import type { FactKind } from '#domain/vocabulary.ts';
import { kindModule } from '#server/services/kinds/all-kinds.ts';
import type { Refusals } from '#server/services/kinds/kind-module.ts';
import { ProblemError } from '#server/services/problem-error.ts';

/** What holds of the facts of every kind. Paths begin where a contribution does. */
const OF_EVERY_KIND: Readonly<Record<string, FieldFault>> = {
  fact_sources_key: { path: ['citations'], message: 'A source stands there twice, for the same field and place' },
  facts_have_a_source: { path: ['citations'], message: 'At least one source' },
};

/** SQLSTATEs of a row the rules of the schema refuse, and of a value its column can't hold. */
const REFUSED = /^(?:23|22)/;

/** What it means that the database refused a fact's row; nothing where something else went wrong. */
export function refusalOf(error: unknown, kind: FactKind): FieldFault | undefined {
  const { code, constraint } = nativeOf(error);
  if (code === undefined || !REFUSED.test(code)) return undefined;
  const refusals: Refusals = kindModule(kind).refusals;
  const ofKind = constraint === undefined ? undefined : refusals[constraint];
  if (ofKind) return { path: ['payload', ...ofKind.path], message: ofKind.message };
  const ofEvery = constraint === undefined ? undefined : OF_EVERY_KIND[constraint];
  return ofEvery ?? { path: ['payload'], message: 'The rest of the catalogue says otherwise' };
}

/**
 * Runs what writes a fact.
 *
 * @throws ProblemError `conflict`, by path, where the database refuses it; whatever else went wrong as it is.
 */
export async function requireAccepted<Answer>(kind: FactKind, write: () => Promise<Answer>): Promise<Answer> {
  try {
    return await write();
  } catch (cause) {
    const refusal = refusalOf(cause, kind);
    if (!refusal) throw cause;
    throw new ProblemError('conflict', `It cannot stand beside what is in the catalogue: ${refusal.message}.`, { errors: [refusal], cause });
  }
}

/** The driver's error within what the query builder made of it. */
export function nativeOf(error: unknown): { readonly code?: string; readonly constraint?: string; readonly table?: string } {
  if (!(error instanceof Error)) return {};
  const native: object = 'nativeError' in error && error.nativeError instanceof Error ? error.nativeError : error;
  const text = (name: string): Readonly<Record<string, string>> => {
    const value: unknown = Object.entries(native).find(([key]) => key === name)?.[1];
    return typeof value === 'string' ? { [name]: value } : {};
  };
  return { ...text('code'), ...text('constraint'), ...text('table') };
}
