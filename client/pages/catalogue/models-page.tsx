import { useQuery } from '@tanstack/react-query';
import { listModels } from '#contract/models.ts';
import type { ModelItem } from '#contract/models.ts';
import { modelsList } from '../../features/models/models-queries.ts';
import { ModelsTable } from '../../features/models/models-table.tsx';
import { useMakerChoices } from './choices.ts';
import { ChoiceFilter, OrderFilter, TextFilter } from './list-filters.tsx';
import { ListPage } from './list-page.tsx';
import { useListSearch } from './use-list-search.ts';

const ORDERS = [
  { value: 'name', text: 'name' },
  { value: '-name', text: 'name, last first' },
  { value: 'maker', text: 'maker' },
] as const;

export function Component() {
  const { query, params, narrowed, change } = useListSearch(listModels.query);
  const state = useQuery(modelsList(query));
  const makers = useMakerChoices();
  return (
    <ListPage<ModelItem>
      title="Models"
      noun={['model', 'models']}
      below="Each with its checklist of positions and its serial ranges."
      {...{ state, params, narrowed }}
      filters={
        <>
          <TextFilter label="Name" value={query.q ?? ''} onChange={(q) => change({ q })} />
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
      aside={<p>Have a serial? Open the model: it says when a machine with that number was built, by every account on record.</p>}
      table={(rows, stale) => <ModelsTable {...{ rows, stale }} />}
      empty="Models will stand here, with what goes where on them and when they were built."
    />
  );
}
