import type { ReactNode } from 'react';

/** Says what will stand here and offers the first step. */
export function EmptyState({ title, children, action }: { readonly title: string; readonly children: ReactNode; readonly action?: ReactNode }) {
  return (
    <div className="max-w-measure border-y border-rule py-6">
      <p className="font-semibold">{title}</p>
      <div className="text-slag">{children}</div>
      {action !== undefined && <div className="mt-4 flex flex-wrap gap-3">{action}</div>}
    </div>
  );
}
