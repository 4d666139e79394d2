// @ts-check
// The entry of every npm script that runs the project: `node .run/run.mjs start`.
// Written in what Node 12 can read, so that an old Node is told that it is old instead of stumbling over newer syntax.
import { readFileSync } from 'fs';
import { dirname, join } from 'path';
import { fileURLToPath } from 'url';

const root = dirname(dirname(fileURLToPath(import.meta.url)));
const [command, ...args] = process.argv.slice(2);

const manifest = /** @type {{ engines: { node: string } }} */ (JSON.parse(readFileSync(join(root, 'package.json'), 'utf8')));
const [major, minor] = versionNumbers(process.versions.node);
const [wantedMajor, wantedMinor] = versionNumbers(manifest.engines.node);

if (major < wantedMajor || (major === wantedMajor && minor < wantedMinor)) {
  process.stderr.write(
    `pourbook: Node ${process.versions.node} is too old; Node ${wantedMajor}.${wantedMinor} or later is needed\n`,
  );
  process.exitCode = 1;
} else {
  void import('./lib/main.mjs').then(({ main }) => main(String(command), args));
}

/**
 * Major and minor of a version or of a range that only says the least one.
 * @param {string} text `20.20.2`, `>=20.19`
 * @returns {[number, number]}
 */
function versionNumbers(text) {
  const [first, second] = text.replace(/^[^0-9]*/, '').split('.');
  return [Number(first), Number(second)];
}
