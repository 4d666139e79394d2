import { createWriteStream } from 'node:fs';
import { join } from 'node:path';
import { pipeline } from 'node:stream/promises';
import type { Knex } from 'knex';
import { PictureFile } from '#db/models/picture-file.ts';
import { Picture } from '#db/models/picture.ts';
import { digestOf, digestOfFile } from '#server/files/digest.ts';
import { decodeHeic } from '#server/files/heic.ts';
import type { PictureSource } from '#server/files/open-picture.ts';
import type { PhotoMeans } from '#server/files/photo-means.ts';
import { keyOf, ORIGINAL, PhotoStoreError } from '#server/files/photo-store.ts';
import { fileNameOf } from '#server/files/rendition-names.ts';
import { makeRendition, planRenditions, weightOf } from '#server/files/renditions.ts';
import type { PlannedRendition } from '#server/files/renditions.ts';
import { UnusablePictureError } from '#server/files/unusable-picture-error.ts';
import { withWorkFolder } from '#server/files/work-folder.ts';
import { failPicture } from './fail-picture.ts';

type Means = PhotoMeans & {
  readonly knex: Knex;
  /** Stops the work between two renditions. */
  readonly signal: AbortSignal;
};

/**
 * Makes what is missing of a picture's renditions, each kept and put on record as soon as it is made, and then removes the original. A run that is
 * killed loses at most the rendition in hand; two runs at once do the same work, and nothing twice over. A picture that is ready or gone stays so,
 * and one that can't be decoded fails for good.
 *
 * @throws PhotoStoreError, or whatever the signal was raised with; then it may be run again.
 */
export async function makeRenditions(pictureId: string, means: Means): Promise<void> {
  const { knex, store, gate, workDirectory, signal } = means;
  const picture = await Picture.query(knex).findById(pictureId).withGraphFetched('files');
  if (picture?.state !== 'waiting') return;
  const weight = weightOf(picture);
  try {
    await withWorkFolder(workDirectory, async (folder) => {
      const path = await fetchOriginal(picture, folder, means);
      const source: PictureSource = picture.type === 'heic' ? await gate.pass(() => decodeHeic(path), { weight }) : { path };
      for (const planned of missingOf(picture)) {
        signal.throwIfAborted();
        const bytes = await gate.pass(() => makeRendition(source, planned), { weight });
        if (!(await keepRendition(picture, planned, bytes, means))) return;
      }
    });
  } catch (error) {
    if (!(error instanceof UnusablePictureError)) throw error;
    await failPicture(picture.id, error.reason, { knex, store });
    return;
  }
  await Picture.query(knex).findById(picture.id).where({ storeKey: picture.storeKey }).modify('waiting').patch({ state: 'ready' });
  await store.remove(keyOf(picture.storeKey, ORIGINAL));
}

async function fetchOriginal({ storeKey, digest }: Picture, folder: string, { store, signal }: Means): Promise<string> {
  const path = join(folder, ORIGINAL);
  const { stream } = await store.get(keyOf(storeKey, ORIGINAL));
  await pipeline(stream, createWriteStream(path), { signal });
  if (!(await digestOfFile(path)).equals(digest)) throw new PhotoStoreError('corrupt', 'The store gave back other bytes than it was given');
  return path;
}

function missingOf(picture: Picture): readonly PlannedRendition[] {
  const made = new Set((picture.files ?? []).map(fileNameOf));
  return planRenditions(picture).filter((planned) => !made.has(fileNameOf(planned)));
}

/** Keeps a rendition and puts it on record; `false` where the picture is gone meanwhile, and the file with it. */
async function keepRendition({ id, storeKey }: Picture, planned: PlannedRendition, bytes: Buffer, { knex, store }: Means): Promise<boolean> {
  const { rendition, type, width, height } = planned;
  const key = keyOf(storeKey, fileNameOf(planned));
  const digest = digestOf(bytes);
  await store.put(key, bytes, { sha256: digest });
  const isThere = await knex.transaction(async (trx) => {
    const holder = await Picture.query(trx).findOne({ id, storeKey }).forKeyShare();
    if (holder === undefined) return false;
    await PictureFile.query(trx)
      .insert({ pictureId: id, rendition, type, width, height, bytes: String(bytes.length), digest })
      .onConflict(['picture_id', 'rendition', 'width', 'type'])
      .merge(['height', 'bytes', 'digest']);
    return true;
  });
  if (!isThere) await store.remove(key);
  return isThere;
}
