import type { QueryClient } from '@tanstack/react-query';
import { useSuspenseQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import type { LoaderFunction } from 'react-router-dom';
import type { CipherPage } from '#contract/ciphers.ts';
import { CipherLayout } from '../../features/ciphers/cipher-layout.tsx';
import { sayYearStart } from '../../features/ciphers/cipher-words.ts';
import { cipherPage } from '../../features/ciphers/ciphers-queries.ts';
import { SymbolSets } from '../../features/ciphers/symbol-sets.tsx';
import { FactActions } from '../../features/contributions/fact-actions.tsx';
import { NOTHING_SAID, writeDecodeState } from '../../features/decode/decode-state.ts';
import { sayMachineKind } from '../../features/models/models-table.tsx';
import { paths } from '../../lib/paths.ts';
import { sayOpenSpan, saySpan, sayYears } from '../../lib/say-date.ts';
import { today } from '../../lib/today.ts';
import { ButtonLink } from '../../ui/button.tsx';
import { DataTable } from '../../ui/data-table.tsx';
import { Block, PageGrid } from '../../ui/page-grid.tsx';
import { PageTitle } from '../../ui/page-title.tsx';
import { PartingLine } from '../../ui/parting-line.tsx';
import { FactList } from './fact-list.tsx';
import { pageNotes, provenanceOfField } from './page-notes.ts';
import { sayFieldName } from './payload-difference.ts';
import { slugOf, useSlug } from './slug-param.ts';
import { SourceNotes } from './source-notes.tsx';
import { VersionLinks } from './version-links.tsx';
import { WorkedDecode } from './worked-decode.tsx';

export function loader(queryClient: QueryClient): LoaderFunction {
  return ({ params }) => queryClient.query({ ...cipherPage(slugOf(params)), staleTime: 'static' });
}

export function Component() {
  const { data: cipher } = useSuspenseQuery(cipherPage(useSlug()));
  const { definition } = cipher;
  const notes = pageNotes([
    {
      block: 'layout',
      facts: ['definition', 'used', 'note'].map((field) => ({
        key: field,
        provenance: provenanceOfField(cipher.provenance, field),
      })),
    },
  ]);
  return (
    <>
      <PageTitle
        title={cipher.title}
        above={
          <>
            <Link to={paths.maker(cipher.maker.slug)}>{cipher.maker.name}</Link>
            {cipher.kindOfMachine !== null && ` · ${sayMachineKind(cipher.kindOfMachine)}`}
          </>
        }
        below={`In use ${sayYears(cipher.used)}`}
      >
        {cipher.title}
      </PageTitle>
      <PartingLine />
      <div className="pt-8">
        <PageGrid>
          <Block
            heading="How it stands on the iron"
            margin={
              <>
                <SourceNotes notes={notes.beside('layout')} />
                <VersionLinks version={cipher.version} history={paths.cipherHistory(cipher.slug)} />
                <FactActions factId={cipher.id} />
              </>
            }
          >
            <CipherLayout definition={definition} />
            <p className="no-print mt-6">
              <ButtonLink
                weight="primary"
                to={paths.decode(
                  `?${writeDecodeState({ ...NOTHING_SAID, maker: cipher.maker.slug, cipher: cipher.slug }).toString()}`,
                )}
              >
                Decode a mark in this cipher
              </ButtonLink>
            </p>
          </Block>
          <Block heading="A day, worked">
            <WorkedDecode key={cipher.id} cipher={cipher} />
          </Block>
          <Block heading="The symbols">
            <SymbolSets definition={definition} asOf={today()} />
          </Block>
          <Block heading="When and where">
            <FactList
              facts={[
                { name: 'In use', value: sayOpenSpan(cipher.used), notes: notes.numbersOf('used') },
                {
                  name: 'Poured by',
                  value:
                    cipher.foundry === null || cipher.foundry.slug === cipher.maker.slug ? (
                      'its maker’s own foundry'
                    ) : (
                      <Link to={paths.maker(cipher.foundry.slug)}>{cipher.foundry.name}</Link>
                    ),
                },
                ...(definition.yearStart === undefined
                  ? []
                  : [{ name: 'Years begin', value: `${sayYearStart(definition.yearStart)}, for twelve months` }]),
                ...(cipher.note === null ? [] : [{ name: 'Note', value: cipher.note, notes: notes.numbersOf('note') }]),
              ]}
            />
            <Exceptions definition={definition} />
          </Block>
        </PageGrid>
      </div>
    </>
  );
}

function Exceptions({ definition: { exceptions = [] } }: Pick<CipherPage, 'definition'>) {
  if (exceptions.length === 0) return null;
  return (
    <div className="mt-6">
      <DataTable
        caption="Exceptions"
        captionShown
        rows={exceptions}
        rowKey={({ from, fields }) => `${from} ${JSON.stringify(fields)}`}
        columns={[
          { key: 'marks', header: 'Marks', rowHeader: true, cell: ({ fields }) => <ExceptionFields fields={fields} /> },
          { key: 'mean', header: 'mean', cell: (exception) => saySpan(exception) },
          {
            key: 'place',
            header: 'and',
            cell: ({ replaces = true }) => (replaces ? 'not what the table says' : 'what the table says too'),
          },
        ]}
      />
    </div>
  );
}

function ExceptionFields({ fields }: { readonly fields: Readonly<Partial<Record<string, string>>> }) {
  return Object.entries(fields).map(([field, symbols], place) => (
    <span key={field}>
      {place > 0 && ', '}
      {sayFieldName(field)} <span className="font-mono">{symbols}</span>
    </span>
  ));
}
