import { ProblemError } from '../../lib/problem-error.ts';
import { sayFailure } from '../../lib/say-failure.ts';
import { Button } from '../../ui/button.tsx';

type Props = {
  readonly error: unknown;
  /** What the attempt was about: `reading`, `outline`. */
  readonly what: string;
  /** This device has what was not saved, and brings it back after a reload. */
  readonly kept: boolean;
  readonly onAgain: () => void;
};

/** Something was not saved: what happened, what was kept, what to do. */
export function SaveTrouble({ error, what, kept, onAgain }: Props) {
  const { title, advice, again, requestId } = failureOf(error);
  return (
    <div role="alert" className="mt-4 max-w-measure border-l-4 border-scale bg-bed px-4 py-3">
      <p className="font-semibold text-scale">{title}</p>
      <p>
        Your {what} was not saved{kept ? '; it is kept in this tab' : ', and this browser keeps nothing: leave the page open'}. {advice}
      </p>
      {requestId !== null && (
        <p className="text-[15px] text-slag">
          Number of this request: <span className="font-mono">{requestId}</span>
        </p>
      )}
      {again && (
        <Button className="mt-3" onClick={onAgain}>
          Save it again
        </Button>
      )}
    </div>
  );
}

function failureOf(error: unknown) {
  if (error instanceof ProblemError && error.kind === 'not-found') {
    return { title: 'The mark is no longer there', advice: 'It was taken off the record, or its holder made it private.', again: false, requestId: error.requestId };
  }
  if (error instanceof ProblemError && error.kind === 'conflict') {
    return { title: 'The mark changed in the meantime', advice: error.message, again: true, requestId: error.requestId };
  }
  const failure = sayFailure(error);
  return { ...failure, advice: failure.again ? 'Save it again in a moment.' : failure.advice };
}
