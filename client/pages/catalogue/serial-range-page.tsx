import type { QueryClient } from '@tanstack/react-query';
import { useSuspenseQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import type { LoaderFunction } from 'react-router-dom';
import type { SerialRangePage } from '#contract/serial-ranges.ts';
import { FactActions } from '../../features/contributions/fact-actions.tsx';
import { sayMeaning, sayPrecision, sayRangeStanding } from '../../features/serial-ranges/say-range.ts';
import { serialRangePage } from '../../features/serial-ranges/serial-ranges-queries.ts';
import { paths } from '../../lib/paths.ts';
import { saySpan } from '../../lib/say-date.ts';
import { capital } from '../../lib/say-number.ts';
import { saySerials } from '../../lib/say-serials.ts';
import { Block, PageGrid } from '../../ui/page-grid.tsx';
import { PageTitle } from '../../ui/page-title.tsx';
import { PartingLine } from '../../ui/parting-line.tsx';
import { FactList } from './fact-list.tsx';
import type { Fact } from './fact-list.tsx';
import { pageNotes, provenanceOfField } from './page-notes.ts';
import { slugOf, useSlug } from './slug-param.ts';
import { SourceNotes } from './source-notes.tsx';
import { VersionLinks } from './version-links.tsx';

export function loader(queryClient: QueryClient): LoaderFunction {
  return ({ params }) => queryClient.query({ ...serialRangePage(slugOf(params)), staleTime: 'static' });
}

export function Component() {
  const { data: range } = useSuspenseQuery(serialRangePage(useSlug()));
  const numbers = saySerials({ prefix: range.series.prefix, first: range.first, last: range.last });
  const notes = pageNotes([
    {
      block: 'what',
      facts: ['numbers', 'built', 'note'].map((field) => ({
        key: field,
        provenance: provenanceOfField(range.provenance, field),
      })),
    },
  ]);
  return (
    <>
      <PageTitle
        title={`${numbers}, ${range.model.name}`}
        above={
          <>
            <Link to={paths.maker(range.maker.slug)}>{range.maker.name}</Link> ·{' '}
            <Link to={paths.model(range.model.slug)}>{range.model.name}</Link>
          </>
        }
        below={`By ${range.account.title}${range.preferred ? ', the account the register goes by' : ''}`}
      >
        <span className="font-mono text-[0.86em]">{numbers}</span>
      </PageTitle>
      <PartingLine />
      <div className="pt-8">
        <PageGrid>
          <Block
            heading="What it says"
            margin={
              <>
                <SourceNotes notes={notes.beside('what')} />
                <VersionLinks version={range.provenance.version} history={paths.serialRangeHistory(range.slug)} />
                <FactActions factId={range.id} />
              </>
            }
          >
            <FactList facts={factsOf(range, notes.numbersOf)} />
            <p className="mt-4 max-w-measure">
              The whole series, with what other accounts say of the same numbers, stands with the{' '}
              <Link to={paths.model(range.model.slug)}>{range.model.name}</Link>.
            </p>
          </Block>
        </PageGrid>
      </div>
    </>
  );
}

function factsOf(range: SerialRangePage, numbersOf: (key: string) => readonly number[]): Fact[] {
  const { series, first, last, dates, meaning, precision, standing, inOrder, note } = range;
  return [
    {
      name: 'Numbers',
      value: <span className="font-mono">{saySerials({ prefix: series.prefix, first, last })}</span>,
      notes: numbersOf('numbers'),
    },
    ...(last === null ? [{ name: 'Last number', value: 'not known' }] : []),
    {
      name: capital(sayMeaning(meaning)),
      value: `${saySpan(dates)}, given ${sayPrecision(precision)}`,
      notes: numbersOf('built'),
    },
    ...(meaning === 'built' ? [] : [{ name: 'Not', value: 'days of building, so they give no build window' }]),
    { name: 'Standing', value: capital(sayRangeStanding(standing)) },
    {
      name: 'Issued',
      value: inOrder ? 'in order, so a number has a likeliest day' : 'order not known, so no day in it is likelier than another',
    },
    ...(series.works === null ? [] : [{ name: 'Works', value: series.works }]),
    ...(series.label === null ? [] : [{ name: 'Run', value: series.label }]),
    ...(note === null ? [] : [{ name: 'Note', value: note, notes: numbersOf('note') }]),
  ];
}
