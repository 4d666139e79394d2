// @ts-check
import { raiseIfStopped, startChild } from './lib/children.mjs';
import { holdDatabase } from './lib/database.mjs';
import { holdDependencies } from './lib/dependencies.mjs';
import { holdLocalPost } from './lib/local-post.mjs';
import { freePort, isPortFree } from './lib/ports.mjs';
import { packageBin } from './lib/project.mjs';
import { Trouble, say } from './lib/say.mjs';
import { freeServerAddress } from './lib/server-address.mjs';

/** Where Vite serves pages unless somebody else does there. */
const PAGES_PORT = 5173;

/**
 * `npm run dev`: the server, started again when its sources change, and Vite's server for the pages in front of it.
 * When either ends, so does the other.
 * @returns {Promise<never>}
 */
export async function dev() {
  const address = await freeServerAddress();
  const packages = await holdDependencies();
  try {
    const database = await holdDatabase();
    try {
      const post = await holdLocalPost();
      try {
        return await serve(address, { ...post.env, DATABASE_URL: database.url });
      } finally {
        await post.release();
      }
    } finally {
      await database.release();
    }
  } finally {
    await packages.release();
  }
}

/**
 * @param {import('./lib/server-address.mjs').ServerAddress} address
 * @param {Record<string, string>} settings
 * @returns {Promise<never>}
 */
async function serve(address, settings) {
  const port = (await isPortFree(PAGES_PORT, '127.0.0.1')) ? PAGES_PORT : await freePort();
  // Visitors come to Vite's server, so that is where letters lead.
  const origin = process.env['PUBLIC_ORIGIN'] || `http://localhost:${port}`;
  const env = { ...process.env, ...address.env, ...settings, PUBLIC_ORIGIN: origin, POURBOOK_API_ORIGIN: address.origin };
  const server = startChild(packageBin('tsx'), ['watch', '--clear-screen=false', 'server/main.ts'], { inherit: true, env });
  const pages = startChild(packageBin('vite'), ['--clearScreen', 'false', '--port', String(port), '--strictPort'], { inherit: true, env });
  if ('LOCAL_POST_DIR' in settings) say('post', `letters are kept, not sent; read them at ${origin}/post`);
  const { name, code } = await Promise.race([
    server.ended.then((ended) => ({ name: 'the server', code: ended.code })),
    pages.ended.then((ended) => ({ name: 'Vite', code: ended.code })),
  ]);
  server.stop();
  pages.stop();
  await Promise.all([server.ended, pages.ended]);
  raiseIfStopped();
  throw new Trouble(`${name} ended with exit code ${code}, so all was stopped: what it wrote above says why`);
}
