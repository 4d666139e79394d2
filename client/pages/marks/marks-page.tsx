import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { listMarks } from '#contract/marks.ts';
import type { MarkOnList } from '#contract/marks.ts';
import { KIND_CHOICES } from '../../features/marks/mark-words.ts';
import { marksList } from '../../features/marks/marks-queries.ts';
import { MarksTable } from '../../features/marks/marks-table.tsx';
import { paths } from '../../lib/paths.ts';
import { capital } from '../../lib/say-number.ts';
import { TextField } from '../../ui/text-field.tsx';
import { useMakerChoices } from '../catalogue/choices.ts';
import { ChoiceFilter, OrderFilter, TextFilter } from '../catalogue/list-filters.tsx';
import { ListPage } from '../catalogue/list-page.tsx';
import { NotationHelp } from '../catalogue/notation-help.tsx';
import { useListSearch } from '../catalogue/use-list-search.ts';

const ORDERS = [
  { value: '-read', text: 'last read' },
  { value: 'read', text: 'first read' },
  { value: 'reading', text: 'what it says' },
] as const;

const PHOTO_CHOICES = [
  { value: 'true', text: 'with a photo' },
  { value: 'false', text: 'without' },
] as const;

const WANTS_CHOICES = [
  { value: 'true', text: 'wants another' },
  { value: 'false', text: 'read enough' },
] as const;

export function Component() {
  const { query, refused, params, narrowed, change } = useListSearch(listMarks.query);
  const fault = refused['number'] === undefined ? undefined : capital(refused['number']);
  const state = useQuery({ ...marksList(query), enabled: fault === undefined });
  const makers = useMakerChoices();
  const day = (name: 'from' | 'to', label: string) => (
    <TextField type="date" label={label} value={params.get(name) ?? ''} onChange={({ target }) => change({ [name]: target.value })} error={refused[name] ?? null} />
  );
  return (
    <ListPage<MarkOnList>
      title="Record of marks"
      noun={['mark', 'marks']}
      below="Every public mark: what was read, what it can mean, and how sure that is."
      {...{ state, params, narrowed }}
      waiting={fault === undefined ? null : `${fault}. Mend the number, and the marks that may say it stand here.`}
      filters={
        <>
          <TextFilter
            label="It says"
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
          <ChoiceFilter label="Maker" value={query.maker} choices={makers} all="any maker" onChange={(maker) => change({ maker })} />
          <ChoiceFilter label="Kind" value={query.kind} choices={KIND_CHOICES} all="any kind" onChange={(kind) => change({ kind })} />
          {day('from', 'Can mean, from')}
          {day('to', 'Can mean, to')}
          <ChoiceFilter label="Photo" value={query.hasPhoto} choices={PHOTO_CHOICES} all="with or without" onChange={(hasPhoto) => change({ hasPhoto })} />
          <ChoiceFilter label="Readings" value={query.wantsReading} choices={WANTS_CHOICES} all="any" onChange={(wantsReading) => change({ wantsReading })} />
          <OrderFilter value={query.sort} orders={ORDERS} onChange={(sort) => change({ sort })} />
        </>
      }
      aside={
        <>
          <p className="font-semibold text-graphite">What can’t be read</p>
          <NotationHelp />
          <p>
            Some want another reading: <Link to={paths.marksToRead()}>read one</Link>.
          </p>
        </>
      }
      table={(rows, stale) => <MarksTable {...{ rows, stale }} />}
      empty="Marks of public parts will stand here: each with its photo, what was read and what it can mean."
    />
  );
}
