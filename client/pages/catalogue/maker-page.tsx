import type { QueryClient } from '@tanstack/react-query';
import { useSuspenseQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import type { LoaderFunction } from 'react-router-dom';
import type { MakerPage } from '#contract/makers.ts';
import { FactActions, RowActions } from '../../features/contributions/fact-actions.tsx';
import { makerPage } from '../../features/makers/makers-queries.ts';
import { sayMachineKind } from '../../features/models/models-table.tsx';
import { NOTHING_SAID, writeDecodeState } from '../../features/decode/decode-state.ts';
import { paths } from '../../lib/paths.ts';
import { sayYears } from '../../lib/say-date.ts';
import { ButtonLink } from '../../ui/button.tsx';
import { DataTable } from '../../ui/data-table.tsx';
import { Block, PageGrid } from '../../ui/page-grid.tsx';
import { PageTitle } from '../../ui/page-title.tsx';
import { PartingLine } from '../../ui/parting-line.tsx';
import { FactList } from './fact-list.tsx';
import type { Fact } from './fact-list.tsx';
import { pageNotes, provenanceOfField } from './page-notes.ts';
import { slugOf, useSlug } from './slug-param.ts';
import { sourceMargin, SourceNotes } from './source-notes.tsx';
import { VersionLinks } from './version-links.tsx';

export function loader(queryClient: QueryClient): LoaderFunction {
  return ({ params }) => queryClient.query({ ...makerPage(slugOf(params)), staleTime: 'static' });
}

export function Component() {
  const { data: maker } = useSuspenseQuery(makerPage(useSlug()));
  const notes = pageNotes([
    {
      block: 'what',
      facts: ['place', 'founded', 'foundryMark', 'pouredFor', 'note'].map((field) => ({
        key: field,
        provenance: provenanceOfField(maker.provenance, field),
      })),
    },
    { block: 'works', facts: maker.works.map(({ slug, provenance }) => ({ key: `works ${slug}`, provenance })) },
  ]);
  return (
    <>
      <PageTitle title={maker.name} above={<Link to={paths.makers()}>Makers</Link>} below={sayTrade(maker)}>
        {maker.name}
      </PageTitle>
      <PartingLine />
      <div className="pt-8">
        <PageGrid>
          <Block
            heading="What it was"
            margin={
              <>
                <SourceNotes notes={notes.beside('what')} />
                <VersionLinks version={maker.provenance.version} history={paths.makerHistory(maker.slug)} />
                <FactActions factId={maker.id} />
              </>
            }
          >
            <FactList facts={factsOf(maker, notes.numbersOf)} />
            <p className="no-print mt-5 flex flex-wrap items-center gap-3">
              {maker.ciphers > 0 && (
                <ButtonLink
                  weight="primary"
                  to={paths.decode(`?${writeDecodeState({ ...NOTHING_SAID, maker: maker.slug }).toString()}`)}
                >
                  Decode a mark of this maker
                </ButtonLink>
              )}
              {maker.castings > 0 && (
                <ButtonLink to={paths.castings(`?maker=${maker.slug}`)}>
                  {maker.castings === 1 ? 'Its one casting' : `Its ${maker.castings} castings`}
                </ButtonLink>
              )}
            </p>
          </Block>
          {maker.modelList.length > 0 && (
            <Block heading="Models">
              <DataTable
                caption={`Models of ${maker.name}`}
                rows={maker.modelList}
                rowKey={({ slug }) => slug}
                columns={[
                  {
                    key: 'name',
                    header: 'Model',
                    rowHeader: true,
                    cell: ({ slug, name }) => <Link to={paths.model(slug)}>{name}</Link>,
                  },
                  { key: 'kind', header: 'kind', cell: ({ kindOfMachine }) => sayMachineKind(kindOfMachine) },
                  { key: 'made', header: 'made', cell: ({ made }) => sayYears(made) },
                ]}
              />
            </Block>
          )}
          {maker.cipherList.length > 0 && (
            <Block heading="Ciphers">
              <DataTable
                caption={`Ciphers of ${maker.name}`}
                rows={maker.cipherList}
                rowKey={({ slug }) => slug}
                columns={[
                  {
                    key: 'title',
                    header: 'Cipher',
                    rowHeader: true,
                    cell: ({ slug, title }) => <Link to={paths.cipher(slug)}>{title}</Link>,
                  },
                  {
                    key: 'foundry',
                    header: 'poured by',
                    cell: ({ foundry }) =>
                      foundry === null || foundry.slug === maker.slug ? (
                        'its own foundry'
                      ) : (
                        <Link to={paths.maker(foundry.slug)}>{foundry.name}</Link>
                      ),
                  },
                  { key: 'used', header: 'in use', cell: ({ used }) => sayYears(used) },
                ]}
              />
            </Block>
          )}
          {maker.works.length > 0 && (
            <Block heading="Works" margin={sourceMargin(notes.beside('works'))}>
              <FactList
                names="cast"
                facts={maker.works.map(({ id, slug, name, place }) => ({
                  name,
                  value: place ?? 'place not on record',
                  deeds: <RowActions factId={id} name={name} />,
                  notes: notes.numbersOf(`works ${slug}`),
                }))}
              />
            </Block>
          )}
        </PageGrid>
      </div>
    </>
  );
}

function sayTrade({ buildsMachines, poursIron, active }: MakerPage): string {
  const trade = !buildsMachines ? 'Foundry' : poursIron ? 'Maker with its own foundry' : 'Maker';
  return active.from === null && active.to === null ? trade : `${trade}, ${sayYears(active)}`;
}

function factsOf(maker: MakerPage, numbersOf: (key: string) => readonly number[]): Fact[] {
  const { place, active, foundryMark, pouredFor, note } = maker;
  return [
    { name: 'Place', value: place ?? 'not on record', notes: numbersOf('place') },
    { name: 'Years', value: sayYears(active), notes: numbersOf('founded') },
    ...(foundryMark === null ? [] : [{ name: 'Foundry mark', value: <span className="font-mono">{foundryMark}</span>, notes: numbersOf('foundryMark') }]),
    ...(pouredFor.length === 0
      ? []
      : [
          {
            name: 'Poured for',
            notes: numbersOf('pouredFor'),
            value: pouredFor.map(({ slug, name }, at) => (
              <span key={slug}>
                {at > 0 && ', '}
                <Link to={paths.maker(slug)}>{name}</Link>
              </span>
            )),
          },
        ]),
    ...(note === null ? [] : [{ name: 'Note', value: note, notes: numbersOf('note') }]),
  ];
}
