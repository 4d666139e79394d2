import type { MarkPhoto } from '#contract/parts.ts';
import { MarkImage } from '../photos/photo-image.tsx';

type Props = { readonly photos: readonly MarkPhoto[]; readonly chosen: string; readonly onChoose: (photoId: string) => void };

/** The photos of a mark, one of which lies on the stage. */
export function PhotoChoice({ photos, chosen, onChoose }: Props) {
  return (
    <div role="group" aria-label="Photos of the mark" className="no-print mb-3 flex gap-2 overflow-x-auto p-1">
      {photos.map((place, at) => (
        <button
          key={place.photo.id}
          type="button"
          aria-pressed={place.photo.id === chosen}
          onClick={() => onChoose(place.photo.id)}
          className={`w-28 shrink-0 cursor-pointer rounded border-2 ${place.photo.id === chosen ? 'border-graphite' : 'border-rule hover:border-edge'}`}
        >
          <MarkImage markPhoto={place} alt="" aspect={3 / 2} sizes="112px" />
          <span className="block py-1 text-[14px] leading-tight">Photo {at + 1}</span>
        </button>
      ))}
    </div>
  );
}
