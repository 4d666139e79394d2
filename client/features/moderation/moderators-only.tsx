import { useQuery } from '@tanstack/react-query';
import type { ReactNode } from 'react';
import type { Me } from '#contract/people.ts';
import { NotFoundPage } from '../../app/error-page.tsx';
import { FailureNote } from '../../ui/failure-note.tsx';
import { PageTitle } from '../../ui/page-title.tsx';
import { PartingLine } from '../../ui/parting-line.tsx';
import { Skeleton } from '../../ui/skeleton.tsx';
import { SecondFactorOwed } from '../people/act-trouble.tsx';
import { me } from '../people/people-queries.ts';

/** A page for whoever decides contributions. For everybody else it is not there; who still owes a second factor is told so. */
export function ModeratorsOnly({ children }: { readonly children: (viewer: Me) => ReactNode }) {
  const { data: viewer, error, refetch } = useQuery(me());
  if (viewer === undefined) {
    return <div className="pt-8">{error === null ? <Skeleton lines={6} label="Loading the page" /> : <FailureNote error={error} onAgain={() => void refetch()} />}</div>;
  }
  if (viewer === null || viewer.role === 'member') return <NotFoundPage />;
  if (!viewer.secondFactorOwed) return viewer.can.decideContributions || viewer.role === 'registrar' ? children(viewer) : <NotFoundPage />;
  return (
    <>
      <PageTitle title="One step before this page">One step before this page</PageTitle>
      <PartingLine />
      <div className="max-w-measure pt-8">
        <SecondFactorOwed />
      </div>
    </>
  );
}
