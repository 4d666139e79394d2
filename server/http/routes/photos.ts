import type { Router } from 'express';
import * as contract from '#contract/photos.ts';
import { isOwner } from '#server/policies/photos.ts';
import { signedIn } from '#server/policies/viewer.ts';
import { presentPhoto } from '#server/presenters/photo.ts';
import { listUnusedPhotos } from '#server/services/photos/list-unused-photos.ts';
import { readPhoto } from '#server/services/photos/read-photo.ts';
import { removePhoto } from '#server/services/photos/remove-photo.ts';
import { requireRoom } from '#server/services/photos/require-room.ts';
import { takePhoto } from '#server/services/photos/take-photo.ts';
import type { ApiDependencies } from '../dependencies.ts';
import { serve, serveUpload } from '../serve.ts';

export function mountPhotos(router: Router, { knex, photos }: ApiDependencies): void {
  serveUpload(router, contract.uploadPhoto, {
    workDirectory: photos.workDirectory,
    admit: ({ viewer }) => requireRoom(signedIn(viewer).id, 1, knex),
    handle: async ({ body }, file, { viewer, requestId }) => {
      const choice = { keepDate: body.keepDate === 'true' };
      return presentPhoto(await takePhoto(signedIn(viewer), file, choice, requestId, { ...photos, knex }), { isOwner: true });
    },
  });
  serve(router, contract.listUnusedPhotos, async (_input, { viewer }) => {
    const items = await listUnusedPhotos(viewer, knex);
    return { items: items.map((photo) => presentPhoto(photo, { isOwner: true })) };
  });
  serve(router, contract.readPhoto, async ({ params }, { viewer }) => {
    const photo = await readPhoto(viewer, params.id, knex);
    return presentPhoto(photo, { isOwner: isOwner(viewer, photo) });
  });
  serve(router, contract.removePhoto, async ({ params }, { viewer, requestId }) => {
    await removePhoto(viewer, params.id, requestId, { ...photos, knex });
    return { done: true as const };
  });
}
