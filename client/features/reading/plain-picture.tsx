import type { Photo, Rendition } from '#contract/photos.ts';
import { isProcessed } from './look.ts';
import { matrixOf } from './stage-geometry.ts';
import type { Size } from './stage-geometry.ts';
import type { View } from './view.ts';

/** The photo without WebGL: laid out and filtered by style sheet alone. Its relief is the one the register made, under no light of one's own. */
export function PlainPicture({ photo, view, stage, label }: { readonly photo: Photo; readonly view: View; readonly stage: Size; readonly label: string }) {
  const rendition = renditionFor(photo, view);
  if (rendition === null) return null;
  return (
    <img
      src={rendition.url}
      alt={label}
      draggable={false}
      className="absolute top-0 left-0 max-w-none origin-top-left"
      style={{ width: photo.width, height: photo.height, transform: `matrix(${matrixOf(view, photo, stage).join(', ')})`, filter: filterOf(view) }}
    />
  );
}

function renditionFor({ renditions: { thumb, page, full, relief } }: Photo, view: View): Rendition | null {
  if (isProcessed(view) && view.relief && relief !== null) return relief;
  return (view.zoom > 2 ? (full ?? page) : (page ?? full)) ?? thumb;
}

function filterOf(view: View): string {
  if (!isProcessed(view)) return 'none';
  const { brightness, contrast, inverted } = view;
  return `brightness(${brightness}) contrast(${contrast}) invert(${inverted ? 1 : 0})`;
}
