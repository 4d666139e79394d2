import { execFile } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { promisify } from 'node:util';

const PROJECT = fileURLToPath(new URL('../..', import.meta.url));

/**
 * Runs one of the project's scripts to its end, with these settings and no others of ours.
 *
 * @throws with `code`, `stdout` and `stderr` when it fails.
 */
export async function runScript(
  script: string,
  args: readonly string[],
  settings: Readonly<Record<string, string>>,
): Promise<{ readonly stdout: string; readonly stderr: string }> {
  const env = { PATH: process.env['PATH'], ...settings };
  return promisify(execFile)(process.execPath, ['--import', 'tsx', script, ...args], { cwd: PROJECT, env });
}
