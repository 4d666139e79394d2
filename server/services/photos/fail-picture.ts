import type { Knex } from 'knex';
import { Picture } from '#db/models/picture.ts';
import type { PhotoMeans } from '#server/files/photo-means.ts';
import { keyOf, ORIGINAL } from '#server/files/photo-store.ts';

type Means = Pick<PhotoMeans, 'store'> & { readonly knex: Knex };

/** Notes why a picture's renditions will not be made and removes its original. One that is ready, failed or gone stays so. */
export async function failPicture(pictureId: string, failure: string, { knex, store }: Means): Promise<void> {
  const picture = await Picture.query(knex).findById(pictureId);
  if (picture?.state !== 'waiting') return;
  await picture.$query(knex).modify('waiting').patch({ state: 'failed', failure });
  await store.remove(keyOf(picture.storeKey, ORIGINAL));
}
