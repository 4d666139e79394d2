import { z } from 'zod';
import { AuditAct } from '#contract/admin.ts';
import type { AuditRow } from '#contract/admin.ts';
import type { AuditEntryOnRecord } from '#server/services/audit/list-audit.ts';

const Detail = z.record(z.string(), z.json());

export function presentAuditRow({ row, subjectName }: AuditEntryOnRecord): AuditRow {
  const { id, at, act, actor, subjectKind, subjectId, detail, requestId } = row;
  return {
    id,
    at,
    act: AuditAct.parse(act),
    actor: actor ? { id: actor.id, displayName: actor.displayName } : null,
    // What has no name is called by its id.
    subject: subjectKind === null || subjectId === null ? null : { kind: subjectKind, id: subjectId, name: subjectName ?? subjectId },
    detail: Detail.parse(detail),
    requestId,
  };
}
