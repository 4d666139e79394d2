import { useQuery } from '@tanstack/react-query';
import { Link, useParams } from 'react-router-dom';
import type { ReadingDesk } from '#contract/marks.ts';
import { NotFoundPage } from '../../app/error-page.tsx';
import { sayMarkKind } from '../../features/marks/mark-words.ts';
import { SignedInOnly } from '../../features/people/signed-in-only.tsx';
import { Desk } from '../../features/reading/desk.tsx';
import { readingDesk } from '../../features/reading/reading-queries.ts';
import { isNothingThere } from '../../lib/problem-error.ts';
import { paths } from '../../lib/paths.ts';
import { FailureNote } from '../../ui/failure-note.tsx';
import { PageTitle } from '../../ui/page-title.tsx';
import { PartingLine } from '../../ui/parting-line.tsx';
import { Skeleton, SkeletonBar } from '../../ui/skeleton.tsx';

const TITLE = 'Read the mark';

export function Component() {
  const { id = '' } = useParams();
  return <SignedInOnly title={TITLE}>{(viewer) => <DeskOf key={id} id={id} viewerId={viewer.id} />}</SignedInOnly>;
}

function DeskOf({ id, viewerId }: { readonly id: string; readonly viewerId: string }) {
  const { data: desk, error, refetch } = useQuery(readingDesk(id));
  if (desk === undefined && isNothingThere(error)) return <NotFoundPage />;
  return (
    <>
      <PageTitle title={TITLE} above={desk === undefined ? <SkeletonBar width="w-64" /> : <Above desk={desk} />}>
        {TITLE}
      </PageTitle>
      <PartingLine />
      <div className="pt-7">
        {desk !== undefined && <Desk desk={desk} viewerId={viewerId} />}
        {desk === undefined && error !== null && <FailureNote error={error} onAgain={() => void refetch()} />}
        {desk === undefined && error === null && <LoadingDesk />}
      </div>
    </>
  );
}

function Above({ desk }: { readonly desk: ReadingDesk }) {
  const kind = sayMarkKind(desk);
  if (desk.part === null) return <>{kind}</>;
  return (
    <>
      <Link to={paths.part(desk.part.id)}>{desk.part.title}</Link> · {kind.toLowerCase()}
    </>
  );
}

function LoadingDesk() {
  return (
    <div className="page-block">
      <div>
        <div aria-hidden="true" className="skeleton-bar aspect-[3/2] rounded bg-bed roomy:aspect-[2/1]" />
        <Skeleton lines={3} label="Loading the mark" />
      </div>
    </div>
  );
}
