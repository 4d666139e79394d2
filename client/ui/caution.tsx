import type { ReactNode } from 'react';
import { Icon } from './icon.tsx';

/** Where work can hurt someone, or the part: said where the work is, in plain words. */
export function Caution({ title, children }: { readonly title: string; readonly children: ReactNode }) {
  return (
    <aside className="border-l-2 border-straw py-1 pl-3 text-[15px] leading-snug" aria-label={title}>
      <p className="flex items-center gap-2 font-semibold text-straw">
        <Icon name="warning" /> {title}
      </p>
      <div className="text-graphite">{children}</div>
    </aside>
  );
}
