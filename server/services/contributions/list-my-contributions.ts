import type { Knex } from 'knex';
import type { ContributionState, FactKind } from '#domain/vocabulary.ts';
import { signedIn } from '#server/policies/viewer.ts';
import type { Viewer } from '#server/policies/viewer.ts';
import { listPage } from '#server/services/list-page.ts';
import type { ListRequest, Order, Page } from '#server/services/list-page.ts';
import { matchText } from '#server/services/search.ts';
import { loadContributions } from './load-contributions.ts';
import type { ContributionOnRecord } from './load-contributions.ts';

const ORDERS = {
  '-changed': { keys: [{ column: 'contributions.changedAt', as: 'instant' }], direction: 'desc' },
} as const satisfies Record<string, Order>;

export type MyContributionListing = ListRequest<keyof typeof ORDERS> & {
  readonly q?: string | undefined;
  readonly state?: ContributionState | undefined;
  readonly kind?: FactKind | undefined;
};

/**
 * The viewer's own contributions.
 *
 * @throws ProblemError `not-signed-in`.
 */
export async function listMyContributions(viewer: Viewer, request: MyContributionListing, knex: Knex): Promise<Page<ContributionOnRecord>> {
  const { id: authorId } = signedIn(viewer);
  return listPage(
    {
      table: 'contributions',
      orders: ORDERS,
      request,
      filter: (query) => {
        const { q, state, kind } = request;
        void query.where({ authorId });
        if (state) void query.where({ state });
        if (kind) void query.where({ kind });
        if (q) matchText(query, ['title'], q);
      },
      load: loadContributions,
    },
    knex,
  );
}
