import { useQuery } from '@tanstack/react-query';
import { listPartTypes } from '#contract/part-types.ts';
import { partTypesList } from '../../features/part-types/part-types-queries.ts';
import { PartTypesTable } from '../../features/part-types/part-types-table.tsx';
import type { PartTypeItem } from '../../features/part-types/part-types-table.tsx';
import { OrderFilter, TextFilter } from './list-filters.tsx';
import { ListPage } from './list-page.tsx';
import { useListSearch } from './use-list-search.ts';

const ORDERS = [
  { value: 'name', text: 'name' },
  { value: '-name', text: 'name, last first' },
] as const;

export function Component() {
  const { query, params, narrowed, change } = useListSearch(listPartTypes.query);
  const state = useQuery(partTypesList(query));
  return (
    <ListPage<PartTypeItem>
      title="Part types"
      noun={['part type', 'part types']}
      below="What a casting is, whoever made it."
      {...{ state, params, narrowed }}
      filters={
        <>
          <TextFilter label="Name" value={query.q ?? ''} onChange={(q) => change({ q })} />
          <OrderFilter value={query.sort} orders={ORDERS} onChange={(sort) => change({ sort })} />
        </>
      }
      aside={<p>No number left on it? Start from what it is, and go by the tells of each casting.</p>}
      table={(rows, stale) => <PartTypesTable {...{ rows, stale }} />}
      empty="Cylinder blocks, flywheels, beds and the rest will stand here."
    />
  );
}
