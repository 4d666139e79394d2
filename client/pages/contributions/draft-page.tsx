import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Navigate, useParams } from 'react-router-dom';
import type { ContributionPage } from '#contract/contributions.ts';
import { NotFoundPage } from '../../app/error-page.tsx';
import { contributionPage } from '../../features/contributions/contributions-queries.ts';
import { DraftEditor } from '../../features/contributions/draft-editor.tsx';
import { SignedInOnly } from '../../features/people/signed-in-only.tsx';
import { paths } from '../../lib/paths.ts';
import { ProblemError } from '../../lib/problem-error.ts';
import { FailureNote } from '../../ui/failure-note.tsx';
import { Skeleton } from '../../ui/skeleton.tsx';

export function Component() {
  const { id = '' } = useParams();
  return <SignedInOnly title="A draft">{() => <DraftOf key={id} id={id} />}</SignedInOnly>;
}

/** Written on only from what the register has now: a draft begun from an old copy would be refused at the first saving. */
function DraftOf({ id }: { readonly id: string }) {
  const { data, error, refetch, isFetchedAfterMount } = useQuery({ ...contributionPage(id), refetchOnMount: 'always' });
  if (data !== undefined && isFetchedAfterMount) return <Editable contribution={data} />;
  if (error instanceof ProblemError && (error.kind === 'not-found' || error.kind === 'invalid')) return <NotFoundPage />;
  return <div className="pt-8">{error === null ? <Skeleton lines={8} label="Loading the draft" /> : <FailureNote error={error} onAgain={() => void refetch()} />}</div>;
}

/** What was put forward already is read on its page. That it was meanwhile, is for the draft itself to say. */
function Editable({ contribution }: { readonly contribution: ContributionPage }) {
  const [canEdit] = useState(contribution.can.edit);
  return canEdit ? <DraftEditor contribution={contribution} /> : <Navigate to={paths.contribution(contribution.id)} replace />;
}
