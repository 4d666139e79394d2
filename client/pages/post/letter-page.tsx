import type { QueryClient } from '@tanstack/react-query';
import { useSuspenseQuery } from '@tanstack/react-query';
import { Link, useParams } from 'react-router-dom';
import type { LoaderFunction } from 'react-router-dom';
import { paths } from '../../lib/paths.ts';
import { sayInstant } from '../../lib/say-instant.ts';
import { Block, PageGrid } from '../../ui/page-grid.tsx';
import { PageTitle } from '../../ui/page-title.tsx';
import { PartingLine } from '../../ui/parting-line.tsx';
import { asMissing, postLetter } from './post-queries.ts';

export function loader(queryClient: QueryClient): LoaderFunction {
  return async ({ params: { id = '' } }) => {
    try {
      return await queryClient.query(postLetter(id));
    } catch (error) {
      throw asMissing(error);
    }
  };
}

/** One letter of the local post: its text, and its links to follow. */
export function Component() {
  const { id = '' } = useParams();
  const { data: letter } = useSuspenseQuery(postLetter(id));
  const { subject, from, to, at, text, links, unsubscribe } = letter;
  return (
    <>
      <PageTitle title={subject} above={<Link to={paths.post()}>Local post</Link>} below={`To ${to}, ${sayInstant(at)}`}>
        {subject}
      </PageTitle>
      <PartingLine />
      <div className="pt-8">
        <PageGrid>
          <Block margin={<p className="text-[15px] leading-snug text-slag wrap-anywhere">From {from}. The letter has an HTML part as well, made of the same text.</p>}>
            <pre className="max-w-measure font-serif wrap-anywhere whitespace-pre-wrap">{text}</pre>
          </Block>
          <Block heading="Links">
            {links.length === 0 && unsubscribe === null ? (
              <p>None.</p>
            ) : (
              <ul className="space-y-1">
                {[...links, ...(unsubscribe === null ? [] : [unsubscribe])].map((link) => (
                  <li key={link}>
                    <a href={link} className="inline-flex min-h-11 items-center wrap-anywhere">
                      {link}
                    </a>
                  </li>
                ))}
              </ul>
            )}
          </Block>
        </PageGrid>
      </div>
    </>
  );
}
