import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { listMakers } from '#contract/makers.ts';
import type { MakerItem } from '#contract/makers.ts';
import { makersList } from '../../features/makers/makers-queries.ts';
import { MakersTable } from '../../features/makers/makers-table.tsx';
import { paths } from '../../lib/paths.ts';
import { OrderFilter, TextFilter } from './list-filters.tsx';
import { ListPage } from './list-page.tsx';
import { useListSearch } from './use-list-search.ts';

const ORDERS = [
  { value: 'name', text: 'name' },
  { value: '-name', text: 'name, last first' },
] as const;

export function Component() {
  const { query, params, narrowed, change } = useListSearch(listMakers.query);
  const state = useQuery(makersList(query));
  return (
    <ListPage<MakerItem>
      title="Makers"
      noun={['maker', 'makers']}
      below="Who built the machines, and who poured the iron."
      {...{ state, params, narrowed }}
      filters={
        <>
          <TextFilter label="Name or place" value={query.q ?? ''} onChange={(q) => change({ q })} />
          <OrderFilter value={query.sort} orders={ORDERS} onChange={(sort) => change({ sort })} />
        </>
      }
      aside={
        <p>
          A maker had castings poured at its own foundry or at another’s. The foundry’s mark can stand beside the maker’s number,
          and each may have dated in its own <Link to={paths.ciphers()}>cipher</Link>.
        </p>
      }
      table={(rows, stale) => <MakersTable {...{ rows, stale }} />}
      empty="Makers and foundries will stand here, with their models, castings and ciphers."
    />
  );
}
