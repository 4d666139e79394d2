import { Icon } from '../../ui/icon.tsx';

/** Stands where figures would be half old and half new. */
export function WorkingOut({ children }: { readonly children: string }) {
  return (
    <p role="status" className="flex max-w-measure items-baseline gap-2 border-l-4 border-straw bg-bed px-4 py-3">
      <span className="text-straw">
        <Icon name="around" />
      </span>
      <span>
        <strong className="font-semibold">Being worked out again.</strong> {children}
      </span>
    </p>
  );
}
