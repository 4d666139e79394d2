import { useQuery } from '@tanstack/react-query';
import { SOURCE_KINDS } from '#domain/vocabulary.ts';
import { listSources } from '#contract/sources.ts';
import { saySourceKind } from '../../features/sources/say-source.ts';
import { sourcesList } from '../../features/sources/sources-queries.ts';
import { SourcesTable } from '../../features/sources/sources-table.tsx';
import type { SourceItem } from '../../features/sources/sources-table.tsx';
import { ChoiceFilter, OrderFilter, TextFilter } from './list-filters.tsx';
import { ListPage } from './list-page.tsx';
import { useListSearch } from './use-list-search.ts';

const ORDERS = [
  { value: 'title', text: 'title' },
  { value: '-title', text: 'title, last first' },
] as const;
const KINDS = SOURCE_KINDS.map((kind) => ({ value: kind, text: saySourceKind(kind) }));

export function Component() {
  const { query, params, narrowed, change } = useListSearch(listSources.query);
  const state = useQuery(sourcesList(query));
  return (
    <ListPage<SourceItem>
      title="Sources"
      noun={['source', 'sources']}
      below="Where the facts are from, and which of them each stands behind."
      {...{ state, params, narrowed }}
      filters={
        <>
          <TextFilter label="Title" value={query.q ?? ''} onChange={(q) => change({ q })} />
          <ChoiceFilter label="Kind" value={query.kind} choices={KINDS} all="Any kind" onChange={(kind) => change({ kind })} />
          <OrderFilter value={query.sort} orders={ORDERS} onChange={(sort) => change({ sort })} />
        </>
      }
      aside={<p>A maker’s drawing, a plate and a member’s recollection are not worth the same. Each fact names its own.</p>}
      table={(rows, stale) => <SourcesTable {...{ rows, stale }} />}
      empty="Books, drawings, plates, photos and sightings will stand here."
    />
  );
}
