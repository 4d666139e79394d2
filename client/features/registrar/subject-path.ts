import type { AuditRow } from '#contract/admin.ts';
import { FACT_KINDS } from '#domain/vocabulary.ts';
import { paths } from '../../lib/paths.ts';

type Subject = Pick<NonNullable<AuditRow['subject']>, 'kind' | 'id'>;

/** Where what an act was done to stands: a member, a contribution, a fact by its history; null for what has no page. */
export function pathOfSubject({ kind, id }: Subject): string | null {
  if (kind === 'member') return paths.registrarMember(id);
  if (kind === 'contribution') return paths.contribution(id);
  return FACT_KINDS.some((one) => one === kind) ? paths.factHistory(id) : null;
}
