import { useParams } from 'react-router-dom';
import { PROBLEM_KINDS, PROBLEMS } from '#contract/problem.ts';
import { problemOfKind } from '../lib/problem-error.ts';
import { sayFailure } from '../lib/say-failure.ts';
import { EmptyState } from '../ui/empty-state.tsx';
import { PageTitle } from '../ui/page-title.tsx';
import { PartingLine } from '../ui/parting-line.tsx';

/** The address an API problem's `type` points to, in words. */
export function Component() {
  const { kind: wanted } = useParams();
  const kind = PROBLEM_KINDS.find((known) => known === wanted);
  if (kind === undefined) return <EmptyState title="No such kind of problem">The register’s problems are listed with its interface, at /api/openapi.json.</EmptyState>;
  const { status, title } = PROBLEMS[kind];
  const { advice } = sayFailure(problemOfKind(kind));
  return (
    <>
      <PageTitle title={title} above={`Answer ${status} of the register’s interface`}>
        {title}
      </PageTitle>
      <PartingLine />
      <p className="max-w-measure pt-8">{advice}</p>
    </>
  );
}
