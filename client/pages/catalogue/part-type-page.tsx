import type { QueryClient } from '@tanstack/react-query';
import { useSuspenseQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import type { LoaderFunction } from 'react-router-dom';
import { FactActions } from '../../features/contributions/fact-actions.tsx';
import { partTypePage } from '../../features/part-types/part-types-queries.ts';
import { WearLimitsTable } from '../../features/part-types/wear-limits-table.tsx';
import { paths } from '../../lib/paths.ts';
import { ButtonLink } from '../../ui/button.tsx';
import { NoteRef } from '../../ui/margin-notes.tsx';
import { Block, PageGrid } from '../../ui/page-grid.tsx';
import { PageTitle } from '../../ui/page-title.tsx';
import { PartingLine } from '../../ui/parting-line.tsx';
import { pageNotes, provenanceOfField } from './page-notes.ts';
import { slugOf, useSlug } from './slug-param.ts';
import { SourceNotes } from './source-notes.tsx';
import { TypeCaution } from './type-caution.tsx';
import { VersionLinks } from './version-links.tsx';

export function loader(queryClient: QueryClient): LoaderFunction {
  return ({ params }) => queryClient.query({ ...partTypePage(slugOf(params)), staleTime: 'static' });
}

export function Component() {
  const { data: type } = useSuspenseQuery(partTypePage(useSlug()));
  const notes = pageNotes([
    {
      block: 'what',
      facts: ['note', 'caution'].map((field) => ({ key: field, provenance: provenanceOfField(type.provenance, field) })),
    },
    { block: 'wear', facts: type.wearLimits.map(({ id, provenance }) => ({ key: id, provenance })) },
  ]);
  return (
    <>
      <PageTitle title={type.name} above={<Link to={paths.partTypes()}>Part types</Link>}>
        {type.name}
      </PageTitle>
      <PartingLine />
      <div className="pt-8">
        <PageGrid>
          <Block
            margin={
              <>
                <SourceNotes notes={notes.beside('what')} />
                <VersionLinks version={type.provenance.version} history={paths.partTypeHistory(type.slug)} />
                <FactActions factId={type.id} />
              </>
            }
          >
            <div className="max-w-measure space-y-5">
              {type.note !== null && (
                <p>
                  {type.note}
                  <NoteRef numbers={notes.numbersOf('note')} />
                </p>
              )}
              {type.caution !== null && <TypeCaution caution={type.caution} notes={notes.numbersOf('caution')} />}
              {type.castings > 0 ? (
                <p>
                  <ButtonLink weight="primary" to={paths.castings(`?partType=${type.slug}`)}>
                    {type.castings === 1 ? 'See the one casting on record' : `See the ${type.castings} castings on record`}
                  </ButtonLink>
                </p>
              ) : (
                <p className="text-slag">No casting of this type is on record yet.</p>
              )}
            </div>
          </Block>
          {type.wearLimits.length > 0 && (
            <Block heading="Wear limits" margin={<SourceNotes notes={notes.beside('wear')} />}>
              <WearLimitsTable limits={type.wearLimits} notesOf={notes.numbersOf} />
            </Block>
          )}
          {type.models.length > 0 && (
            <Block heading="Models with a place for it">
              <ul>
                {type.models.map(({ slug, name }) => (
                  <li key={slug} className="flex flex-wrap items-center justify-between gap-x-6 border-b border-rule py-1">
                    <Link to={paths.model(slug)} className="inline-flex min-h-11 items-center">
                      {name}
                    </Link>
                    <Link
                      to={paths.castings(`?model=${slug}&partType=${type.slug}`)}
                      className="inline-flex min-h-11 items-center text-[15px]"
                    >
                      Castings for it<span className="sr-only"> on {name}</span>
                    </Link>
                  </li>
                ))}
              </ul>
            </Block>
          )}
        </PageGrid>
      </div>
    </>
  );
}
