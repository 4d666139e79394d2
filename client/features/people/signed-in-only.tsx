import { useQuery } from '@tanstack/react-query';
import type { ReactNode } from 'react';
import { useLocation } from 'react-router-dom';
import type { Me } from '#contract/people.ts';
import { paths } from '../../lib/paths.ts';
import { ButtonLink } from '../../ui/button.tsx';
import { FailureNote } from '../../ui/failure-note.tsx';
import { PageTitle } from '../../ui/page-title.tsx';
import { PartingLine } from '../../ui/parting-line.tsx';
import { Skeleton } from '../../ui/skeleton.tsx';
import { me } from './people-queries.ts';

/** A page for members: a visitor, or somebody whose session ended meanwhile, is offered to sign in and comes back to it. */
export function SignedInOnly({ title, children }: { readonly title: string; readonly children: (viewer: Me) => ReactNode }) {
  const { data: viewer, error, refetch } = useQuery(me());
  if (viewer) return children(viewer);
  if (viewer === null) return <SignInFirst />;
  return (
    <>
      <PageTitle title={title}>{title}</PageTitle>
      <PartingLine />
      <div className="pt-8">
        {error === null ? <Skeleton lines={6} label="Finding out who you are" /> : <FailureNote error={error} onAgain={() => void refetch()} />}
      </div>
    </>
  );
}

function SignInFirst() {
  const { pathname, search, hash } = useLocation();
  return (
    <>
      <PageTitle title="Sign in first" below="This page is a member’s own.">
        Sign in first
      </PageTitle>
      <PartingLine />
      <div className="max-w-measure space-y-6 pt-8">
        <p>You are not signed in, or no longer. Sign in and you come back to this page.</p>
        <div className="flex flex-wrap gap-3">
          <ButtonLink weight="primary" to={paths.signIn(`${pathname}${search}${hash}`)}>
            Sign in
          </ButtonLink>
          <ButtonLink to={paths.signUp()}>Open an account</ButtonLink>
        </div>
      </div>
    </>
  );
}
