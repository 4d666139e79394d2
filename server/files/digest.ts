import { createHash } from 'node:crypto';
import { createReadStream } from 'node:fs';
import { pipeline } from 'node:stream/promises';

/** SHA-256 of bytes in memory. */
export function digestOf(bytes: Uint8Array): Buffer {
  return createHash('sha256').update(bytes).digest();
}

/** SHA-256 of a local file, read in pieces. */
export async function digestOfFile(path: string): Promise<Buffer> {
  const hash = createHash('sha256');
  await pipeline(createReadStream(path), hash);
  return hash.digest();
}
