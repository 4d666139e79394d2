import type { Knex } from 'knex';
import type { AuditAct } from '#contract/admin.ts';
import type { Contribution } from '#db/models/contribution.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';

type Act = Extract<AuditAct, `contribution.${string}`>;
type Doer = { readonly actorId: string; readonly requestId: string };

/** Writes down what was done with a contribution; `more` is what only that act has to tell. */
export async function writeContributionAudit(
  act: Act,
  { id, kind, subjectId, revision }: Pick<Contribution, 'id' | 'kind' | 'subjectId' | 'revision'>,
  { actorId, requestId }: Doer,
  trx: Knex.Transaction,
  more: Readonly<Record<string, string | number | null>> = {},
): Promise<void> {
  const detail = { contributionId: id, kind, factId: subjectId, revision, ...more };
  await writeAudit({ act, actorId, subject: { kind: 'contribution', id }, detail, requestId }, trx);
}
