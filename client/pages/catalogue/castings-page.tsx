import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { listCastings } from '#contract/castings.ts';
import type { CastingItem } from '#contract/castings.ts';
import { castingsList } from '../../features/castings/castings-queries.ts';
import { CastingsTable } from '../../features/castings/castings-table.tsx';
import { paths } from '../../lib/paths.ts';
import { capital } from '../../lib/say-number.ts';
import { useMakerChoices, useModelChoices, usePartTypeChoices } from './choices.ts';
import { ChoiceFilter, OrderFilter, TextFilter } from './list-filters.tsx';
import { ListPage } from './list-page.tsx';
import { NotationHelp } from './notation-help.tsx';
import { useListSearch } from './use-list-search.ts';

const ORDERS = [
  { value: 'number', text: 'number' },
  { value: '-number', text: 'number, last first' },
  { value: 'made', text: 'first made' },
  { value: '-made', text: 'latest made' },
] as const;

export function Component() {
  const { query, refused, params, narrowed, change } = useListSearch(listCastings.query);
  const fault = refused['number'] === undefined ? undefined : capital(refused['number']);
  const state = useQuery({ ...castingsList(query), enabled: fault === undefined });
  const makers = useMakerChoices();
  const partTypes = usePartTypeChoices();
  const models = useModelChoices(query.maker);
  return (
    <ListPage<CastingItem>
      title="Castings"
      noun={['casting', 'castings']}
      below="By the number cast into them, or by what they are."
      {...{ state, params, narrowed }}
      waiting={fault === undefined ? null : `${fault}. Mend the number, and the castings that can carry it stand here.`}
      filters={
        <>
          <TextFilter
            label="Casting number"
            mono
            value={params.get('number') ?? ''}
            onChange={(number) => change({ number })}
            error={fault}
            hint={
              <>
                <code className="font-mono">?</code> for a glyph you can’t read
              </>
            }
          />
          <ChoiceFilter
            label="Maker"
            value={query.maker}
            choices={makers}
            all="Any maker"
            onChange={(maker) => change({ maker, model: null })}
          />
          <ChoiceFilter
            label="Part type"
            value={query.partType}
            choices={partTypes}
            all="Any part"
            onChange={(partType) => change({ partType })}
          />
          <ChoiceFilter
            label="Goes on model"
            value={query.model}
            choices={models}
            all="Any model"
            onChange={(model) => change({ model })}
          />
          <OrderFilter value={query.sort} orders={ORDERS} onChange={(sort) => change({ sort })} />
          <TextFilter label="Words" value={query.q ?? ''} onChange={(q) => change({ q })} />
        </>
      }
      aside={
        <>
          <p className="font-semibold text-graphite">What can’t be read</p>
          <NotationHelp />
          <p>Gaps and points in a number don’t matter.</p>
          <p>
            A date on it too? <Link to={paths.decode()}>Decode it</Link>.
          </p>
        </>
      }
      table={(rows, stale) => <CastingsTable {...{ rows, stale }} />}
      empty="Castings will stand here under their numbers: what each is, how to tell it, where it belongs."
    />
  );
}
