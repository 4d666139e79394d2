import type { Knex } from 'knex';
import type { Logger } from 'pino';
import type { PhotoMeans } from '#server/files/photo-means.ts';
import { handle } from '#server/queue/job-runner.ts';
import type { JobHandling } from '#server/queue/job-runner.ts';
import { giveUpRenditions, makeRenditions, sweepPhotos } from '#server/queue/photo-jobs.ts';
import { failPicture } from '#server/services/photos/fail-picture.ts';
import { makeRenditions as work } from '#server/services/photos/make-renditions.ts';
import { sweepPhotos as sweep } from '#server/services/photos/sweep-photos.ts';

/** Pictures at once; what each decodes and encodes goes through the gate besides. */
const LANES = 2;

const GIVEN_UP = 'Its renditions could not be made. Remove it and send it again.';

type Means = { readonly knex: Knex; readonly photos: PhotoMeans; readonly logger: Logger };

export function photoHandlings({ knex, photos, logger }: Means): readonly JobHandling[] {
  return [
    handle(makeRenditions, ({ pictureId }, { signal }) => work(pictureId, { ...photos, knex, signal }), LANES),
    handle(giveUpRenditions, ({ pictureId }) => failPicture(pictureId, GIVEN_UP, { ...photos, knex })),
    handle(sweepPhotos, async (_payload, { signal }) => {
      logger.info(await sweep({ ...photos, knex, signal, now: new Date() }), 'photos swept');
    }),
  ];
}
