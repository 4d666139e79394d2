import type { Knex } from 'knex';
import type { MEMBER_STATES } from '#contract/admin.ts';
import type { Role } from '#contract/people.ts';
import { requireRegistrar } from '#server/policies/staff.ts';
import type { Viewer } from '#server/policies/viewer.ts';
import { listPage } from '#server/services/list-page.ts';
import type { ListRequest, Order, Page } from '#server/services/list-page.ts';
import { matchText } from '#server/services/search.ts';
import { loadMembers } from './load-members.ts';
import type { MemberOnRecord } from './load-members.ts';

const ORDERS = {
  name: { keys: [{ column: 'members.displayName', as: 'text' }], direction: 'asc' },
  '-joined': { keys: [{ column: 'members.joinedAt', as: 'instant' }], direction: 'desc' },
} as const satisfies Record<string, Order>;

type MemberState = (typeof MEMBER_STATES)[number];

export type MemberListing = ListRequest<keyof typeof ORDERS> & {
  readonly q?: string | undefined;
  readonly role?: Role | undefined;
  readonly state?: MemberState | undefined;
};

/**
 * Everybody who has an account or had one. Who is only named as the source of a fact is not among them.
 *
 * @throws ProblemError `not-found`, `second-factor-owed`.
 */
export async function listMembers(viewer: Viewer, request: MemberListing, knex: Knex): Promise<Page<MemberOnRecord>> {
  requireRegistrar(viewer);
  return listPage(
    {
      table: 'members',
      orders: ORDERS,
      request,
      filter: (query) => {
        const { q, role, state } = request;
        void query.where((account) => void account.whereNotNull('email').orWhereNotNull('closedAt'));
        if (role) void query.where({ role });
        if (state) OF_STATE[state](query);
        if (q) matchText(query, ['displayName', 'email'], q);
      },
      load: loadMembers,
    },
    knex,
  );
}

const OF_STATE: Readonly<Record<MemberState, (query: Knex.QueryBuilder) => void>> = {
  active: (query) => void query.whereNotNull('emailVerifiedAt').whereNull('suspendedAt'),
  unverified: (query) => void query.whereNotNull('email').whereNull('emailVerifiedAt').whereNull('suspendedAt'),
  suspended: (query) => void query.whereNotNull('suspendedAt'),
  closed: (query) => void query.whereNotNull('closedAt'),
};
