import { sayFailure } from '../lib/say-failure.ts';
import { Button } from './button.tsx';

/** A part of the page that could not be loaded: what happened, what was kept, what to do. */
export function FailureNote({ error, onAgain }: { readonly error: unknown; readonly onAgain?: () => void }) {
  const { title, advice, again, requestId } = sayFailure(error);
  return (
    <div role="alert" className="max-w-measure border-l-4 border-scale bg-bed px-4 py-3">
      <p className="font-semibold text-scale">{title}</p>
      <p>{advice}</p>
      {requestId !== null && (
        <p className="text-[15px] text-slag">
          Number of this request: <span className="font-mono">{requestId}</span>
        </p>
      )}
      {again && onAgain !== undefined && (
        <Button className="mt-3" onClick={onAgain}>
          Ask again
        </Button>
      )}
    </div>
  );
}
