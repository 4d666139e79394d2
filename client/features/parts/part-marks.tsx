import { Link } from 'react-router-dom';
import type { MarkInShort, PartPage } from '#contract/parts.ts';
import { paths } from '../../lib/paths.ts';
import { ButtonLink } from '../../ui/button.tsx';
import { MarkDatesLine, MarkEvidenceLine, MarkReading } from '../marks/mark-lines.tsx';
import { sayMarkKind } from '../marks/mark-words.ts';
import { MarkImage } from '../photos/photo-image.tsx';

type Props = {
  readonly part: PartPage;
  /** Whether the viewer is signed in: only members read. */
  readonly canRead: boolean;
  /** The mark whose reading is the page's next step; null where that is something else. */
  readonly next: string | null;
};

/** A part's marks: picture, plate, what it can mean, how sure that is, and the way to read it. */
export function PartMarks({ part: { marks, isMine }, canRead, next }: Props) {
  if (marks.length === 0) {
    return <p className="border-y border-rule py-4 text-slag">{isMine ? 'No mark yet. Add one, and read it from a photo or from the iron.' : 'No mark of it is on record.'}</p>;
  }
  return (
    <ul className="border-t border-graphite">
      {marks.map((mark) => (
        <li key={mark.id} className="grid gap-x-6 gap-y-3 border-b border-rule py-4 roomy:grid-cols-[200px_minmax(0,1fr)]">
          <MarkPicture mark={mark} />
          <div className="min-w-0">
            <p>
              <Link to={paths.mark(mark.id)}>{sayMarkKind(mark)}</Link>
            </p>
            <p className="my-1 text-[22px]">
              <MarkReading mark={mark} />
            </p>
            <p>
              <MarkDatesLine mark={mark} />
            </p>
            <p className="text-[15px]">
              <MarkEvidenceLine mark={mark} />
            </p>
            {canRead && (isMine ? mark.reading === null : mark.wantsReading && mark.photo !== null) && (
              <ButtonLink weight={mark.id === next ? 'primary' : 'plain'} to={paths.readMark(mark.id)} className="no-print mt-2">
                {mark.hidden ? 'Read it first' : 'Read this mark'}
                <span className="sr-only"> {sayMarkKind(mark)}</span>
              </ButtonLink>
            )}
          </div>
        </li>
      ))}
    </ul>
  );
}

function MarkPicture({ mark: { photo } }: { readonly mark: MarkInShort }) {
  if (photo === null) return <span className="grid min-h-16 place-items-center bg-bed text-[15px] text-slag">no photo</span>;
  return <MarkImage markPhoto={photo} alt="" aspect={2} sizes="360px" />;
}
