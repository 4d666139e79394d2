import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { listMyParts } from '#contract/parts.ts';
import type { PartItem } from '#contract/parts.ts';
import { myParts } from '../../features/parts/parts-queries.ts';
import { PartsSheet } from '../../features/parts/parts-sheet.tsx';
import { PartsTable } from '../../features/parts/parts-table.tsx';
import { SignedInOnly } from '../../features/people/signed-in-only.tsx';
import { paths } from '../../lib/paths.ts';
import { ButtonLink } from '../../ui/button.tsx';
import { usePartTypeChoices } from '../catalogue/choices.ts';
import { ChoiceFilter, OrderFilter } from '../catalogue/list-filters.tsx';
import { ListPage } from '../catalogue/list-page.tsx';
import { useListSearch } from '../catalogue/use-list-search.ts';
import { AboutTheBench } from './about-the-bench.tsx';

const ORDERS = [
  { value: '-recorded', text: 'last put on record' },
  { value: 'recorded', text: 'first put on record' },
  { value: 'title', text: 'what it is' },
] as const;

const PLACES = [
  { value: 'bench', text: 'on the bench' },
  { value: 'machine', text: 'on a machine' },
] as const;

const VIEWS = [
  { view: 'table', text: 'Table' },
  { view: 'sheet', text: 'Contact sheet' },
] as const;

export function Component() {
  return (
    <SignedInOnly title="The bench" about={<AboutTheBench />}>
      {() => <Bench />}
    </SignedInOnly>
  );
}

function Bench() {
  const { query, params, narrowed, change } = useListSearch(listMyParts.query);
  const state = useQuery(myParts(query));
  const partTypes = usePartTypeChoices();
  const isSheet = params.get('view') === 'sheet';
  const newPart = (
    <ButtonLink weight="primary" to={paths.newPart()}>
      Put a part on record
    </ButtonLink>
  );
  const isBare = state.data?.items.length === 0 && !narrowed;
  return (
    <ListPage<PartItem>
      title="Your bench"
      noun={['part', 'parts']}
      above={null}
      below="Your parts: what they are, what their marks say, where they are."
      {...{ state, params, narrowed }}
      deeds={
        <>
          {!isBare && newPart}
          <Views params={params} isSheet={isSheet} />
        </>
      }
      filters={
        <>
          <ChoiceFilter label="Where" value={query.on} choices={PLACES} all="anywhere" onChange={(on) => change({ on })} />
          <ChoiceFilter label="Part type" value={query.partType} choices={partTypes} all="any part" onChange={(partType) => change({ partType })} />
          <OrderFilter value={query.sort} orders={ORDERS} onChange={(sort) => change({ sort })} />
        </>
      }
      aside={
        <>
          <p>A part is private until you say otherwise on its own page.</p>
          <p>
            Marks of others want reading too: <Link to={paths.marksToRead()}>read one</Link>.
          </p>
        </>
      }
      table={(rows, stale) => (isSheet ? <PartsSheet {...{ rows, stale }} /> : <PartsTable {...{ rows, stale }} />)}
      advice="Take one filter away."
      empty="Your parts will stand here with their photos and marks. Begin with a photo of one."
      firstStep={newPart}
    />
  );
}

/** The two ways to look at the same parts; the address holds which. */
function Views({ params, isSheet }: { readonly params: URLSearchParams; readonly isSheet: boolean }) {
  const searchOf = (view: (typeof VIEWS)[number]['view']): string => {
    const next = new URLSearchParams(params);
    if (view === 'table') next.delete('view');
    else next.set('view', view);
    return `?${next.toString()}`;
  };
  return (
    <nav aria-label="View" className="flex gap-4">
      {VIEWS.map(({ view, text }) => (
        <Link key={view} to={searchOf(view)} preventScrollReset className="nav-link" {...((view === 'sheet') === isSheet ? { 'aria-current': 'true' as const } : {})}>
          {text}
        </Link>
      ))}
    </nav>
  );
}
