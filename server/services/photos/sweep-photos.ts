import type { Knex } from 'knex';
import { PHOTO_LIMITS } from '#contract/photos.ts';
import { Photo } from '#db/models/photo.ts';
import { Picture } from '#db/models/picture.ts';
import type { PhotoMeans } from '#server/files/photo-means.ts';
import { keyOf, ORIGINAL, partsOfKey } from '#server/files/photo-store.ts';
import type { PhotoStore } from '#server/files/photo-store.ts';
import { fileNameOf } from '#server/files/rendition-names.ts';
import { sweepWorkFolders } from '#server/files/work-folder.ts';
import { loaded } from '#server/presenters/loaded.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import { withTransaction } from '#server/services/transaction.ts';
import { dropPictureIfUnused } from './drop-picture.ts';
import { onNothing } from './on-nothing.ts';
import { removeFilesOf } from './remove-files-of.ts';

type Means = Pick<PhotoMeans, 'store' | 'workDirectory'> & {
  readonly knex: Knex;
  readonly signal: AbortSignal;
  /** This moment, for the age of files. */
  readonly now: Date;
};

export type Swept = { readonly photos: number; readonly pictures: number; readonly files: number; readonly leftovers: number };

/** Files younger than this may belong to what is under way. */
const GRACE = 24 * 60 * 60 * 1_000;

/** Pictures asked for at once. */
const LOT = 500;

/**
 * Takes away what nothing refers to: photos that stand on nothing for as long as they are kept, pictures without photos, files in the store
 * without a row, originals of pictures whose renditions are made, and what a killed server left where it received and worked.
 */
export async function sweepPhotos({ knex, store, workDirectory, signal, now }: Means): Promise<Swept> {
  const before = new Date(now.getTime() - GRACE);
  const photos = await sweepUnused(knex, signal);
  const pictures = await sweepPictures(knex, store, signal);
  const files = await sweepFiles(knex, store, before, signal);
  return { photos, pictures, files, leftovers: await sweepWorkFolders(workDirectory, before) };
}

async function sweepUnused(knex: Knex, signal: AbortSignal): Promise<number> {
  const unused = await Photo.query(knex)
    .modify(onNothing)
    .where('photos.addedAt', '<', knex.raw('now() - make_interval(days => ?)', [PHOTO_LIMITS.unused]))
    .select('photos.id');
  let swept = 0;
  for (const { id } of unused) {
    signal.throwIfAborted();
    swept += await withTransaction(knex, async (trx) => {
      // Put on a part since it was found, it stays.
      const gone = await Photo.query(trx).modify(onNothing).where('photos.id', id).delete();
      if (gone > 0) await writeAudit({ act: 'photo.removed', actorId: null, subject: { kind: 'photo', id }, requestId: null }, trx);
      return gone;
    });
  }
  return swept;
}

async function sweepPictures(knex: Knex, store: PhotoStore, signal: AbortSignal): Promise<number> {
  const unused = await Picture.query(knex).whereNotExists(Photo.query().whereColumn('photos.pictureId', 'pictures.id')).select('id');
  let swept = 0;
  for (const { id } of unused) {
    signal.throwIfAborted();
    const dropped = await withTransaction(knex, (trx) => dropPictureIfUnused(id, trx));
    if (dropped === null) continue;
    await removeFilesOf(dropped, store);
    swept += 1;
  }
  return swept;
}

async function sweepFiles(knex: Knex, store: PhotoStore, before: Date, signal: AbortSignal): Promise<number> {
  let swept = 0;
  let lot: string[] = [];
  const sweepLot = async (): Promise<void> => {
    signal.throwIfAborted();
    const wanted = await keysOnRecord(lot, knex);
    for (const key of lot.filter((one) => !wanted.has(one))) {
      await store.remove(key);
      swept += 1;
    }
    lot = [];
  };
  for await (const { key, modifiedAt } of store.list()) {
    if (modifiedAt < before) lot.push(key);
    if (lot.length >= LOT) await sweepLot();
  }
  await sweepLot();
  return swept;
}

/** Of these keys' pictures, the keys of all files that are to be there. */
async function keysOnRecord(keys: readonly string[], knex: Knex): Promise<ReadonlySet<string>> {
  const storeKeys = [...new Set(keys.map((key) => partsOfKey(key)[0]))];
  const pictures = await Picture.query(knex).whereIn('storeKey', storeKeys).withGraphFetched('files');
  return new Set(
    pictures.flatMap(({ storeKey, state, files }) => {
      const names = loaded(files).map(fileNameOf);
      return (state === 'waiting' ? [...names, ORIGINAL] : names).map((name) => keyOf(storeKey, name));
    }),
  );
}
