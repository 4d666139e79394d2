import type { Knex } from 'knex';
import { v7 as uuidV7 } from 'uuid';
import type { AuditAct } from '#contract/admin.ts';
import { AuditRow } from '#db/models/audit-row.ts';

type Json = null | boolean | number | string | readonly Json[] | { readonly [name: string]: Json };

export type AuditEntry = {
  readonly act: AuditAct;
  /** `null`: nobody was signed in, or it was done at the server. */
  readonly actorId: string | null;
  readonly subject: { readonly kind: string; readonly id: string } | null;
  /** More, in plain values; never a secret, and no name or address of anybody: the trail outlives them. */
  readonly detail?: Readonly<Record<string, Json>>;
  readonly requestId: string | null;
};

/** Writes down an act in the transaction that does it, so that there is never one without the other. */
export async function writeAudit({ act, actorId, subject, detail = {}, requestId }: AuditEntry, trx: Knex.Transaction): Promise<void> {
  await AuditRow.query(trx).insert({
    id: uuidV7(),
    act,
    actorId,
    subjectKind: subject?.kind ?? null,
    subjectId: subject?.id ?? null,
    detail,
    // A request that came without a sane id was given one; a blank is no id.
    requestId: requestId === '' ? null : requestId,
  });
}
