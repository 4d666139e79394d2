import { useEffect, useRef } from 'react';
import type { ReactNode } from 'react';

/** What came of a form, standing in its place; takes focus, so that it is read out and Tab goes on from here. */
export function Outcome({ title, children, action }: { readonly title: string; readonly children: ReactNode; readonly action?: ReactNode }) {
  const box = useRef<HTMLDivElement>(null);
  useEffect(() => box.current?.focus(), []);
  return (
    <div ref={box} tabIndex={-1} role="status" className="max-w-measure border-l-4 border-verdigris bg-bed px-4 py-3 outline-none">
      <p className="font-semibold">{title}</p>
      <div className="space-y-3">{children}</div>
      {action !== undefined && <div className="mt-4 mb-1 flex flex-wrap gap-3">{action}</div>}
    </div>
  );
}
