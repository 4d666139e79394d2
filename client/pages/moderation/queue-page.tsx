import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { KINDS } from '#contract/kinds.ts';
import { listQueue } from '#contract/moderation.ts';
import type { QueueItem } from '#contract/moderation.ts';
import type { Me } from '#contract/people.ts';
import { ModerationLinks } from '../../features/moderation/moderation-links.tsx';
import { queueList } from '../../features/moderation/moderation-queries.ts';
import { ModeratorsOnly } from '../../features/moderation/moderators-only.tsx';
import { QueueList } from '../../features/moderation/queue-list.tsx';
import { sayRole } from '../../features/people/say-role.ts';
import { paths } from '../../lib/paths.ts';
import { capital } from '../../lib/say-number.ts';
import { useMakerChoices } from '../catalogue/choices.ts';
import { ChoiceFilter, OrderFilter, TextFilter } from '../catalogue/list-filters.tsx';
import { ListPage } from '../catalogue/list-page.tsx';
import { useListSearch } from '../catalogue/use-list-search.ts';

const ORDERS = [
  { value: 'at', text: 'waiting, longest first' },
  { value: '-at', text: 'waiting, latest first' },
] as const;
const TYPE_CHOICES = [
  { value: 'contribution', text: 'contributions' },
  { value: 'flag', text: 'flags' },
] as const;
const KIND_CHOICES = Object.values(KINDS).map(({ kind, names }) => ({ value: kind, text: names }));

export function Component() {
  return <ModeratorsOnly>{(viewer) => <Queue viewer={viewer} />}</ModeratorsOnly>;
}

function Queue({ viewer }: { readonly viewer: Me }) {
  const { query, params, narrowed, change } = useListSearch(listQueue.query);
  const state = useQuery(queueList(query));
  const makers = useMakerChoices();
  return (
    <ListPage<QueueItem>
      title="Queue"
      noun={['entry', 'entries']}
      above={<ModerationLinks />}
      below={`What waits for a decision. ${capital(sayRole(viewer))}.`}
      {...{ state, params, narrowed }}
      filters={
        <>
          <ChoiceFilter label="What" value={query.type} choices={TYPE_CHOICES} all="contributions and flags" onChange={(type) => change({ type })} />
          <ChoiceFilter label="Kind" value={query.kind} choices={KIND_CHOICES} all="any kind" onChange={(kind) => change({ kind })} />
          <ChoiceFilter label="Maker" value={query.maker} choices={makers} all="any maker" onChange={(maker) => change({ maker })} />
          <OrderFilter value={query.sort} orders={ORDERS} onChange={(sort) => change({ sort })} />
          <TextFilter label="Words" value={query.q ?? ''} onChange={(q) => change({ q })} />
        </>
      }
      aside={
        <>
          <p>Open one to see its evidence and decide. While you have it open, the other moderators see that you do.</p>
          <p>
            What is being worked out again after a decision stands <Link to={paths.reworks()}>on its own page</Link>.
          </p>
        </>
      }
      table={(rows, stale) => <QueueList {...{ rows, stale }} mayDecide={viewer.can.decideContributions} />}
      advice="Take one filter away."
      empty="Nothing waits. What members put forward, and what they flag, will stand here, the oldest first."
    />
  );
}
