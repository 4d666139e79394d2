import type { Request, Response } from 'express';
import multer from 'multer';
import { PHOTO_LIMITS } from '#contract/photos.ts';
import { asDiskFault } from '#server/files/disk-fault.ts';
import { PhotoStoreError } from '#server/files/photo-store.ts';
import type { SentFile } from '#server/services/photos/take-photo.ts';
import { ProblemError } from '#server/services/problem-error.ts';

/** A form with one file, which stands in the folder it was received in. */
export type ReceivedForm = { readonly fields: Readonly<Record<string, unknown>>; readonly file: SentFile };

const LIMITS = {
  fileSize: PHOTO_LIMITS.file,
  files: 1,
  fields: 10,
  parts: 12,
  fieldSize: 16 * 1024,
  fieldNameSize: 100,
  headerPairs: 50,
  fieldNestingDepth: 1,
  fieldArrayIndexLimit: 20,
} as const;

/** Bytes a form may have in all: the file, every field as long as it may be, and what stands between them. */
const MOST_BYTES = LIMITS.fileSize + LIMITS.fields * LIMITS.fieldSize + 64 * 1024;

const TOO_LARGE = `A file may have ${PHOTO_LIMITS.file / 1024 ** 2} MB, and nothing else of any size goes with it.`;
const BROKEN = 'The form is broken or cut short.';

type Refusal = readonly ['too-large' | 'malformed', string];

const REFUSALS: Readonly<Record<string, Refusal>> = {
  LIMIT_FILE_SIZE: ['too-large', TOO_LARGE],
  LIMIT_FIELD_VALUE: ['too-large', 'A field of the form is too long.'],
  LIMIT_FIELD_COUNT: ['too-large', 'The form has too many fields.'],
  LIMIT_PART_COUNT: ['too-large', 'The form has too many parts.'],
  LIMIT_FILE_COUNT: ['too-large', 'Send one file at a time.'],
  LIMIT_UNEXPECTED_FILE: ['malformed', 'The form holds a file in a field that takes none.'],
  LIMIT_FIELD_KEY: ['malformed', 'The name of a field is too long.'],
  LIMIT_FIELD_NESTING: ['malformed', 'The name of a field is nested too deeply.'],
  LIMIT_FIELD_ARRAY_INDEX: ['malformed', 'The name of a field counts too far.'],
  MISSING_FIELD_NAME: ['malformed', 'A field of the form has no name.'],
  INVALID_FIELD_NAME: ['malformed', 'The name of a field makes no sense.'],
};

/**
 * Receives a form of `multipart/form-data` with one file under `name`, onto the disk and never into memory, and stops as soon as it is more than may
 * be taken, whether or not it said beforehand how long it is.
 *
 * @param folder for this form alone; whoever made it takes it away with whatever was received
 * @throws ProblemError `unsupported-media-type`, `too-large`, `malformed`; PhotoStoreError where the disk does not take it.
 */
export async function receiveForm(request: Request, response: Response, name: string, folder: string): Promise<ReceivedForm> {
  if (request.is('multipart/form-data') === false) throw new ProblemError('unsupported-media-type', 'Send it as multipart/form-data.');
  if (Number(request.headers['content-length'] ?? 0) > MOST_BYTES) throw new ProblemError('too-large', TOO_LARGE);

  const receive = multer({ storage: multer.diskStorage({ destination: folder }), limits: LIMITS, defParamCharset: 'utf8' }).single(name);
  await new Promise<void>((resolve, reject) => {
    let received = 0;
    // The package reads a form it refuses to its very end before it says so.
    request.on('data', (chunk: Buffer) => {
      received += chunk.length;
      if (received > MOST_BYTES) reject(new ProblemError('too-large', TOO_LARGE));
    });
    receive(request, response, (error: unknown) => {
      if (error === undefined || error === null) resolve();
      else reject(refusalOf(error));
    });
  });

  const { file } = request;
  if (file === undefined) throw new ProblemError('malformed', `The form holds no file in the field ${name}.`);
  const fields: unknown = request.body;
  return { fields: { ...(fields as Record<string, unknown>) }, file: { path: file.path, name: file.originalname, declared: file.mimetype } };
}

/** The package’s errors carry no status. Those of the disk name a system call; what is left is a form that could not be read. */
function refusalOf(error: unknown): Error {
  if (error instanceof multer.MulterError) {
    const [kind, detail] = REFUSALS[error.code] ?? (['malformed', BROKEN] as const);
    return new ProblemError(kind, detail, { cause: error });
  }
  const fault = asDiskFault(error);
  if (fault instanceof PhotoStoreError) return fault;
  return new ProblemError('malformed', BROKEN, { cause: error });
}
