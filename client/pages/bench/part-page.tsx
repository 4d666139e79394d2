import { useQuery } from '@tanstack/react-query';
import { Link, useParams } from 'react-router-dom';
import type { PartPage } from '#contract/parts.ts';
import { NotFoundPage } from '../../app/error-page.tsx';
import { pathOfRef } from '../../features/contributions/path-of-ref.ts';
import { WorkingOut } from '../../features/moderation/working-out.tsx';
import { PartMarks } from '../../features/parts/part-marks.tsx';
import { PartPhotos } from '../../features/parts/part-photos.tsx';
import { sayVisibility, sayWhoSees } from '../../features/parts/part-words.ts';
import { partPage } from '../../features/parts/parts-queries.ts';
import { RemovePart } from '../../features/parts/remove-part.tsx';
import { me } from '../../features/people/people-queries.ts';
import { MarkText } from '../../features/marks/mark-text.tsx';
import { paths } from '../../lib/paths.ts';
import { isNothingThere } from '../../lib/problem-error.ts';
import { sayMoment } from '../../lib/say-date.ts';
import { ButtonLink } from '../../ui/button.tsx';
import { FailureNote } from '../../ui/failure-note.tsx';
import { Block, PageGrid } from '../../ui/page-grid.tsx';
import { PageTitle } from '../../ui/page-title.tsx';
import { PartingLine } from '../../ui/parting-line.tsx';
import { Skeleton } from '../../ui/skeleton.tsx';
import { FactList } from '../catalogue/fact-list.tsx';
import type { Fact } from '../catalogue/fact-list.tsx';

export function Component() {
  const { id = '' } = useParams();
  const { data: part, error, refetch } = useQuery(partPage(id));
  if (part !== undefined) return <Part key={id} part={part} />;
  // A private part of somebody else is nothing at an address.
  if (isNothingThere(error)) return <NotFoundPage />;
  return (
    <>
      <PageTitle title="A part on record">A part on record</PageTitle>
      <PartingLine />
      <div className="pt-8">
        {error === null ? <Skeleton lines={8} label="Loading the part" /> : <FailureNote error={error} onAgain={() => void refetch()} />}
      </div>
    </>
  );
}

function Part({ part }: { readonly part: PartPage }) {
  const { id, title, visibility, isMine, can, marks, workingOut } = part;
  const { data: viewer } = useQuery(me());
  // What is to be done next: read what nobody has read, else add what is not there yet.
  const next = viewer ? marks.find(({ reading, hidden }) => (isMine ? reading === null : hidden)) : undefined;
  return (
    <>
      <PageTitle title={title} above={isMine ? <Link to={paths.bench()}>Bench</Link> : 'A part on record'} {...(isMine ? { below: `${sayVisibility(visibility)}. ${sayWhoSees(visibility)}` } : {})}>
        {title}
      </PageTitle>
      <PartingLine />
      <div className="pt-8">
        <PageGrid>
          <Block heading="Photos">
            <PartPhotos part={part} />
          </Block>
          <Block heading="Marks" margin={<p className="text-[14px] leading-[1.45] text-slag">A date can only show that a part could have been there, and says nothing of how sound it is.</p>}>
            {workingOut && (
              <div className="mb-4">
                <WorkingOut>Its dates stand here again once that is done.</WorkingOut>
              </div>
            )}
            <PartMarks part={part} canRead={Boolean(viewer)} next={next?.id ?? null} />
            {can.addMark && (
              <ButtonLink weight={next === undefined ? 'primary' : 'plain'} to={paths.newMark(id)} className="no-print mt-4">
                Add a mark
              </ButtonLink>
            )}
          </Block>
          <Block heading="What is on record">
            <FactList facts={factsOf(part)} />
          </Block>
          {(can.change || can.remove) && (
            <section aria-label="Change the part" className="no-print flex flex-col items-start gap-3">
              {can.change && <ButtonLink to={paths.changePart(id)}>Change what is on record</ButtonLink>}
              {can.remove && <RemovePart id={id} />}
            </section>
          )}
        </PageGrid>
      </div>
    </>
  );
}

function factsOf({ partType, called, maker, casting, number, foundOn, fittedTo, condition, note, recordedAt }: PartPage): readonly Fact[] {
  return [
    { name: 'What it is', value: partType === null ? (called ?? <Open />) : <Link to={paths.partType(partType.slug)}>{partType.name}</Link> },
    ...(partType !== null && called !== null ? [{ name: 'Called', value: called }] : []),
    ...(number === null ? [] : [{ name: 'Casting number', value: <MarkText text={number} /> }]),
    ...(casting === null ? [] : [{ name: 'Casting', value: <Link to={pathOfRef(casting)}>{casting.title}</Link> }]),
    { name: 'Maker', value: maker === null ? <Open /> : <Link to={paths.maker(maker.slug)}>{maker.name}</Link> },
    { name: 'Found on', value: foundOn === null ? <Open /> : <FoundOn foundOn={foundOn} /> },
    {
      name: 'It is now',
      value:
        fittedTo === null ? (
          'on the bench'
        ) : (
          <>
            on <Link to={paths.model(fittedTo.model.slug)}>{fittedTo.model.name}</Link> <span className="font-mono">{fittedTo.serial}</span>, {fittedTo.position.toLowerCase()}
          </>
        ),
    },
    { name: 'Condition', value: condition === null ? <Open /> : <span className="whitespace-pre-line wrap-anywhere">{condition}</span> },
    ...(note === null ? [] : [{ name: 'Note for yourself', value: <span className="whitespace-pre-line wrap-anywhere">{note}</span> }]),
    { name: 'On record', value: `since ${sayMoment(recordedAt)}` },
  ];
}

function FoundOn({ foundOn: { model, serial } }: { readonly foundOn: NonNullable<PartPage['foundOn']> }) {
  return (
    <>
      {model !== null && <Link to={paths.model(model.slug)}>{model.name}</Link>}
      {model !== null && serial !== null && ', '}
      {serial !== null && <span className="font-mono">{serial}</span>}
    </>
  );
}

function Open() {
  return <span className="text-slag italic">not said</span>;
}
