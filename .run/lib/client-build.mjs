// @ts-check
import { access, mkdir, readFile, rename, rm, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { run } from './children.mjs';
import { alone } from './lock.mjs';
import { inCache, packageBin, root } from './project.mjs';
import { hashSources } from './sources.mjs';

/** All that the built pages depend on. */
const SOURCES = [
  'client', 'server/domain', 'server/contract', 'index.html', 'vite.config.ts', 'tailwind.config.ts', 'tsconfig.json', 'package.json',
  'package-lock.json',
];

const BUILT = join(root, 'dist', 'client');
const STAMP = inCache('client-build');

/**
 * Builds the pages into dist/client unless they are what the sources would give. They are put there whole, so that a server
 * never reads half a build and an interrupted one leaves the last in place.
 * @returns {Promise<{ code: number, output: string, fresh: boolean }>} `fresh` where nothing had to be done
 */
export async function buildClient() {
  await mkdir(inCache(), { recursive: true });
  return alone(inCache('client-build.lock'), async () => {
    const hash = await hashSources(SOURCES);
    const built = await access(join(BUILT, 'index.html')).then(() => readFile(STAMP, 'utf8')).catch(() => undefined);
    if (built === hash) return { code: 0, output: '', fresh: true };
    await rm(STAMP, { force: true });
    const next = `${BUILT}.next`;
    const { code, output } = await run(packageBin('vite'), ['build', '--outDir', next, '--emptyOutDir', '--logLevel', 'warn']);
    if (code === 0) {
      await rm(BUILT, { recursive: true, force: true });
      await rename(next, BUILT);
      await writeFile(STAMP, hash);
    }
    return { code, output, fresh: false };
  });
}
