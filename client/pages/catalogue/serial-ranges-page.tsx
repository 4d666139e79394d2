import { useQuery } from '@tanstack/react-query';
import { listSerialRanges } from '#contract/serial-ranges.ts';
import type { SerialRangeItem } from '#contract/serial-ranges.ts';
import { serialRangesList } from '../../features/serial-ranges/serial-ranges-queries.ts';
import { SerialRangesTable } from '../../features/serial-ranges/serial-ranges-table.tsx';
import { useMakerChoices, useModelChoices } from './choices.ts';
import { ChoiceFilter, OrderFilter, TextFilter } from './list-filters.tsx';
import { ListPage } from './list-page.tsx';
import { useListSearch } from './use-list-search.ts';

const ORDERS = [
  { value: 'series', text: 'series and number' },
  { value: 'dates', text: 'earliest built' },
  { value: '-dates', text: 'latest built' },
] as const;

export function Component() {
  const { query, params, narrowed, change } = useListSearch(listSerialRanges.query);
  const state = useQuery(serialRangesList(query));
  const makers = useMakerChoices();
  const models = useModelChoices(query.maker);
  return (
    <ListPage<SerialRangeItem>
      title="Serial ranges"
      noun={['serial range', 'serial ranges']}
      below="Which numbers were built when, by which account."
      {...{ state, params, narrowed }}
      filters={
        <>
          <TextFilter label="Prefix or words" value={query.q ?? ''} onChange={(q) => change({ q })} />
          <ChoiceFilter
            label="Maker"
            value={query.maker}
            choices={makers}
            all="Any maker"
            onChange={(maker) => change({ maker, model: null })}
          />
          <ChoiceFilter
            label="Model"
            value={query.model}
            choices={models}
            all="Any model"
            onChange={(model) => change({ model })}
          />
          <OrderFilter value={query.sort} orders={ORDERS} onChange={(sort) => change({ sort })} />
        </>
      }
      aside={<p>Accounts that disagree stand side by side. The register says which it goes by, and never hides the other.</p>}
      table={(rows, stale) => <SerialRangesTable {...{ rows, stale }} />}
      empty="Ranges will stand here: first number, last number, when they were built and who says so."
    />
  );
}
