// @ts-check
import { startChild } from './children.mjs';
import { freePort } from './ports.mjs';
import { inData } from './project.mjs';
import { say } from './say.mjs';

/**
 * @typedef {object} LocalPost
 * @property {Record<string, string>} env settings that make the server hand its letters over
 * @property {() => Promise<void>} release ends it; the letters stay
 */

/** Where letters are kept. */
const FOLDER = inData('mail');

/**
 * A mail server that keeps letters instead of sending them, unless the settings name another, or it is production, where they must.
 * Should it end before the rest, letters wait in the queue, and nothing else stops.
 * @returns {Promise<LocalPost>}
 */
export async function holdLocalPost() {
  if (process.env['MAIL_URL'] || process.env['NODE_ENV'] === 'production') return { env: {}, release: () => Promise.resolve() };
  const port = await freePort();
  const post = startChild(process.execPath, ['--import', 'tsx', 'server/local-post.ts', '--folder', FOLDER, '--port', String(port)]);
  let releasing = false;
  void post.ended.then(({ output }) => {
    if (releasing) return;
    process.stderr.write(output);
    say('post', 'ended; letters wait until the next start');
  });
  return {
    env: { MAIL_URL: `smtp://127.0.0.1:${port}`, LOCAL_POST_DIR: FOLDER },
    release: async () => {
      releasing = true;
      post.stop();
      await post.ended;
    },
  };
}
