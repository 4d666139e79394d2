import type { CSSProperties } from 'react';
import type { MarkPhoto } from '#contract/parts.ts';
import type { Photo, Rendition } from '#contract/photos.ts';
import { FilePicture } from './file-picture.tsx';
import { cropOf } from './crop-of.ts';

type Size = 'thumb' | 'page';

type Props = {
  readonly photo: Photo;
  readonly alt: string;
  /** How wide the picture stands, as `sizes` of an image: `(min-width: 900px) 280px, 50vw`. */
  readonly sizes: string;
  /** The rendition it needs; a smaller one stands in until it is made. */
  readonly size?: Size;
  /** Width by height of the room it takes; the photo's own where none is given, and all of the photo is then seen. */
  readonly aspect?: number;
  /** Shown until the register has a rendition. */
  readonly file?: File | null;
  readonly className?: string;
};

/** A photo in its room, which it keeps whether the picture is there yet or not. */
export function PhotoImage({ photo, alt, sizes, size = 'thumb', aspect, file = null, className = '' }: Props) {
  const rendition = renditionOf(photo, size);
  const fill = `absolute inset-0 size-full ${aspect === undefined ? '' : 'object-cover'}`;
  return (
    <span className={`relative block overflow-hidden bg-bed ${className}`} style={{ aspectRatio: aspect ?? photo.width / photo.height }}>
      {rendition !== null ? (
        <Picture rendition={rendition} alt={alt} sizes={sizes} className={fill} />
      ) : (
        <>
          <NotYet photo={photo} />
          {file !== null && <FilePicture file={file} alt={alt} className={fill} />}
        </>
      )}
    </span>
  );
}

/** Only where the mark stands, turned so that it reads, in a room of the given shape; the whole photo where nobody has drawn the place yet. */
export function MarkImage({ markPhoto, aspect, sizes, ...rest }: Omit<Props, 'photo' | 'file'> & { readonly markPhoto: MarkPhoto; readonly aspect: number }) {
  const { photo, region, turn, mirrored } = markPhoto;
  const { alt, size = 'thumb', className = '' } = rest;
  if (region === null && turn === 0 && !mirrored) return <PhotoImage photo={photo} aspect={aspect} sizes={sizes} {...rest} />;
  const { frame, picture, enlarged } = cropOf(markPhoto, aspect);
  // A small part of a photo needs a larger rendition to stand as sharp.
  const rendition = renditionOf(photo, enlarged > 1.6 ? 'page' : size);
  return (
    <span className={`relative block overflow-hidden bg-bed ${className}`} style={{ aspectRatio: aspect }}>
      {rendition === null ? (
        <NotYet photo={photo} />
      ) : (
        <span className="absolute block" style={frame}>
          <Picture rendition={rendition} alt={alt} sizes={`calc(${enlarged.toFixed(2)} * (${sizes}))`} className="absolute max-w-none" style={picture} />
        </span>
      )}
    </span>
  );
}

type PictureProps = { readonly rendition: Rendition; readonly alt: string; readonly sizes: string; readonly className: string; readonly style?: CSSProperties };

/** AVIF where there is one and the browser knows it, else WebP, each in the widths there are. */
function Picture({ rendition, alt, sizes, className, style }: PictureProps) {
  const avif = srcSetOf(rendition, 'image/avif');
  return (
    <picture>
      {avif !== '' && <source type="image/avif" srcSet={avif} sizes={sizes} />}
      <img
        src={rendition.url}
        srcSet={srcSetOf(rendition, 'image/webp')}
        sizes={sizes}
        width={rendition.width}
        height={rendition.height}
        alt={alt}
        loading="lazy"
        decoding="async"
        className={className}
        {...(style === undefined ? {} : { style })}
      />
    </picture>
  );
}

function srcSetOf({ files }: Rendition, wanted: Rendition['type']): string {
  return files
    .filter(({ type }) => type === wanted)
    .map(({ url, width }) => `${url} ${width}w`)
    .join(', ');
}

function renditionOf({ renditions }: Photo, size: Size): Rendition | null {
  return size === 'page' ? (renditions.page ?? renditions.thumb) : (renditions.thumb ?? renditions.page);
}

function NotYet({ photo: { state, failure } }: { readonly photo: Photo }) {
  return (
    <span className="absolute inset-0 grid place-items-center p-2 text-center text-[14px] leading-snug text-slag">
      {state === 'failed' ? (failure ?? 'No picture could be made of it.') : 'Being made ready'}
    </span>
  );
}
