import { formOf } from '#contract/kinds.ts';
import type { PayloadOf } from '#contract/kinds.ts';
import { faultsOf } from '#contract/faults.ts';
import type { FieldFault } from '#contract/problem.ts';
import { fail, succeed } from '#domain/result.ts';
import type { Result } from '#domain/result.ts';
import type { FactKind } from '#domain/vocabulary.ts';

/** What a payload says as its kind's form has it, or every fault of it by path in the payload. */
export function parsePayload<K extends FactKind>(kind: K, payload: unknown): Result<PayloadOf<K>, readonly FieldFault[]> {
  const parsed = formOf(kind).payload.safeParse(payload);
  if (!parsed.success) return fail(faultsOf(parsed.error));
  // It was parsed by this kind's own schema; that its output is this kind's, the compiler cannot follow through the list.
  return succeed(parsed.data as PayloadOf<K>);
}
