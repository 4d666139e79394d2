// @ts-check
import { isPortFree } from './ports.mjs';
import { Trouble } from './say.mjs';

/**
 * @typedef {object} ServerAddress
 * @property {string} origin where a browser on this machine finds the server
 * @property {Record<string, string>} env settings that make the server listen there
 */

/**
 * The address that `HOST` and `PORT` ask for, once it is known to be free.
 * @returns {Promise<ServerAddress>}
 */
export async function freeServerAddress() {
  const host = process.env['HOST'] || '127.0.0.1';
  const port = process.env['PORT'] || '5080';
  // What is no port number is the server's to complain of, together with all else that is wrong.
  if (/^\d{1,5}$/.test(port) && Number(port) < 65_536 && !(await isPortFree(Number(port), host))) {
    throw new Trouble(
      `port ${port} of ${host} can't be listened on, most likely because another program does: ` +
        'stop that one, or choose another with PORT=…',
    );
  }
  // By name where it is loopback: browsers make passkeys for names only.
  const reachable = ['0.0.0.0', '::', '127.0.0.1'].includes(host) ? 'localhost' : host;
  return { origin: `http://${reachable.includes(':') ? `[${reachable}]` : reachable}:${port}`, env: { HOST: host, PORT: port } };
}

/**
 * Waits until the server says it is ready for requests.
 * @param {string} origin
 * @param {AbortSignal} signal ends the waiting
 * @returns {Promise<boolean>} false where it was ended
 */
export async function isReady(origin, signal) {
  for (;;) {
    if (signal.aborted) return false;
    const ready = await fetch(`${origin}/readyz`, { signal }).then(({ ok }) => ok, () => false);
    if (ready) return true;
    await new Promise((resolve) => setTimeout(resolve, 100));
  }
}
