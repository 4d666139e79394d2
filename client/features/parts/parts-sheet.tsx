import { Link } from 'react-router-dom';
import type { PartItem } from '#contract/parts.ts';
import { paths } from '../../lib/paths.ts';
import { ContactSheet } from '../../ui/contact-sheet.tsx';
import { MarkText } from '../marks/mark-text.tsx';
import { PhotoImage } from '../photos/photo-image.tsx';
import { sayMarks, sayPart, sayPlace } from './part-words.ts';

const ASPECT = 4 / 3;

/** One's parts by their photos. */
export function PartsSheet({ rows, stale = false }: { readonly rows: readonly PartItem[] | null; readonly stale?: boolean }) {
  return (
    <ContactSheet
      label="Your parts"
      rows={rows}
      stale={stale}
      rowKey={({ id }) => id}
      card={(part) => (
        <>
          <Link to={paths.part(part.id)} className="block no-underline">
            {part.photo === null ? (
              <span className="grid place-items-center bg-bed text-[15px] text-slag" style={{ aspectRatio: ASPECT }}>
                no photo yet
              </span>
            ) : (
              <PhotoImage photo={part.photo} alt="" aspect={ASPECT} sizes="340px" />
            )}
            <span className="mt-1 block font-semibold underline">{sayPart(part)}</span>
          </Link>
          {part.number !== null && (
            <p className="mt-1">
              <MarkText text={part.number} />
            </p>
          )}
          <p className="text-[15px] leading-snug text-slag">
            {sayMarks(part)}, {sayPlace(part)}
          </p>
        </>
      )}
    />
  );
}
