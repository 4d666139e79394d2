import { useQuery } from '@tanstack/react-query';
import { listCiphers } from '#contract/ciphers.ts';
import type { CipherItem } from '#contract/ciphers.ts';
import { ciphersList } from '../../features/ciphers/ciphers-queries.ts';
import { CiphersTable } from '../../features/ciphers/ciphers-table.tsx';
import { useMakerChoices } from './choices.ts';
import { ChoiceFilter, OrderFilter, TextFilter } from './list-filters.tsx';
import { ListPage } from './list-page.tsx';
import { useListSearch } from './use-list-search.ts';

const ORDERS = [
  { value: 'title', text: 'title' },
  { value: '-title', text: 'title, last first' },
  { value: 'used', text: 'first used' },
] as const;

export function Component() {
  const { query, params, narrowed, change } = useListSearch(listCiphers.query);
  const state = useQuery(ciphersList(query));
  const makers = useMakerChoices();
  return (
    <ListPage<CipherItem>
      title="Ciphers"
      noun={['cipher', 'ciphers']}
      below="How makers wrote the date a casting was poured."
      {...{ state, params, narrowed }}
      filters={
        <>
          <TextFilter label="Title" value={query.q ?? ''} onChange={(q) => change({ q })} />
          <ChoiceFilter
            label="Maker"
            value={query.maker}
            choices={makers}
            all="Any maker"
            onChange={(maker) => change({ maker })}
          />
          <OrderFilter value={query.sort} orders={ORDERS} onChange={(sort) => change({ sort })} />
        </>
      }
      aside={<p>A cipher belongs to a maker and, where it is known, to the foundry that poured. One machine can carry two.</p>}
      table={(rows, stale) => <CiphersTable {...{ rows, stale }} />}
      empty="Ciphers will stand here: their fields, their letters, their years in use."
    />
  );
}
