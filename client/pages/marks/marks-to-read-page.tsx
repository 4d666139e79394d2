import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { listMarksToRead } from '#contract/marks.ts';
import type { MarkToRead } from '#contract/marks.ts';
import { KIND_CHOICES } from '../../features/marks/mark-words.ts';
import { marksToRead } from '../../features/marks/marks-queries.ts';
import { MarksToReadSheet } from '../../features/marks/marks-to-read-sheet.tsx';
import { SignedInOnly } from '../../features/people/signed-in-only.tsx';
import { paths } from '../../lib/paths.ts';
import { ChoiceFilter } from '../catalogue/list-filters.tsx';
import { ListPage } from '../catalogue/list-page.tsx';
import { useListSearch } from '../catalogue/use-list-search.ts';

export function Component() {
  return (
    <SignedInOnly
      title="Marks to read"
      about={
        <>
          <p>
            Members read each other’s marks here, from photos, without seeing what anybody else made of them. Where two of them who have not seen each other’s reading agree, the mark is
            confirmed.
          </p>
          <p>
            What has been read already stands in <Link to={paths.marks()}>the record of marks</Link>.
          </p>
        </>
      }
    >
      {() => <ToRead />}
    </SignedInOnly>
  );
}

function ToRead() {
  const { query, params, narrowed, change } = useListSearch(listMarksToRead.query);
  const state = useQuery(marksToRead(query));
  return (
    <ListPage<MarkToRead>
      title="Marks to read"
      noun={['mark to read', 'marks to read']}
      above={<Link to={paths.marks()}>Record of marks</Link>}
      below="Choose one and say what you see. What others read is kept from you until you have."
      {...{ state, params, narrowed }}
      filters={<ChoiceFilter label="Kind" value={query.kind} choices={KIND_CHOICES} all="any kind" onChange={(kind) => change({ kind })} />}
      aside={
        <>
          <p>Those asked for longest come first.</p>
          <p>Say what stands there, not what it should be: a glyph you can’t read is worth as much as one you can.</p>
        </>
      }
      table={(rows, stale) => <MarksToReadSheet {...{ rows, stale }} />}
      advice="Take the filter away."
      empty="Public marks that want another reading will stand here, and that you have neither read nor looked up. You have seen to all there are."
    />
  );
}
