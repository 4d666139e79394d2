import type { QueryClient } from '@tanstack/react-query';
import { useQueries, useSuspenseQuery } from '@tanstack/react-query';
import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';
import type { LoaderFunction } from 'react-router-dom';
import { FITMENT_VERDICTS } from '#domain/vocabulary.ts';
import type { CastingPage, Fitment } from '#contract/castings.ts';
import type { CipherPage } from '#contract/ciphers.ts';
import { castingPage } from '../../features/castings/castings-queries.ts';
import { CastingLink } from '../../features/castings/castings-table.tsx';
import { castingRule, ciphersInUse } from '../../features/castings/casting-rule.ts';
import { FitmentsTable } from '../../features/castings/fitments-table.tsx';
import { sayCasting, sayInterchange } from '../../features/castings/say-casting.ts';
import { cipherPage } from '../../features/ciphers/ciphers-queries.ts';
import { FactActions, RowActions } from '../../features/contributions/fact-actions.tsx';
import { NOTHING_SAID, writeDecodeState } from '../../features/decode/decode-state.ts';
import { paths } from '../../lib/paths.ts';
import { sayOpenSpan, sayYears } from '../../lib/say-date.ts';
import { ButtonLink } from '../../ui/button.tsx';
import { FailureNote } from '../../ui/failure-note.tsx';
import { MarkPlate, readingOf } from '../../ui/mark-plate.tsx';
import { Block, PageGrid } from '../../ui/page-grid.tsx';
import { PageTitle } from '../../ui/page-title.tsx';
import { PartingLine } from '../../ui/parting-line.tsx';
import { TimeRule } from '../../ui/time-rule.tsx';
import { FactList } from './fact-list.tsx';
import type { Fact } from './fact-list.tsx';
import { pageNotes, provenanceOfField } from './page-notes.ts';
import { slugOf, useSlug } from './slug-param.ts';
import { sourceMargin, SourceNotes } from './source-notes.tsx';
import { TypeCaution } from './type-caution.tsx';
import { VersionLinks } from './version-links.tsx';

export function loader(queryClient: QueryClient): LoaderFunction {
  return ({ params }) => queryClient.query({ ...castingPage(slugOf(params)), staleTime: 'static' });
}

export function Component() {
  const { data: casting } = useSuspenseQuery(castingPage(useSlug()));
  const notes = notesOf(casting);
  return (
    <>
      <PageTitle
        title={`${sayCasting(casting)}, ${casting.partType.name.toLowerCase()}`}
        above={
          <>
            <Link to={paths.maker(casting.maker.slug)}>{casting.maker.name}</Link> ·{' '}
            <Link to={paths.partType(casting.partType.slug)}>{casting.partType.name}</Link>
          </>
        }
      >
        <MarkPlate size="line" reading={readingOf(casting.number)} />
        <span>{casting.pattern ?? casting.partType.name}</span>
      </PageTitle>
      <PartingLine />
      <div className="pt-8">
        <PageGrid>
          <Block
            heading="What it is"
            margin={
              <>
                <SourceNotes notes={notes.beside('what')} />
                <VersionLinks version={casting.provenance.version} history={paths.castingHistory(casting.slug)} />
                <FactActions factId={casting.id} />
              </>
            }
          >
            <FactList facts={whatItIs(casting, notes.numbersOf)} />
            <DecodeLinks casting={casting} />
            {casting.caution !== null && (
              <div className="mt-5 max-w-measure">
                <TypeCaution caution={casting.caution} />
              </div>
            )}
          </Block>
          {casting.tells.length > 0 && (
            <Block heading="How to tell it" margin={sourceMargin(notes.beside('tells'))}>
              <FactList
                names="cast"
                facts={casting.tells.map(({ place, tell }, ordinal) => ({
                  name: place,
                  value: sentence(tell),
                  notes: notes.numbersOf(`tells.${ordinal + 1}`),
                }))}
              />
            </Block>
          )}
          <Block heading="Where it belongs" margin={sourceMargin(notes.beside('fitments'))}>
            <FitmentsTable fitments={inOrderOfVerdict(casting.fitments)} notesOf={({ id }) => notes.numbersOf(id)} />
            <p className="no-print mt-3">
              <Link to={paths.contributeKind('fitment', `?castingId=${casting.id}`)} className="inline-flex min-h-11 items-center">
                Put a fitment forward
              </Link>
            </p>
          </Block>
          <Block heading="On the rule">
            <RuleOfCasting casting={casting} />
          </Block>
        </PageGrid>
      </div>
    </>
  );
}

type Numbers = (key: string) => readonly number[];

function notesOf({ provenance, tells, follows, followedBy, fitments }: CastingPage) {
  const fields = ['made', 'pouredBy', 'partNumbers', 'note'].map((field) => ({
    key: field,
    provenance: provenanceOfField(provenance, field),
  }));
  return pageNotes([
    {
      block: 'what',
      facts: [
        { key: 'whole', provenance: provenanceOfField(provenance, 'number') },
        ...fields,
        ...follows.map((one) => ({ key: `follows ${one.casting.slug}`, provenance: one.provenance })),
        ...followedBy.map((one) => ({ key: `followed by ${one.casting.slug}`, provenance: one.provenance })),
      ],
    },
    {
      block: 'tells',
      facts: tells.map((_, ordinal) => ({
        key: `tells.${ordinal + 1}`,
        provenance: provenanceOfField(provenance, `tells.${ordinal + 1}`),
      })),
    },
    { block: 'fitments', facts: fitments.map(({ id, provenance: behind }) => ({ key: id, provenance: behind })) },
  ]);
}

function whatItIs(casting: CastingPage, numbersOf: Numbers): Fact[] {
  const { partType, made, pouredBy, partNumbers, follows, followedBy, note } = casting;
  return [
    { name: 'Part type', value: <Link to={paths.partType(partType.slug)}>{partType.name}</Link>, notes: numbersOf('whole') },
    { name: 'Made', value: made === null ? 'years not on record' : sayOpenSpan(made), notes: numbersOf('made') },
    {
      name: 'Poured by',
      value: pouredBy === null ? 'its maker, as far as is known' : <Link to={paths.maker(pouredBy.slug)}>{pouredBy.name}</Link>,
      notes: pouredBy === null ? [] : numbersOf('pouredBy'),
    },
    ...(partNumbers.length === 0
      ? []
      : [{ name: 'Machined as part', value: <PartNumbers numbers={partNumbers} />, notes: numbersOf('partNumbers') }]),
    ...follows.map((one) => succession('Follows', one, 'older', numbersOf(`follows ${one.casting.slug}`))),
    ...followedBy.map((one) => succession('Followed by', one, 'newer', numbersOf(`followed by ${one.casting.slug}`))),
    ...(note === null ? [] : [{ name: 'Note', value: note, notes: numbersOf('note') }]),
  ];
}

function succession(
  name: string,
  { id, casting, interchange, note }: CastingPage['follows'][number],
  named: 'older' | 'newer',
  notes: readonly number[],
): Fact {
  return {
    name,
    notes,
    deeds: <RowActions factId={id} name={`${name} ${sayCasting(casting)}`} />,
    value: (
      <>
        <CastingLink casting={casting} />; {sayInterchange(interchange, named)}.{note !== null && ` ${sentence(note)}`}
      </>
    ),
  };
}

function PartNumbers({ numbers }: { readonly numbers: CastingPage['partNumbers'] }): ReactNode {
  return numbers.map(({ number, note }, place) => (
    <span key={number}>
      {place > 0 && ', '}
      <span className="font-mono">{number}</span>
      {note !== null && ` (${note})`}
    </span>
  ));
}

/** The casting's own years narrow a decode only for those who ask: a date outside them is a finding. */
function DecodeLinks({ casting: { slug, maker, made } }: { readonly casting: CastingPage }) {
  const said = { ...NOTHING_SAID, maker: maker.slug, casting: slug };
  const within = { ...said, fromYear: made?.from?.slice(0, 4) ?? '', toYear: made?.to?.slice(0, 4) ?? '' };
  return (
    <p className="no-print mt-5 flex flex-wrap items-center gap-x-5 gap-y-2">
      <ButtonLink weight="primary" to={paths.decode(`?${writeDecodeState(said).toString()}`)}>
        Decode a date on this casting
      </ButtonLink>
      {made !== null && (made.from !== null || made.to !== null) && (
        <Link to={paths.decode(`?${writeDecodeState(within).toString()}`)} className="inline-flex min-h-11 items-center">
          Only dates within {sayYears(made)}
        </Link>
      )}
    </p>
  );
}

/** The rule stands as soon as the casting does; ciphers join it as they come, and one that fails leaves the rest as it is. */
function RuleOfCasting({ casting }: { readonly casting: CastingPage }) {
  const queries = useQueries({ queries: casting.ciphers.map(({ slug }) => cipherPage(slug)) });
  const loaded = queries.flatMap(({ data }) => data ?? []);
  const rule = castingRule(casting, ciphersInUse(casting.made, loaded));
  const failed = queries.find(({ error }) => error !== null);
  return (
    <>
      {rule !== null && <TimeRule title={`When ${sayCasting(casting)} was made, and the ciphers its date may be in`} {...rule} />}
      {rule === null && queries.every(({ isPending }) => !isPending) && (
        <p className="border-y border-rule py-4 text-slag">Neither the casting nor a cipher of its maker is dated on record.</p>
      )}
      {failed !== undefined && <FailureNote error={failed.error} onAgain={() => void failed.refetch()} />}
      <CipherList casting={casting} loaded={loaded} />
    </>
  );
}

/** The ciphers its date may be in; those out of use all the while it was made are named apart. */
function CipherList({
  casting: { made, ciphers },
  loaded,
}: {
  readonly casting: CastingPage;
  readonly loaded: readonly CipherPage[];
}) {
  if (ciphers.length === 0)
    return <p className="mt-3 text-slag">No cipher of its maker is on record, so a date on it can’t be decoded yet.</p>;
  const inUse = ciphersInUse(made, loaded);
  const outOfUse = loaded.filter((cipher) => !inUse.includes(cipher));
  const likely = ciphers.filter(({ slug }) => !outOfUse.some((cipher) => cipher.slug === slug));
  return (
    <p className="mt-3 max-w-measure">
      {likely.length > 0 && (
        <>
          Its date may be in <CipherLinks ciphers={likely} last="or" />.{' '}
        </>
      )}
      {outOfUse.length > 0 && (
        <span className="text-slag">
          Out of use all the while it was made: <CipherLinks ciphers={outOfUse} last="and" />.
        </span>
      )}
    </p>
  );
}

function CipherLinks({ ciphers, last }: { readonly ciphers: CastingPage['ciphers']; readonly last: 'and' | 'or' }) {
  return ciphers.map(({ slug, title }, place) => (
    <span key={slug}>
      {place > 0 && (place === ciphers.length - 1 ? ` ${last} ` : ', ')}
      <Link to={paths.cipher(slug)}>{title}</Link>
    </span>
  ));
}

function inOrderOfVerdict(fitments: readonly Fitment[]): Fitment[] {
  return fitments.toSorted((one, other) => FITMENT_VERDICTS.indexOf(one.verdict) - FITMENT_VERDICTS.indexOf(other.verdict));
}

/** As a sentence, whichever way it was entered. */
function sentence(text: string): string {
  const begun = text.charAt(0).toUpperCase() + text.slice(1);
  return /[.!?]$/.test(begun) ? begun : `${begun}.`;
}
