import { open, readFile, stat } from 'node:fs/promises';
import { fileTypeFromFile } from 'file-type';
import type { Metadata } from 'sharp';
import { PHOTO_LIMITS } from '#contract/photos.ts';
import type { PhotoType } from '#domain/vocabulary.ts';
import { captureDay, exifOfHeic } from './capture-day.ts';
import { measureHeic } from './heic.ts';
import { openPicture } from './open-picture.ts';
import { endingOf } from './photo-name.ts';
import { UnusablePictureError } from './unusable-picture-error.ts';

export type SentPicture = {
  readonly path: string;
  readonly name: string | null;
  /** The media type its part of the form declares. */
  readonly declared: string;
};

export type InspectedPicture = {
  readonly type: PhotoType;
  /** Upright. */
  readonly width: number;
  readonly height: number;
  /** The day the camera noted; ISO 8601. */
  readonly takenOn: string | null;
};

type Kind = { readonly title: string; readonly found: readonly string[]; readonly endings: readonly string[]; readonly declared: readonly string[] };

/** What each type is found to be by its content, and what its name and its sender may call it. */
const KINDS: Readonly<Record<PhotoType, Kind>> = {
  jpeg: { title: 'JPEG', found: ['image/jpeg'], endings: ['jpg', 'jpeg', 'jpe', 'jfif'], declared: ['image/jpeg', 'image/jpg', 'image/pjpeg'] },
  png: { title: 'PNG', found: ['image/png'], endings: ['png'], declared: ['image/png', 'image/x-png'] },
  webp: { title: 'WebP', found: ['image/webp'], endings: ['webp'], declared: ['image/webp'] },
  heic: { title: 'HEIC', found: ['image/heic', 'image/heif'], endings: ['heic', 'heif', 'hif'], declared: ['image/heic', 'image/heif'] },
};
const PHOTO_KINDS = Object.entries(KINDS) as [PhotoType, Kind][];

/** What a sender declares who does not know: the second is what a form’s part is without a type. */
const DECLARES_NOTHING = ['', 'application/octet-stream', 'text/plain'];

const TAKEN = 'Photos are taken as JPEG, PNG, WebP or HEIC.';

/**
 * Finds out what a file is, by its content, and whether it is whole: from its header first, so that nothing is decoded that is too large, then
 * by decoding it once, row after row. HEIC takes a second for that, so of it only the directory is looked at, and its pixels when they are needed.
 *
 * @throws UnusablePictureError
 */
export async function inspectPicture(sent: SentPicture): Promise<InspectedPicture> {
  const { size } = await stat(sent.path);
  if (size === 0) throw new UnusablePictureError('content', 'The file is empty.');
  const type = await typeOf(sent);
  return type === 'heic' ? inspectHeic(sent.path) : inspectOther(sent.path, type);
}

async function typeOf({ path, name, declared }: SentPicture): Promise<PhotoType> {
  const found = await fileTypeFromFile(path);
  const [type, kind] = PHOTO_KINDS.find(([, one]) => found !== undefined && one.found.includes(found.mime)) ?? [];
  if (type === undefined || kind === undefined) {
    throw new UnusablePictureError('kind', found === undefined ? `The file is no picture. ${TAKEN}` : `The file is ${found.ext.toUpperCase()}. ${TAKEN}`);
  }
  const ending = endingOf(name);
  if (ending !== null && !kind.endings.includes(ending)) {
    throw new UnusablePictureError('kind', `The file is ${kind.title}, but its name ends in .${ending}. Give it the ending of what it is.`);
  }
  if (!DECLARES_NOTHING.includes(declared) && !kind.declared.includes(declared)) {
    throw new UnusablePictureError('kind', `The file is ${kind.title}, but was sent as another type.`);
  }
  return type;
}

async function inspectOther(path: string, type: PhotoType): Promise<InspectedPicture> {
  const { title } = KINDS[type];
  // Only the header is read, and what it says is looked at below.
  const header = await asContent(title, () => openPicture({ path }, { limitInputPixels: false }).metadata());
  if ((header.pages ?? 1) > 1) throw new UnusablePictureError('content', 'The file is an animation. Send a still picture.');
  refuseTooLarge(header);
  await asContent(title, () => {
    // Cut out whole, so that the decoder takes no short cut to the small size, on which it passes over much that is wrong.
    const whole = openPicture({ path }).extract({ left: 0, top: 0, width: header.width, height: header.height });
    return whole.resize(PROOF, PROOF, { fit: 'fill', kernel: 'nearest' }).raw().toBuffer();
  });
  const { width, height } = header.autoOrient;
  return { type, width, height, takenOn: takenOn(header) };
}

/** Pixels a side of what a file is decoded to where only its being whole matters. */
const PROOF = 16;

function takenOn({ exif }: Metadata): string | null {
  return exif === undefined ? null : captureDay(exif);
}

async function inspectHeic(path: string): Promise<InspectedPicture> {
  await checkBoxes(path);
  const measured = await measureHeic(path);
  refuseTooLarge(measured);
  const exif = exifOfHeic(await readFile(path));
  return { type: 'heic', width: measured.width, height: measured.height, takenOn: exif === undefined ? null : captureDay(exif) };
}

function refuseTooLarge({ width, height }: { readonly width: number; readonly height: number }): void {
  if (width * height <= PHOTO_LIMITS.pixels) return;
  throw new UnusablePictureError(
    'content',
    `The picture says it is ${width} × ${height} pixels, which is more than the ${PHOTO_LIMITS.pixels / 1e6} million taken here.`,
  );
}

async function asContent<Answer>(title: string, work: () => Promise<Answer>): Promise<Answer> {
  try {
    return await work();
  } catch (cause) {
    throw new UnusablePictureError('content', `The file is ${title}, but damaged or cut short.`, { cause });
  }
}

/** Bytes of a box's length and name, and of the longer length that may follow (ISO/IEC 14496-12, 4.2). */
const BOX_HEAD = 8;
const LONG_HEAD = 16;

/** A HEIC file is a row of boxes that say how long they are: one that was cut short ends in the middle of the last. */
async function checkBoxes(path: string): Promise<void> {
  const file = await open(path);
  try {
    const { size } = await file.stat();
    for (let at = 0; at < size; ) {
      const head = Buffer.alloc(LONG_HEAD);
      const { bytesRead } = await file.read(head, 0, LONG_HEAD, at);
      const short = head.readUInt32BE(0);
      const isLong = short === 1;
      const length = short === 0 ? size - at : isLong ? Number(head.readBigUInt64BE(BOX_HEAD)) : short;
      const least = isLong ? LONG_HEAD : BOX_HEAD;
      if (bytesRead < least || length < least || at + length > size) {
        throw new UnusablePictureError('content', 'The file is HEIC, but damaged or cut short.');
      }
      at += length;
    }
  } finally {
    await file.close();
  }
}
