import type { ReactNode } from 'react';
import { PageTitle } from '../../ui/page-title.tsx';
import { PartingLine } from '../../ui/parting-line.tsx';
import { Block } from '../../ui/page-grid.tsx';

type Props = { readonly title: string; readonly below?: string; /** Stands in the margin: other ways. */ readonly aside?: ReactNode; readonly children: ReactNode };

/** A page that is one form. */
export function FormPage({ title, below, aside, children }: Props) {
  return (
    <>
      <PageTitle title={title} {...(below === undefined ? {} : { below })}>
        {title}
      </PageTitle>
      <PartingLine />
      <div className="pt-8">
        <Block {...(aside === undefined ? {} : { margin: <div className="space-y-3 text-[15px] leading-snug text-slag">{aside}</div> })}>{children}</Block>
      </div>
    </>
  );
}
