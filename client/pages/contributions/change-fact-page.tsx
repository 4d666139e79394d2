import { useQuery } from '@tanstack/react-query';
import { useParams } from 'react-router-dom';
import { NotFoundPage } from '../../app/error-page.tsx';
import { BeginDraft } from '../../features/contributions/begin-draft.tsx';
import { historyOfFact } from '../../features/contributions/contributions-queries.ts';
import { SignedInOnly } from '../../features/people/signed-in-only.tsx';
import { paths } from '../../lib/paths.ts';
import { ProblemError } from '../../lib/problem-error.ts';
import { ButtonLink } from '../../ui/button.tsx';
import { EmptyState } from '../../ui/empty-state.tsx';
import { FailureNote } from '../../ui/failure-note.tsx';
import { Skeleton } from '../../ui/skeleton.tsx';

/** Begins a change of a fact on the version in force of it. */
export function Component() {
  const { id = '' } = useParams();
  return <SignedInOnly title="A change">{() => <ChangeOf key={id} id={id} />}</SignedInOnly>;
}

function ChangeOf({ id }: { readonly id: string }) {
  const { data: history, error, refetch } = useQuery(historyOfFact(id));
  if (history === undefined) {
    if (error instanceof ProblemError && (error.kind === 'not-found' || error.kind === 'invalid')) return <NotFoundPage />;
    return <div className="pt-8">{error === null ? <Skeleton lines={6} label="Loading the entry" /> : <FailureNote error={error} onAgain={() => void refetch()} />}</div>;
  }
  const { fact, inForce } = history;
  if (inForce === null) {
    return (
      <div className="pt-8">
        <EmptyState title="Nothing of it is in force" action={<ButtonLink to={paths.factHistory(id)}>What became of it</ButtonLink>}>
          {fact.title} was retired, so there is nothing to change.
        </EmptyState>
      </div>
    );
  }
  return <BeginDraft title={`A change to ${fact.title}`} body={{ kind: fact.kind, subjectId: fact.id, baseVersion: inForce }} />;
}
