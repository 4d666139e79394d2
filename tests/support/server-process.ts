import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { fileURLToPath } from 'node:url';
import { TEST_PHOTOS } from './test-photos.ts';

const PROJECT = fileURLToPath(new URL('../..', import.meta.url));

export type ServerProcess = {
  readonly origin: string;
  /** Everything it wrote so far. */
  readonly output: () => string;
  readonly signal: (signal: NodeJS.Signals) => void;
  /** Exit code, `null` when a signal ended it. */
  readonly ended: Promise<number | null>;
};

/**
 * Starts the server as its own process on a free port of loopback, with these settings and no others of ours.
 *
 * @throws with what it wrote when it ends before it listens.
 */
export async function startServerProcess(settings: Readonly<Record<string, string>>): Promise<ServerProcess> {
  const child = spawn(process.execPath, ['--import', 'tsx', 'server/main.ts'], {
    cwd: PROJECT,
    env: { PATH: process.env['PATH'], HOST: '127.0.0.1', PORT: '0', PHOTO_DIR: TEST_PHOTOS, ...settings },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  const ended = once(child, 'exit').then(([code]: unknown[]) => (typeof code === 'number' ? code : null));
  const written: string[] = [];
  const listening = new Promise<number>((resolve) => {
    const read = (chunk: Buffer): void => {
      written.push(chunk.toString());
      const port = /"port":(\d+).*"msg":"listening"/.exec(written.join(''))?.[1];
      if (port !== undefined) resolve(Number(port));
    };
    child.stdout.on('data', read);
    child.stderr.on('data', read);
  });
  const port = await Promise.race([listening, ended.then(() => undefined)]);
  if (port === undefined) throw new Error(`The server ended before it listened:\n${written.join('')}`);
  return {
    origin: `http://127.0.0.1:${port}`,
    output: () => written.join(''),
    signal: (signal) => {
      child.kill(signal);
    },
    ended,
  };
}
