import { useQuery } from '@tanstack/react-query';
import { Link, useParams } from 'react-router-dom';
import { readContributor } from '#contract/contributions.ts';
import { formOf } from '#contract/kinds.ts';
import { NotFoundPage } from '../../app/error-page.tsx';
import { contributorPage } from '../../features/contributions/contributions-queries.ts';
import { pathOfRef } from '../../features/contributions/path-of-ref.ts';
import { paths } from '../../lib/paths.ts';
import { ProblemError } from '../../lib/problem-error.ts';
import { sayMoment } from '../../lib/say-date.ts';
import { DataTable } from '../../ui/data-table.tsx';
import { ChoiceFilter } from '../catalogue/list-filters.tsx';
import { ListPage } from '../catalogue/list-page.tsx';
import { useListSearch } from '../catalogue/use-list-search.ts';

export function Component() {
  const { id = '' } = useParams();
  return <Contributor key={id} id={id} />;
}

/** What somebody gave to the catalogue, under the name they chose. */
function Contributor({ id }: { readonly id: string }) {
  const { query, params, narrowed, change } = useListSearch(readContributor.query);
  const state = useQuery(contributorPage(id, query));
  const { data, error } = state;
  if (error instanceof ProblemError && (error.kind === 'not-found' || (error.kind === 'invalid' && error.faults.some(({ path }) => path[0] === 'id')))) return <NotFoundPage />;
  const name = data?.contributor.displayName ?? 'A contributor';
  const kinds = (data?.kinds ?? []).map(({ kind, count }) => ({ value: kind, text: `${formOf(kind).names.toLowerCase()} (${count})` }));
  return (
    <ListPage
      title={name}
      noun={['entry', 'entries']}
      below={data === undefined ? 'What they gave to the catalogue.' : `Here since ${sayMoment(data.contributor.since)}. What they gave to the catalogue.`}
      {...{ state, params, narrowed }}
      filters={<ChoiceFilter label="Kind" value={query.kind} choices={kinds} all="any kind" onChange={(kind) => change({ kind })} />}
      aside={<p>Each line is one version of an entry, with the reason that stands beside it.</p>}
      table={(rows, stale) => (
        <DataTable
          caption={`What ${name} gave`}
          rows={rows}
          stale={stale}
          rowKey={({ id: line }) => line}
          columns={[
            { key: 'fact', header: 'Entry', rowHeader: true, cell: ({ fact }) => <Link to={pathOfRef(fact)}>{fact.title}</Link> },
            { key: 'kind', header: 'kind', cell: ({ fact }) => formOf(fact.kind).name.toLowerCase() },
            {
              key: 'version',
              header: 'version',
              cell: ({ fact, version, inForce }) => (
                <span className="whitespace-nowrap">
                  <Link to={paths.factHistory(fact.id)}>{version}</Link>
                  {inForce ? ', in force' : ''}
                </span>
              ),
            },
            { key: 'entered', header: 'entered', cell: ({ enteredAt }) => <span className="whitespace-nowrap">{sayMoment(enteredAt)}</span> },
            { key: 'reason', header: 'because', cell: ({ reason }) => <span className="wrap-anywhere">{reason}</span> },
          ]}
        />
      )}
      advice="Take the filter away."
      empty="Nothing they put forward has been entered yet."
    />
  );
}
