import type { ReactNode } from 'react';
import { ProblemError } from '../../lib/problem-error.ts';

/** The link that led here can't be used, whyever. */
export function DeadLink({ lasts, action }: { /** How long such a link works. */ readonly lasts: string; readonly action: ReactNode }) {
  return (
    <div role="alert" className="max-w-measure border-l-4 border-scale bg-bed px-4 py-3">
      <p className="font-semibold text-scale">This link does not work, or no longer</p>
      <p>It works once, within {lasts}, and a newer one takes its place. Perhaps it was cut short when it was copied.</p>
      <div className="mt-4 mb-1 flex flex-wrap gap-3">{action}</div>
    </div>
  );
}

/** What the register says of a link that is used up, too old or mistyped. */
export function isDeadLink(error: Error | null): boolean {
  return error instanceof ProblemError && error.faults.some(({ path }) => path[0] === 'token');
}
