// @ts-check
import { raiseIfStopped, run, startChild } from './lib/children.mjs';
import { buildClient } from './lib/client-build.mjs';
import { holdDatabase } from './lib/database.mjs';
import { holdDependencies } from './lib/dependencies.mjs';
import { holdLocalPost } from './lib/local-post.mjs';
import { packageBin } from './lib/project.mjs';
import { Trouble, say, tellingLine } from './lib/say.mjs';
import { freeServerAddress, isReady } from './lib/server-address.mjs';

/**
 * `npm start`: everything from packages to a running server with the demo, until it is told to stop.
 * @returns {Promise<number>} exit code
 */
export async function start() {
  const address = await freeServerAddress();
  const packages = await holdDependencies();
  try {
    const database = await holdDatabase();
    try {
      await buildPages();
      const post = await holdLocalPost();
      try {
        const signIns = database.hasDemo && process.env['NODE_ENV'] !== 'production' ? await demoSignIns() : '';
        await serve(address, { ...post.env, DATABASE_URL: database.url }, signIns);
        return 0;
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

async function buildPages() {
  const { code, output, fresh } = await buildClient();
  if (code !== 0) {
    process.stderr.write(output);
    throw new Trouble(`the pages could not be built (vite build): ${tellingLine(output, /error/i)}`);
  }
  say('pages', fresh ? 'built before' : 'built');
}

/** Who the demo can be tried as; a server in production refuses them, so there they are not printed. */
async function demoSignIns() {
  const { code, output } = await run(packageBin('tsx'), ['fixtures/demo/sign-ins.ts']);
  if (code !== 0) throw new Trouble(`the demo's sign-ins could not be listed: ${tellingLine(output, /error/i)}`);
  return output.trimEnd();
}

/**
 * Runs the server until it ends, which it should only when told to.
 * @param {import('./lib/server-address.mjs').ServerAddress} address
 * @param {Record<string, string>} settings
 * @param {string} signIns lines to print beside the address
 */
async function serve(address, settings, signIns) {
  const server = startChild(process.execPath, ['--import', 'tsx', 'server/main.ts'], {
    inherit: true,
    env: { ...process.env, ...address.env, ...settings },
  });
  const waiting = new AbortController();
  void isReady(address.origin, waiting.signal).then((ready) => { if (ready) welcome(address.origin, 'LOCAL_POST_DIR' in settings, signIns); });
  const { code } = await server.ended;
  waiting.abort();
  raiseIfStopped();
  throw new Trouble(`the server ended with exit code ${code}: what it wrote above says why`);
}

/**
 * @param {string} origin
 * @param {boolean} keepsPost whether letters are kept here instead of being sent
 * @param {string} signIns
 */
function welcome(origin, keepsPost, signIns) {
  for (const line of signIns.split('\n').filter((one) => one !== '')) say('sign-in', line);
  if (keepsPost) say('post', `letters are kept, not sent; read them at ${origin}/post`);
  say('Pourbook', `is at ${origin} (Ctrl-C stops it)`);
}
