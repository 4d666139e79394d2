import { Worker } from 'node:worker_threads';
import { PHOTO_LIMITS } from '#contract/photos.ts';
import { PICTURE_SECONDS } from './open-picture.ts';
import type { RawPicture } from './open-picture.ts';
import { UnusablePictureError } from './unusable-picture-error.ts';

export type HeicTask = { readonly path: string; readonly mostPixels: number; readonly decode: boolean };
export type HeicAnswer = { readonly width: number; readonly height: number; readonly data: Uint8Array<ArrayBuffer> | undefined };

const BROKEN = 'The file is HEIC, but damaged or of a kind that can’t be opened here.';

/** Width and height, upright, by the decoder itself; nothing is decoded. */
export async function measureHeic(path: string): Promise<{ readonly width: number; readonly height: number }> {
  return inWorker({ path, mostPixels: PHOTO_LIMITS.pixels, decode: false });
}

/** The pixels, upright. */
export async function decodeHeic(path: string): Promise<RawPicture> {
  const { width, height, data } = await inWorker({ path, mostPixels: PHOTO_LIMITS.pixels, decode: true });
  if (data === undefined) throw new UnusablePictureError('content', BROKEN);
  return { width, height, data };
}

/**
 * A thread for each file, so that what the decoder took is given back and time can be up.
 *
 * @throws UnusablePictureError
 */
async function inWorker(task: HeicTask): Promise<HeicAnswer> {
  const worker = new Worker(new URL('./heic-worker.mjs', import.meta.url), { workerData: task, execArgv: [], stdout: true, stderr: true });
  const timer = setTimeout(() => void worker.terminate(), PICTURE_SECONDS * 1_000);
  try {
    return await new Promise<HeicAnswer>((resolve, reject) => {
      worker.once('message', (answer: HeicAnswer) => resolve(answer));
      worker.once('error', reject);
      worker.once('exit', () => reject(new Error('The thread ended without an answer')));
    });
  } catch (cause) {
    throw new UnusablePictureError('content', BROKEN, { cause });
  } finally {
    clearTimeout(timer);
    await worker.terminate();
  }
}
