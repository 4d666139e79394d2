import { useQuery } from '@tanstack/react-query';
import { Link, useLocation, useParams } from 'react-router-dom';
import type { MarkPage } from '#contract/marks.ts';
import { NotFoundPage } from '../../app/error-page.tsx';
import { pathOfRef } from '../../features/contributions/path-of-ref.ts';
import { ChangeMark } from '../../features/marks/change-mark.tsx';
import { HiddenReadings } from '../../features/marks/hidden-readings.tsx';
import { InForcePart } from '../../features/marks/in-force-part.tsx';
import { MarkDates } from '../../features/marks/mark-dates.tsx';
import { MarkPhotos } from '../../features/marks/mark-photos.tsx';
import { MarkText } from '../../features/marks/mark-text.tsx';
import { sayEvidence, sayEvidenceMeans, sayMarkKind, sayWhatRaises } from '../../features/marks/mark-words.ts';
import { markPage } from '../../features/marks/marks-queries.ts';
import { ReadingsTable } from '../../features/marks/readings-table.tsx';
import { WorkingOut } from '../../features/moderation/working-out.tsx';
import { me } from '../../features/people/people-queries.ts';
import { paths } from '../../lib/paths.ts';
import { isNothingThere } from '../../lib/problem-error.ts';
import { ButtonLink } from '../../ui/button.tsx';
import { FailureNote } from '../../ui/failure-note.tsx';
import { Icon } from '../../ui/icon.tsx';
import { Block, PageGrid } from '../../ui/page-grid.tsx';
import { PageTitle } from '../../ui/page-title.tsx';
import { PartingLine } from '../../ui/parting-line.tsx';
import { Skeleton } from '../../ui/skeleton.tsx';
import { FactList } from '../catalogue/fact-list.tsx';

export function Component() {
  const { id = '' } = useParams();
  const { data: mark, error, refetch } = useQuery(markPage(id));
  if (mark !== undefined) return <Mark key={id} mark={mark} />;
  // An id that is none is nothing at an address, like one that no public mark has.
  if (isNothingThere(error)) return <NotFoundPage />;
  return (
    <>
      <PageTitle title="A mark on record">A mark on record</PageTitle>
      <PartingLine />
      <div className="pt-8">
        {error === null ? <Skeleton lines={6} label="Loading the mark" /> : <FailureNote error={error} onAgain={() => void refetch()} />}
      </div>
    </>
  );
}

function Mark({ mark }: { readonly mark: MarkPage }) {
  const { reading, hidden, part, can } = mark;
  return (
    <>
      <PageTitle
        title={hidden ? 'A mark to read' : reading === null ? 'A mark not read yet' : `Mark ${reading}`}
        above={part === null ? <Link to={paths.marks()}>Record of marks</Link> : <Link to={paths.part(part.id)}>{part.title}</Link>}
        below={sayMarkKind(mark)}
      >
        {hidden ? 'A mark to read' : reading === null ? 'Not read yet' : <MarkText text={reading} />}
      </PageTitle>
      <PartingLine />
      <div className="pt-8">
        <PageGrid>
          <Block heading={mark.photos.length === 1 ? 'Its photo' : 'Its photos'} margin={<EvidenceNote mark={mark} />}>
            <MarkPhotos mark={mark} />
            {!hidden && <ReadIt mark={mark} />}
          </Block>
          {hidden ? (
            <Block heading="Read it before you look">
              <HiddenReadings id={mark.id} />
            </Block>
          ) : (
            <Told mark={mark} />
          )}
          {(can.change || can.remove) && (
            <Block heading="Change it">
              <ChangeMark mark={mark} />
            </Block>
          )}
        </PageGrid>
      </div>
    </>
  );
}

/** Everything that is kept from somebody who is to read it first. */
function Told({ mark }: { readonly mark: MarkPage }) {
  const { kind, dates, workingOut, inForce, readings } = mark;
  return (
    <>
      {kind === 'date-code' && (
        <Block heading="What it can mean" margin={<p className="text-[14px] leading-[1.45] text-slag">A date can only show that a part could have been there.</p>}>
          {workingOut ? (
            <WorkingOut>Its dates stand here again once that is done.</WorkingOut>
          ) : dates === null ? (
            <p className="text-slag">Nobody has read it yet, so there is nothing to date.</p>
          ) : (
            <MarkDates dates={dates} />
          )}
        </Block>
      )}
      <Block heading="Where it was found">
        <Found mark={mark} />
      </Block>
      {readings.length > 0 && (
        <Block
          heading="How it is read"
          margin={
            <p className="text-[14px] leading-[1.45] text-slag">
              The limits are those of Wilson (1927) at 95 %: between which shares of all who might read it so the true one lies. Few readers leave them wide.
            </p>
          }
        >
          {inForce === null ? (
            <p className="text-slag">No reading counts by itself: each was made by somebody who had seen another, or was taken back. The latest that stands is shown above.</p>
          ) : (
            <InForcePart inForce={inForce} />
          )}
        </Block>
      )}
      <Block heading="All readings" margin={<p className="text-[14px] leading-[1.45] text-slag">Nothing is overwritten: what was taken back or read again stays here, and says so.</p>}>
        <ReadingsTable mark={mark} />
      </Block>
    </>
  );
}

/** The way to the reading screen, for a member and for a visitor. */
function ReadIt({ mark: { id, photos, readings, wantsReading, can } }: { readonly mark: MarkPage }) {
  const { pathname } = useLocation();
  const { data: viewer } = useQuery(me());
  // Without a photo only whoever has it before them can read it.
  if (photos.length === 0 && !can.change) return null;
  const isAgain = readings.some(({ isMine, takenBackAt }) => isMine && takenBackAt === null);
  return (
    <div className="no-print mt-4 flex flex-wrap items-center gap-x-4 gap-y-2">
      {can.read && (
        <ButtonLink weight={isAgain ? 'plain' : 'primary'} to={paths.readMark(id)}>
          {isAgain ? 'Read it again' : 'Read this mark'}
        </ButtonLink>
      )}
      {wantsReading && <p className="text-slag">Another reading is wanted.</p>}
      {viewer === null && (
        <p>
          <Link to={paths.signIn(pathname)} className="inline-flex min-h-11 items-center">
            Sign in to read it
          </Link>
        </p>
      )}
    </div>
  );
}

function EvidenceNote({ mark: { evidence, hidden } }: { readonly mark: MarkPage }) {
  const raises = sayWhatRaises(evidence);
  return (
    <div className="space-y-2 text-[14px] leading-[1.45] text-slag">
      <p className="flex items-center gap-2 font-semibold text-graphite">
        <Icon name={evidence === 'confirmed' || evidence === 'documented' ? 'check' : 'dash'} /> Evidence: {sayEvidence(evidence).toLowerCase()}
      </p>
      <p>{sayEvidenceMeans(evidence)}</p>
      {raises !== null && !hidden && <p>{raises}</p>}
    </div>
  );
}

function Found({ mark: { part, casting, machine, maker } }: { readonly mark: MarkPage }) {
  const facts = [
    ...(part === null ? [] : [{ name: 'Part', value: <Link to={paths.part(part.id)}>{part.title}</Link> }]),
    ...(casting === null ? [] : [{ name: 'Casting', value: <Link to={pathOfRef(casting)}>{casting.title}</Link> }]),
    ...(maker === null ? [] : [{ name: 'Maker', value: <Link to={paths.maker(maker.slug)}>{maker.name}</Link> }]),
    ...(machine === null
      ? []
      : [
          { name: 'Machine', value: <Link to={paths.model(machine.model.slug)}>{machine.model.name}</Link> },
          { name: 'Its serial', value: <span className="font-mono">{machine.serial}</span> },
        ]),
  ];
  return facts.length === 0 ? <p className="text-slag">On a part by itself, whose casting is not known.</p> : <FactList facts={facts} />;
}
