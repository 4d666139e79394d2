import type { Knex } from 'knex';
import { z } from 'zod';
import { EnteredVersion } from '#db/models/entered-version.ts';
import { Member } from '#db/models/member.ts';
import { FACT_KINDS } from '#domain/vocabulary.ts';
import type { FactKind } from '#domain/vocabulary.ts';
import type { Viewer } from '#server/policies/viewer.ts';
import { nameFacts } from '#server/services/facts/name-facts.ts';
import type { NamedFact } from '#server/services/facts/name-facts.ts';
import { listPage } from '#server/services/list-page.ts';
import type { ListRequest, Order, Page } from '#server/services/list-page.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { matchText } from '#server/services/search.ts';

const ORDERS = {
  '-entered': { keys: [{ column: 'entered_versions.enteredAt', as: 'instant' }], direction: 'desc' },
} as const satisfies Record<string, Order>;

export type ContributorListing = ListRequest<keyof typeof ORDERS> & { readonly q?: string | undefined; readonly kind?: FactKind | undefined };

/** A version somebody gave, and the fact it is of. */
export type GivenVersion = { readonly id: string; readonly version: EnteredVersion; readonly fact: NamedFact };

export type ContributorOnRecord = {
  readonly member: Member;
  readonly given: Page<GivenVersion>;
  readonly kinds: readonly { readonly kind: FactKind; readonly count: number }[];
};

const Counts = z.array(z.object({ kind: z.string(), count: z.string() }));

/**
 * What somebody gave to the catalogue.
 *
 * @throws ProblemError `not-found` for who gave nothing, unless they look themselves: who else has an account is nobody's to know.
 */
export async function readContributor(viewer: Viewer, id: string, request: ContributorListing, knex: Knex): Promise<ContributorOnRecord> {
  const member = await Member.query(knex).findById(id);
  const kinds = await countKinds(id, knex);
  const isSelf = viewer.kind === 'member' && viewer.id === id;
  if (!member || (kinds.length === 0 && !isSelf)) throw new ProblemError('not-found', 'Nobody of this id gave anything to the catalogue.');
  const given = await listPage(
    {
      table: 'entered_versions',
      orders: ORDERS,
      request,
      filter: (query) => {
        const { q, kind } = request;
        void query.where('entered_versions.enteredById', id);
        if (kind) void query.where('entered_versions.kind', kind);
        if (q) {
          void query.leftJoin('fact_names', 'fact_names.id', 'entered_versions.factId');
          matchText(query, ['fact_names.title', 'entered_versions.reason'], q);
        }
      },
      load: loadGiven,
    },
    knex,
  );
  return { member, given, kinds };
}

async function loadGiven(ids: readonly string[], trx: Knex.Transaction): Promise<readonly GivenVersion[]> {
  const versions = await EnteredVersion.query(trx).whereIn('id', [...ids]);
  const facts = await nameFacts(versions.map(({ factId }) => factId), trx);
  return versions.flatMap((version) => {
    const fact = facts.get(version.factId);
    return fact ? [{ id: version.id, version, fact }] : [];
  });
}

async function countKinds(enteredById: string, knex: Knex): Promise<ContributorOnRecord['kinds']> {
  const rows: unknown = await knex('entered_versions').where({ enteredById }).groupBy('kind').orderBy('kind').select('kind').count({ count: '*' });
  return Counts.parse(rows).flatMap(({ kind, count }) => {
    const known = FACT_KINDS.find((one) => one === kind);
    return known ? [{ kind: known, count: Number(count) }] : [];
  });
}
