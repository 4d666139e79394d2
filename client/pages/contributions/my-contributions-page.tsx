import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { listMyContributions } from '#contract/contributions.ts';
import type { ContributionItem } from '#contract/contributions.ts';
import { formOf, KINDS } from '#contract/kinds.ts';
import type { Me } from '#contract/people.ts';
import { CONTRIBUTION_STATES } from '#domain/vocabulary.ts';
import { STATE_WORDS } from '../../features/contributions/contribution-words.ts';
import { myContributionsList } from '../../features/contributions/contributions-queries.ts';
import { SignedInOnly } from '../../features/people/signed-in-only.tsx';
import { paths } from '../../lib/paths.ts';
import { sayMoment } from '../../lib/say-date.ts';
import { DataTable } from '../../ui/data-table.tsx';
import { ChoiceFilter } from '../catalogue/list-filters.tsx';
import { ListPage } from '../catalogue/list-page.tsx';
import { useListSearch } from '../catalogue/use-list-search.ts';

const STATE_CHOICES = CONTRIBUTION_STATES.map((state) => ({ value: state, text: STATE_WORDS[state] }));
const KIND_CHOICES = Object.values(KINDS).map(({ kind, name }) => ({ value: kind, text: name.toLowerCase() }));

export function Component() {
  return <SignedInOnly title="Your contributions">{(viewer) => <Mine viewer={viewer} />}</SignedInOnly>;
}

function Mine({ viewer }: { readonly viewer: Me }) {
  const { query, params, narrowed, change } = useListSearch(listMyContributions.query);
  const state = useQuery(myContributionsList(query));
  return (
    <ListPage<ContributionItem>
      title="Your contributions"
      noun={['contribution', 'contributions']}
      above={<Link to={paths.contribute()}>Contribute</Link>}
      below="What you drafted and put forward, and what became of it."
      {...{ state, params, narrowed }}
      filters={
        <>
          <ChoiceFilter label="State" value={query.state} choices={STATE_CHOICES} all="any state" onChange={(wanted) => change({ state: wanted })} />
          <ChoiceFilter label="Kind" value={query.kind} choices={KIND_CHOICES} all="any kind" onChange={(kind) => change({ kind })} />
        </>
      }
      aside={
        <p>
          What was entered stands, for everybody, on <Link to={paths.contributor(viewer.id)}>the page of what you gave</Link>.
        </p>
      }
      table={(rows, stale) => (
        <DataTable
          caption="Your contributions"
          rows={rows}
          stale={stale}
          rowKey={({ id }) => id}
          columns={[
            { key: 'title', header: 'Contribution', rowHeader: true, cell: (item) => <Link to={placeOf(item)}>{item.title}</Link> },
            { key: 'kind', header: 'kind', cell: ({ kind }) => formOf(kind).name.toLowerCase() },
            { key: 'state', header: 'state', cell: ({ state: now }) => STATE_WORDS[now] },
            { key: 'changed', header: 'last changed', cell: ({ changedAt }) => sayMoment(changedAt) },
          ]}
        />
      )}
      advice="Take one filter away."
      empty="What you draft and put forward will stand here. Begin under “Contribute”, or on the page of an entry that you know better."
    />
  );
}

/** A draft goes on where it is written; the rest is read. */
function placeOf({ id, state }: ContributionItem): string {
  return state === 'drafted' ? paths.contributionDraft(id) : paths.contribution(id);
}
