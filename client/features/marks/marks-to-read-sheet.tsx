import { Link } from 'react-router-dom';
import type { MarkToRead } from '#contract/marks.ts';
import { paths } from '../../lib/paths.ts';
import { sayMoment } from '../../lib/say-date.ts';
import { ContactSheet } from '../../ui/contact-sheet.tsx';
import { MarkImage } from '../photos/photo-image.tsx';
import { sayMarkKind } from './mark-words.ts';

/** Marks offered to be read: their pictures, and no word of what anybody made of them. */
export function MarksToReadSheet({ rows, stale = false }: { readonly rows: readonly MarkToRead[] | null; readonly stale?: boolean }) {
  return (
    <ContactSheet
      label="Marks to read"
      rows={rows}
      stale={stale}
      rowKey={({ id }) => id}
      card={(mark) => (
        <>
          <Link to={paths.readMark(mark.id)} className="block no-underline">
            <MarkImage markPhoto={mark.photo} alt="" aspect={1.6} sizes="320px" />
            <span className="mt-1 block underline">
              <span className="sr-only">Read this: </span>
              {sayMarkKind(mark)}
            </span>
          </Link>
          <p className="text-[15px] text-slag">asked for since {sayMoment(mark.askedAt)}</p>
        </>
      )}
    />
  );
}
