import type { RequestHandler } from 'express';

/** Milliseconds in which whoever was refused may read why; cut at once, the answer would be lost with the connection. */
const LINGER = 1_000;

/** Bytes that are sooner read to their end than cut. */
const SMALL = 64 * 1024;

/**
 * Ends the connection of a request that was answered before all of it had come: nobody waits for the rest of a gigabyte that is refused. Nothing
 * more is read meanwhile.
 */
export const hangUpOnRefusal: RequestHandler = (request, response, next) => {
  response.once('finish', () => {
    if (request.complete || Number(request.headers['content-length'] ?? Infinity) <= SMALL) return;
    const { socket } = request;
    socket.pause();
    const timer = setTimeout(() => socket.destroy(), LINGER);
    socket.once('close', () => clearTimeout(timer));
  });
  next();
};
