// @ts-check
import { readFile } from 'node:fs/promises';
import { parentPort, workerData } from 'node:worker_threads';
import { all } from 'heic-decode';

/** @typedef {import('./heic.ts').HeicTask} HeicTask */
/** @typedef {import('./heic.ts').HeicAnswer} HeicAnswer */

// Not TypeScript: what lets the server run that does not reach into a thread.

/**
 * Opens one HEIC file. The decoder holds up whatever thread it runs in, so this is one of its own.
 *
 * @param {HeicTask} task
 * @returns {Promise<HeicAnswer>}
 */
async function open({ path, mostPixels, decode }) {
  const pictures = await all({ buffer: await readFile(path) });
  try {
    const [first] = pictures;
    if (first === undefined) throw new Error('There is no picture in it');
    const { width, height } = first;
    if (!decode || width * height > mostPixels) return { width, height, data: undefined };
    const { data } = await first.decode();
    return { width, height, data: new Uint8Array(data.buffer) };
  } finally {
    pictures.dispose();
  }
}

/** @type {HeicTask} */
const task = workerData;
const answer = await open(task);
parentPort?.postMessage(answer, answer.data === undefined ? [] : [answer.data.buffer]);
