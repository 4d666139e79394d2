import type { ReactNode } from 'react';

type Props = { /** Where a link to this part leads. */ readonly id: string; readonly heading: string; readonly children: ReactNode };

/** One part of the account page, with an address of its own. */
export function AccountSection({ id, heading, children }: Props) {
  return (
    <section id={id} aria-labelledby={`${id}-heading`} tabIndex={-1} className="scroll-mt-4 border-t border-rule pt-5 outline-none">
      <h2 id={`${id}-heading`} className="mb-3 text-[22px] leading-tight font-semibold">
        {heading}
      </h2>
      {children}
    </section>
  );
}
