import { pipeline } from 'node:stream/promises';
import { Router } from 'express';
import type { Response } from 'express';
import type { Knex } from 'knex';
import type { PhotoMeans } from '#server/files/photo-means.ts';
import { identityOf } from '#server/http/auth/identify.ts';
import { findPhotoFile } from '#server/services/photos/find-photo-file.ts';
import type { PhotoFile } from '#server/services/photos/find-photo-file.ts';

/**
 * The files of photos, for whoever may see them. Who asks is found out before anything else, so that a tag a browser kept is no way in. What
 * everybody may see is kept five minutes by anybody, so it can still be seen for as long after it was made private; anything else is asked for
 * anew each time. Opened as a page, a file runs nothing.
 */
export function mountPhotoFiles({ knex, photos }: { readonly knex: Knex; readonly photos: PhotoMeans }): Router {
  const router = Router({ strict: true });
  router.get('/:address/:file', async (request, response) => {
    const { address, file: name } = request.params;
    const found = await findPhotoFile(identityOf(request).context.viewer, address, name, knex);
    writeHead(response, found);
    if (request.fresh) {
      response.status(304).end();
      return;
    }
    response.set('Content-Length', found.file.bytes).type(found.file.type);
    if (request.method === 'HEAD') {
      response.end();
      return;
    }
    await send(response, found, photos);
  });
  return router;
}

function writeHead(response: Response, { file, isPublic }: PhotoFile): void {
  response.set({
    ETag: `"${file.digest.toString('hex')}"`,
    'Cache-Control': isPublic ? 'public, max-age=300, must-revalidate' : 'private, no-cache',
    'Content-Security-Policy': "default-src 'none'; sandbox",
    'Cross-Origin-Resource-Policy': 'same-origin',
    'X-Content-Type-Options': 'nosniff',
  });
}

async function send(response: Response, { key }: PhotoFile, { store }: PhotoMeans): Promise<void> {
  let stream;
  try {
    ({ stream } = await store.get(key));
  } catch (error) {
    // What was said about the file does not hold for the problem that is answered.
    for (const name of ['ETag', 'Content-Length']) response.removeHeader(name);
    throw error;
  }
  // Half a file is no file: the connection ends with it. A visitor who went away is nobody's fault.
  await pipeline(stream, response).catch(() => response.destroy());
}
