import { parseArgs } from 'node:util';
import { startLocalPost } from '#server/mail/local-post.ts';

/** The local post as a process of its own, so that it can be away while the server runs: `--folder .data/mail --port 2525`. */
async function main(): Promise<void> {
  const { values } = parseArgs({ options: { folder: { type: 'string' }, port: { type: 'string', default: '0' } } });
  if (values.folder === undefined) throw new Error('--folder is not given: say where letters are kept');
  const post = await startLocalPost({ folder: values.folder, port: Number(values.port) });
  process.stdout.write(`${JSON.stringify({ msg: 'listening', port: post.port })}\n`);
  const stop = (): void => void post.stop();
  process.once('SIGTERM', stop);
  process.once('SIGINT', stop);
}

await main();
