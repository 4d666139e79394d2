import type { ReactNode } from 'react';

type Props = {
  /** The page's one heading. */
  readonly children: ReactNode;
  /** The window's title, without the register's name. */
  readonly title: string;
  /** What stands above the heading: where this belongs. */
  readonly above?: ReactNode;
  /** One sentence below it. */
  readonly below?: ReactNode;
};

/** The head of a page. The heading takes focus when the page is reached by a link. */
export function PageTitle({ children, title, above, below }: Props) {
  return (
    <header className="pt-6 pb-5 wide:pt-8">
      <title>{`${title} · Pourbook`}</title>
      {above !== undefined && <p className="mb-1 text-slag">{above}</p>}
      <h1 tabIndex={-1} data-page-heading="" className="flex flex-wrap items-center gap-x-4 gap-y-2 text-[32px] leading-tight font-semibold outline-none wide:text-[40px]">
        {children}
      </h1>
      {below !== undefined && <p className="mt-1 text-[19px] leading-snug text-slag italic">{below}</p>}
    </header>
  );
}
