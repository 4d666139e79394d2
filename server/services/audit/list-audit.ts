import type { Knex } from 'knex';
import type { AuditAct } from '#contract/admin.ts';
import { AuditRow } from '#db/models/audit-row.ts';
import { Contribution } from '#db/models/contribution.ts';
import { Flag } from '#db/models/flag.ts';
import { Member } from '#db/models/member.ts';
import { FACT_KINDS } from '#domain/vocabulary.ts';
import { requireRegistrar } from '#server/policies/staff.ts';
import type { Viewer } from '#server/policies/viewer.ts';
import { nameFacts } from '#server/services/facts/name-facts.ts';
import { listPage } from '#server/services/list-page.ts';
import type { ListRequest, Order, Page } from '#server/services/list-page.ts';
import { matchText } from '#server/services/search.ts';

const AT = [{ column: 'audit_rows.at', as: 'instant' }] as const;
const ORDERS = {
  '-at': { keys: AT, direction: 'desc' },
  at: { keys: AT, direction: 'asc' },
} as const satisfies Record<string, Order>;

export type AuditListing = ListRequest<keyof typeof ORDERS> & {
  /** Part of the name of who did it or whom it was done to, or of the request's id. */
  readonly q?: string | undefined;
  /** Ids. */
  readonly actor?: string | undefined;
  readonly subject?: string | undefined;
  readonly act?: AuditAct | undefined;
  /** Instants: from the first on, up to but without the second. */
  readonly since?: string | undefined;
  readonly until?: string | undefined;
};

export type AuditEntryOnRecord = {
  readonly row: AuditRow;
  /** What the subject is called today; `null` where it has no name. */
  readonly subjectName: string | null;
};

/**
 * The audit trail.
 *
 * @throws ProblemError `not-found`, `second-factor-owed`.
 */
export async function listAudit(viewer: Viewer, request: AuditListing, knex: Knex): Promise<Page<AuditEntryOnRecord>> {
  requireRegistrar(viewer);
  const page = await listPage(
    {
      table: 'audit_rows',
      orders: ORDERS,
      request,
      filter: (query) => narrow(query, request),
      load: (ids, trx) => AuditRow.query(trx).findByIds([...ids]).withGraphFetched('actor'),
    },
    knex,
  );
  const names = await namesOf(page.items, knex);
  return { ...page, items: page.items.map((row) => ({ row, subjectName: names.get(row.subjectId ?? '') ?? null })) };
}

function narrow(query: Knex.QueryBuilder, { q, actor, subject, act, since, until }: AuditListing): void {
  if (actor) void query.where('audit_rows.actorId', actor);
  if (subject) void query.where('audit_rows.subjectId', subject);
  if (act) void query.where('audit_rows.act', act);
  if (since) void query.where('audit_rows.at', '>=', since);
  if (until) void query.where('audit_rows.at', '<', until);
  if (q) {
    void query.leftJoin({ actors: 'members' }, 'actors.id', 'audit_rows.actorId').leftJoin({ subjects: 'members' }, 'subjects.id', 'audit_rows.subjectId');
    matchText(query, ['actors.displayName', 'subjects.displayName', 'audit_rows.requestId'], q);
  }
}

async function namesOf(rows: readonly AuditRow[], knex: Knex): Promise<ReadonlyMap<string, string>> {
  const idsOf = (isOfKind: (kind: string) => boolean): string[] => {
    const ids = rows.flatMap(({ subjectKind, subjectId }) => (subjectKind !== null && subjectId !== null && isOfKind(subjectKind) ? [subjectId] : []));
    return [...new Set(ids)];
  };
  const members = await Member.query(knex).findByIds(idsOf((kind) => kind === 'member'));
  // A draft is its author's alone.
  const contributions = await Contribution.query(knex).findByIds(idsOf((kind) => kind === 'contribution')).whereNot({ state: 'drafted' });
  const flags = await Flag.query(knex).findByIds(idsOf((kind) => kind === 'flag'));
  const facts = await nameFacts(idsOf((kind) => FACT_KINDS.some((known) => known === kind)), knex);
  return new Map([
    ...members.map(({ id, displayName }) => [id, displayName] as const),
    ...[...contributions, ...flags, ...facts.values()].map(({ id, title }) => [id, title] as const),
  ]);
}
