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

type Props = {
  readonly title: string;
  /** What stands here for members, told to a visitor. */
  readonly about?: ReactNode;
  readonly children: (viewer: Me) => ReactNode;
};

/** A page for members: a visitor, or somebody whose session ended meanwhile, is offered to sign in and comes back to it. */
export function SignedInOnly({ title, about, children }: Props) {
  const { data: viewer, error, refetch } = useQuery(me());
  if (viewer) return children(viewer);
  if (viewer === null) return about === undefined ? <SignInFirst /> : <SignInFirst title={title} about={about} />;
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

const NOT_SIGNED_IN = <p>You are not signed in, or no longer. Sign in and you come back to this page.</p>;

function SignInFirst({ title = 'Sign in first', about = NOT_SIGNED_IN }: { readonly title?: string; readonly about?: ReactNode }) {
  const { pathname, search, hash } = useLocation();
  return (
    <>
      <PageTitle title={title} below="This page is a member’s own.">
        {title}
      </PageTitle>
      <PartingLine />
      <div className="max-w-measure space-y-6 pt-8">
        {about}
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
