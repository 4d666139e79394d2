import { randomInt } from 'node:crypto';
import { stat } from 'node:fs/promises';
import type { Knex } from 'knex';
import { v7 as uuidV7 } from 'uuid';
import { Photo } from '#db/models/photo.ts';
import { Picture } from '#db/models/picture.ts';
import { digestOfFile } from '#server/files/digest.ts';
import { inspectPicture } from '#server/files/inspect-picture.ts';
import type { InspectedPicture } from '#server/files/inspect-picture.ts';
import type { PhotoMeans } from '#server/files/photo-means.ts';
import { nameAsText } from '#server/files/photo-name.ts';
import { keyOf, ORIGINAL } from '#server/files/photo-store.ts';
import type { MemberViewer } from '#server/policies/viewer.ts';
import { enqueue } from '#server/queue/enqueue.ts';
import { makeRenditions } from '#server/queue/photo-jobs.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import { withTransaction } from '#server/services/transaction.ts';
import { PHOTO_GRAPH } from './read-photo.ts';
import { lockPhotosOf, requireRoom } from './require-room.ts';

/** A file as it came. */
export type SentFile = {
  readonly path: string;
  /** As its sender wrote it. */
  readonly name: string;
  /** The media type its part of the form declares. */
  readonly declared: string;
};

type Choice = { readonly keepDate: boolean };
type Means = Pick<PhotoMeans, 'store' | 'gate'> & { readonly knex: Knex };

/** What goes on record of a file that was looked at. */
type Accepted = InspectedPicture & { readonly path: string; readonly name: string | null; readonly digest: Buffer; readonly bytes: number };

const LETTERS = 'abcdefghijklmnopqrstuvwxyz0123456789';
const ADDRESS_LENGTH = 32;

/**
 * Puts a photo on record: looks at the file, keeps it in the store, then writes the row that makes it a photo and has its renditions made. The same
 * bytes are kept once: sent again they answer the photo they made before, and sent by another member they make a photo of the same picture.
 *
 * @throws UnusablePictureError, GateFullError, PhotoStoreError; ProblemError `too-large` where the member has no room left.
 */
export async function takePhoto(member: MemberViewer, file: SentFile, choice: Choice, requestId: string, means: Means): Promise<Photo> {
  const name = nameAsText(file.name);
  const sent = { path: file.path, declared: file.declared, name };
  const inspected = await means.gate.pass(() => inspectPicture(sent), { urgent: true });
  const accepted: Accepted = {
    ...inspected,
    path: file.path,
    name,
    takenOn: choice.keepDate ? inspected.takenOn : null,
    digest: await digestOfFile(file.path),
    bytes: (await stat(file.path)).size,
  };
  for (;;) {
    // Either may find that another request was a moment earlier; then the other holds.
    const photo = (await photoOfKnown(member, accepted, requestId, means)) ?? (await photoOfNew(member, accepted, requestId, means));
    if (photo !== undefined) return photo;
  }
}

/** The photo of a picture the register has; `undefined` where it has none that is of use. */
async function photoOfKnown(member: MemberViewer, accepted: Accepted, requestId: string, { knex }: Means): Promise<Photo | undefined> {
  const { digest } = accepted;
  return withTransaction(
    knex,
    async (trx) => {
      await lockPhotosOf(member.id, trx);
      // Held, so that it is not swept before the photo refers to it.
      const picture = await Picture.query(trx).findOne({ digest }).forKeyShare();
      if (picture === undefined || picture.state === 'failed') return undefined;
      return addPhoto(member, picture, accepted, requestId, trx);
    },
    { actorId: member.id },
  );
}

/** The photo of a picture that is new, or of one that failed and is tried again; `undefined` where it has come on record meanwhile. */
async function photoOfNew(member: MemberViewer, accepted: Accepted, requestId: string, { knex, store }: Means): Promise<Photo | undefined> {
  await requireRoom(member.id, accepted.bytes, knex);
  const storeKey = randomName();
  const key = keyOf(storeKey, ORIGINAL);
  await store.put(key, { path: accepted.path }, { sha256: accepted.digest });
  let photo: Photo | undefined;
  try {
    photo = await withTransaction(
      knex,
      async (trx) => {
        await lockPhotosOf(member.id, trx);
        const picture = await writePicture(accepted, storeKey, trx);
        if (picture === undefined) return undefined;
        const added = await addPhoto(member, picture, accepted, requestId, trx);
        await enqueue(makeRenditions, { pictureId: picture.id }, trx);
        return added;
      },
      { actorId: member.id },
    );
  } finally {
    // What can't be removed now is swept later.
    if (photo === undefined) await store.remove(key).catch(() => undefined);
  }
  return photo;
}

async function writePicture({ digest, type, bytes, width, height }: Accepted, storeKey: string, trx: Knex.Transaction): Promise<Picture | undefined> {
  const failed = await Picture.query(trx).findOne({ digest, state: 'failed' }).forUpdate();
  if (failed !== undefined) {
    await failed.$query(trx).patch({ state: 'waiting', failure: null, storeKey });
    await failed.$relatedQuery('files', trx).delete();
    return failed;
  }
  const id = uuidV7();
  await Picture.query(trx).insert({ id, digest, storeKey, type, bytes: String(bytes), width, height, state: 'waiting', failure: null }).onConflict('digest').ignore();
  return Picture.query(trx).findById(id);
}

async function addPhoto(member: MemberViewer, picture: Picture, { name, takenOn }: Accepted, requestId: string, trx: Knex.Transaction): Promise<Photo> {
  const before = await Photo.query(trx).findOne({ ownerId: member.id, pictureId: picture.id }).withGraphFetched(PHOTO_GRAPH);
  if (before !== undefined) return before;
  await requireRoom(member.id, Number(picture.bytes), trx);
  const photo = await Photo.query(trx).insert({ id: uuidV7(), ownerId: member.id, pictureId: picture.id, address: randomName(), name, takenOn });
  await writeAudit({ act: 'photo.added', actorId: member.id, subject: { kind: 'photo', id: photo.id }, requestId }, trx);
  return Photo.query(trx).findById(photo.id).withGraphFetched(PHOTO_GRAPH).throwIfNotFound();
}

/** 165 bits nobody can guess. */
function randomName(): string {
  return Array.from({ length: ADDRESS_LENGTH }, () => LETTERS[randomInt(LETTERS.length)]).join('');
}
