// @ts-check
import { mkdir, rm } from 'node:fs/promises';
import { run } from './children.mjs';
import { alone } from './lock.mjs';
import { inCache } from './project.mjs';
import { Trouble, say, tellingLine } from './say.mjs';

/** One for the machine, not for the clone: apt-get can't run twice at once anywhere. */
const MACHINE_LOCK = '/run/pourbook-apt.lock';

/**
 * Installs a Debian package unless another run did so while we waited for our turn.
 * @param {string} name Debian package
 * @param {string} what name of it for people
 * @param {() => Promise<boolean>} isThere
 */
export async function installDebian(name, what, isThere) {
  if (process.getuid?.() !== 0) {
    throw new Trouble(`${what} is missing and only root can install it: run \`apt-get install ${name}\` as root, then try again`);
  }
  await alone(MACHINE_LOCK, async () => {
    if (await isThere()) return;
    say(what, `installing Debian's ${name}`);
    const log = inCache('apt-get.log');
    await mkdir(inCache(), { recursive: true });
    await rm(log, { force: true });
    const options = {
      log,
      env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive', LC_ALL: 'C.UTF-8' },
    };
    const wait = ['-o', 'DPkg::Lock::Timeout=600'];
    await run('apt-get', [...wait, '-q', 'update'], options);
    const { code, output } = await run('apt-get', [...wait, '-q', '-y', '--no-install-recommends', 'install', name], options);
    if (code !== 0 || !(await isThere())) {
      const reason = tellingLine(output, /^E: /);
      throw new Trouble(`${what} is missing and apt-get could not install ${name} (is the network there?): ${reason}; all it said is in ${log}`);
    }
  });
}
