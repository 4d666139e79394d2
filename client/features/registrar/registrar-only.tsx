import { useQuery } from '@tanstack/react-query';
import type { ReactNode } from 'react';
import type { ViewerCan } from '#contract/people.ts';
import type { z } from 'zod';
import { NotFoundPage } from '../../app/error-page.tsx';
import { FailureNote } from '../../ui/failure-note.tsx';
import { PageTitle } from '../../ui/page-title.tsx';
import { PartingLine } from '../../ui/parting-line.tsx';
import { Skeleton } from '../../ui/skeleton.tsx';
import { SecondFactorOwed } from '../people/act-trouble.tsx';
import { me } from '../people/people-queries.ts';

type Props = { readonly can: keyof z.infer<typeof ViewerCan>; readonly children: ReactNode };

/**
 * A page of the registrars'. For everybody else it is not there, as the register itself answers; a registrar who still owes a second factor
 * is told so.
 */
export function RegistrarOnly({ can, children }: Props) {
  const { data: viewer, error, refetch } = useQuery(me());
  if (viewer?.can[can]) return children;
  if (viewer?.role === 'registrar' && viewer.secondFactorOwed) {
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
  if (viewer !== undefined) return <NotFoundPage />;
  return <div className="pt-8">{error === null ? <Skeleton lines={6} label="Loading the page" /> : <FailureNote error={error} onAgain={() => void refetch()} />}</div>;
}
