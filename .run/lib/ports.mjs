// @ts-check
import { createServer } from 'node:net';

/**
 * @param {number} port
 * @param {string} host
 * @returns {Promise<boolean>}
 */
export function isPortFree(port, host) {
  return new Promise((resolve) => {
    const probe = createServer();
    probe.once('error', () => { resolve(false); });
    probe.listen(port, host, () => probe.close(() => { resolve(true); }));
  });
}

/**
 * A port of loopback that nobody listens on just now.
 * @returns {Promise<number>}
 */
export function freePort() {
  return new Promise((resolve, reject) => {
    const probe = createServer();
    probe.once('error', reject);
    probe.listen(0, '127.0.0.1', () => {
      const address = probe.address();
      probe.close(() => {
        if (address === null || typeof address === 'string') reject(new TypeError('the probe listens on no port'));
        else resolve(address.port);
      });
    });
  });
}
