import { z } from 'zod';
import { PHOTO_STATES, RENDITION_TYPES } from '#domain/vocabulary.ts';
import { Id, IsoDay } from './common.ts';
import { endpoint } from './endpoint.ts';

export const PHOTO_LIMITS = {
  /** Bytes of one file. */
  file: 25 * 1024 * 1024,
  /** Pixels of one picture, width times height: a header that says more is refused before anything is decoded. */
  pixels: 64_000_000,
  /** Characters kept of a file's own name. */
  name: 120,
  /** What one member may have on record. */
  each: { photos: 2_000, bytes: 10 * 1024 ** 3 },
  /** Photos of one part, and of one mark. */
  ofPart: 40,
  ofMark: 12,
  /** Days a photo that stands on nothing is kept. */
  unused: 30,
} as const;

const RenditionFile = z.object({ url: z.string(), width: z.number().int().positive(), height: z.number().int().positive(), type: z.enum(RENDITION_TYPES) });

/** One rendition: its usual file, WebP, and every file of it there is, for `srcset`; narrowest first. */
export const Rendition = RenditionFile.extend({ files: z.array(RenditionFile) }).meta({ id: 'Rendition' });
export type Rendition = z.infer<typeof Rendition>;

/**
 * A photo, upright and without the file's own metadata. A rendition is null until it is made. `full` has every pixel up to 8192 on the
 * longer side; `relief` is grey, normalised and locally equalised, which helps to read and is not what the camera saw.
 */
export const Photo = z
  .object({
    id: Id,
    state: z.enum(PHOTO_STATES),
    /** Why it failed, in a sentence. */
    failure: z.string().nullable(),
    width: z.number().int().positive(),
    height: z.number().int().positive(),
    /** The file's own name; null for everybody but its owner. */
    name: z.string().nullable(),
    /** The day the camera noted, where its owner chose to keep it. */
    takenOn: IsoDay.nullable(),
    renditions: z.object({ thumb: Rendition.nullable(), page: Rendition.nullable(), full: Rendition.nullable(), relief: Rendition.nullable() }),
  })
  .meta({ id: 'Photo' });
export type Photo = z.infer<typeof Photo>;

const ById = z.strictObject({ id: Id });
const Done = z.object({ done: z.literal(true) });

/** The text fields that may go before the file in the form. */
const UploadFields = z.strictObject({ keepDate: z.enum(['true', 'false']).default('false') });

/** Sent as `multipart/form-data`: `keepDate`, then one file as `photo`. The same bytes sent again answer the photo they made before. */
export const uploadPhoto = endpoint({
  method: 'POST',
  path: '/photos',
  status: 201,
  summary: 'Send a photo: JPEG, PNG, WebP or HEIC, as multipart/form-data in the field photo',
  body: UploadFields,
  file: 'photo',
  answer: Photo,
});

export const readPhoto = endpoint({ method: 'GET', path: '/photos/:id', summary: 'A photo and the renditions made so far', params: ById, answer: Photo });

export const listUnusedPhotos = endpoint({
  method: 'GET',
  path: '/photos',
  summary: 'Your photos that stand on no part or mark yet, newest first; they are kept for 30 days',
  answer: z.object({ items: z.array(Photo) }),
});

export const removePhoto = endpoint({
  method: 'DELETE',
  path: '/photos/:id',
  summary: 'Take a photo of yours away from everything it stands on',
  params: ById,
  answer: Done,
});
