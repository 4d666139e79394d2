import type { PartPage } from '#contract/parts.ts';
import { sayDay } from '../../lib/say-date.ts';
import { PhotoImage } from '../photos/photo-image.tsx';

/** A part's photos: the first large, the others beside each other below it, each with the way to all of its pixels. */
export function PartPhotos({ part: { photos, isMine } }: { readonly part: Pick<PartPage, 'photos' | 'isMine'> }) {
  if (photos.length === 0) return <p className="border-y border-rule py-4 text-slag">{isMine ? 'No photo yet. “Change” takes photos.' : 'There is no photo of it.'}</p>;
  return (
    <ul aria-label="Photos" className="grid grid-cols-2 gap-4 roomy:grid-cols-3">
      {photos.map((photo, place) => {
        const whole = photo.renditions.full;
        const isFirst = place === 0;
        const alt = `The part, photo ${place + 1} of ${photos.length}`;
        return (
          <li key={photo.id} className={isFirst ? 'col-span-full max-w-[760px]' : ''}>
            {isFirst ? <PhotoImage photo={photo} alt={alt} size="page" sizes="min(100vw, 760px)" /> : <PhotoImage photo={photo} alt={alt} aspect={4 / 3} sizes="260px" />}
            <p className="text-[15px] text-slag">
              {photo.takenOn !== null && `Taken ${sayDay(photo.takenOn)}. `}
              {whole !== null && (
                <a href={whole.url} className="no-print inline-flex min-h-11 items-center">
                  The whole photo<span className="sr-only"> {place + 1}</span>
                </a>
              )}
            </p>
          </li>
        );
      })}
    </ul>
  );
}
