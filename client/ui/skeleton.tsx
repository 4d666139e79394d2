const WIDTHS = ['w-11/12', 'w-full', 'w-4/5', 'w-2/3'] as const;

/** Holds the place of text that is on its way. `label` is read out once; the bars are not. */
export function Skeleton({ lines = 3, label }: { readonly lines?: number; readonly label: string }) {
  return (
    <div role="status" className="space-y-3 py-2">
      <span className="sr-only">{label}</span>
      {Array.from({ length: lines }, (_, line) => (
        <SkeletonBar key={line} width={WIDTHS[line % WIDTHS.length] ?? 'w-full'} />
      ))}
    </div>
  );
}

/** One bar, for a cell or a line. */
export function SkeletonBar({ width = 'w-full' }: { readonly width?: string }) {
  return <span aria-hidden="true" className={`skeleton-bar block h-4 max-w-full rounded bg-bed ${width}`} />;
}
