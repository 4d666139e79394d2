import { PROBLEMS } from '#contract/problem.ts';
import { ProblemError, UnreachableError } from './problem-error.ts';

export type Failure = {
  /** What happened. */
  readonly title: string;
  /** What was kept and what to do. */
  readonly advice: string;
  /** Whether asking again may help. */
  readonly again: boolean;
  readonly requestId: string | null;
};

/** Says in plain words what happened, what was kept and what to do. */
export function sayFailure(error: unknown): Failure {
  if (error instanceof UnreachableError) return { ...UNREACHABLE[error.reason], again: true, requestId: null };
  if (error instanceof ProblemError) return sayProblem(error);
  return { title: 'Something broke in this page', advice: 'What you typed is still in the address. Load the page again.', again: true, requestId: null };
}

const UNREACHABLE: Readonly<Record<UnreachableError['reason'], Pick<Failure, 'title' | 'advice'>>> = {
  offline: { title: 'This device is offline', advice: 'What you typed is kept here and in the address. It is asked again when you are back in range.' },
  timeout: { title: 'The register took too long to answer', advice: 'What you typed is kept. Ask again in a moment.' },
  'no-answer': { title: 'The register could not be reached', advice: 'What you typed is kept. Check the connection and ask again.' },
};

function sayProblem({ kind, message, requestId, retryAfter, faults }: ProblemError): Failure {
  const when = retryAfter === null ? 'in a moment' : `in ${retryAfter} ${retryAfter === 1 ? 'second' : 'seconds'}`;
  switch (kind) {
    case 'not-found':
      return { title: 'Nothing stands at this address', advice: 'It may have been renamed. Look for it in the catalogue.', again: false, requestId };
    case 'unavailable':
      return { title: 'The register is away for a moment', advice: `What you typed is kept. Ask again ${when}.`, again: true, requestId };
    case 'too-many-requests':
      return { title: 'Too many questions at once', advice: `What you typed is kept. Ask again ${when}.`, again: true, requestId };
    case 'invalid':
    case 'malformed':
      return { title: 'The register can’t use what was typed', advice: faults[0]?.message ?? message, again: false, requestId };
    case 'not-signed-in':
      return { title: 'This needs an account', advice: 'Sign in, then come back to this address.', again: false, requestId };
    case 'not-allowed':
    case 'identity-not-confirmed':
    case 'second-factor-owed':
      return { title: PROBLEMS[kind].title, advice: message, again: false, requestId };
    case 'no-room':
      return { title: PROBLEMS[kind].title, advice: message, again: true, requestId };
    case 'conflict':
      return { title: 'It changed in the meantime', advice: 'Load it again to see what it is now. Nothing of yours was written.', again: true, requestId };
    case 'internal':
      return { title: 'Something broke on our side', advice: 'What you typed is kept. Ask again; if it stays broken, tell us the number below.', again: true, requestId };
    case 'method-not-allowed':
    case 'too-large':
    case 'unsupported-media-type':
      return { title: 'The register did not take this', advice: message, again: false, requestId };
  }
}
