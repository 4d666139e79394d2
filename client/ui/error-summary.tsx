import { useEffect, useRef } from 'react';
import type { ReactNode } from 'react';

export type SummaryFault = { readonly message: string; /** id of the control it is about; null for the whole form. */ readonly controlId: string | null };

/** What went wrong with a form, in one place; takes focus whenever the faults change. */
export function ErrorSummary({ title, faults, children }: { readonly title: string; readonly faults: readonly SummaryFault[]; readonly children?: ReactNode }) {
  const box = useRef<HTMLDivElement>(null);
  useEffect(() => box.current?.focus(), [faults]);
  return (
    <div ref={box} tabIndex={-1} role="alert" className="mb-6 border-l-4 border-scale bg-bed px-4 py-3">
      <p className="font-semibold text-scale">{title}</p>
      {faults.length > 0 && (
        <ul className="list-disc pl-5">
          {faults.map(({ message, controlId }) => (
            <li key={`${controlId ?? ''} ${message}`}>{controlId === null ? message : <a href={`#${controlId}`}>{message}</a>}</li>
          ))}
        </ul>
      )}
      {children}
    </div>
  );
}
