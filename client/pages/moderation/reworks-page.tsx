import { useQuery } from '@tanstack/react-query';
import { listReworks } from '#contract/moderation.ts';
import type { Rework } from '#contract/moderation.ts';
import { ModerationLinks } from '../../features/moderation/moderation-links.tsx';
import { reworksList } from '../../features/moderation/moderation-queries.ts';
import { ModeratorsOnly } from '../../features/moderation/moderators-only.tsx';
import { ReworksTable } from '../../features/moderation/reworks-table.tsx';
import { TextFilter } from '../catalogue/list-filters.tsx';
import { ListPage } from '../catalogue/list-page.tsx';
import { useListSearch } from '../catalogue/use-list-search.ts';

export function Component() {
  return <ModeratorsOnly>{() => <Reworks />}</ModeratorsOnly>;
}

function Reworks() {
  const { query, params, narrowed, change } = useListSearch(listReworks.query);
  const state = useQuery(reworksList(query));
  return (
    <ListPage<Rework>
      title="Worked out again"
      noun={['run', 'runs']}
      above={<ModerationLinks />}
      below="After a fact changes, everything that rested on it is gone through."
      {...{ state, params, narrowed }}
      filters={<TextFilter label="Fact" value={query.q ?? ''} onChange={(q) => change({ q })} />}
      aside={
        <>
          <p>Until a run is done, pages about the marks and fits it goes through say that they are being worked out again, and show no figures.</p>
          <p>Owners whose machines came out otherwise get one notice each, saying what changed and why.</p>
        </>
      }
      table={(rows, stale) => <ReworksTable {...{ rows, stale }} />}
      advice="Look for a part of the name."
      empty="Once a fact is entered, brought back or retired, what rests on it is gone through, and its progress stands here."
    />
  );
}
