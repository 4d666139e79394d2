import { useQueryErrorResetBoundary } from '@tanstack/react-query';
import { isRouteErrorResponse, useRevalidator, useRouteError } from 'react-router-dom';
import { paths } from '../lib/paths.ts';
import { problemOfKind } from '../lib/problem-error.ts';
import { sayFailure } from '../lib/say-failure.ts';
import type { Failure } from '../lib/say-failure.ts';
import { Button, ButtonLink } from '../ui/button.tsx';
import { PageTitle } from '../ui/page-title.tsx';
import { PartingLine } from '../ui/parting-line.tsx';
import { Frame } from './layout.tsx';

/** Stands in a page's place inside the frame: what happened, what was kept, what to do. */
export function ErrorPage() {
  const error = useRouteError();
  const { revalidate, state } = useRevalidator();
  const { reset } = useQueryErrorResetBoundary();
  const again = () => {
    reset();
    void revalidate();
  };
  return <FailurePage failure={failureOf(error)} onAgain={again} asking={state === 'loading'} />;
}

/** An address that no page stands at. */
export function NotFoundPage() {
  return <FailurePage failure={sayFailure(problemOfKind('not-found'))} />;
}

type Props = { readonly failure: Failure; readonly onAgain?: () => void; readonly asking?: boolean };

function FailurePage({ failure, onAgain, asking = false }: Props) {
  return (
    <>
      <PageTitle title={failure.title}>{failure.title}</PageTitle>
      <PartingLine />
      <div role="alert" className="max-w-measure space-y-6 pt-8">
        <p>{failure.advice}</p>
        {failure.requestId !== null && (
          <p className="text-[15px] text-slag">
            Number of this request: <span className="font-mono">{failure.requestId}</span>
          </p>
        )}
        <div className="flex flex-wrap gap-3">
          {failure.again && onAgain !== undefined && (
            <Button weight="primary" disabled={asking} onClick={onAgain}>
              Ask again
            </Button>
          )}
          <ButtonLink to={paths.decode()}>Decode a mark</ButtonLink>
          <ButtonLink to={paths.catalogue()}>Open the catalogue</ButtonLink>
        </div>
      </div>
    </>
  );
}

/** The same when the frame itself could not be drawn by its route. */
export function FramedErrorPage() {
  return (
    <Frame>
      <ErrorPage />
    </Frame>
  );
}

function failureOf(error: unknown): Failure {
  return sayFailure(isRouteErrorResponse(error) ? problemOfKind(error.status === 404 ? 'not-found' : 'internal') : error);
}
