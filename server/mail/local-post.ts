import { randomBytes } from 'node:crypto';
import { mkdir, readFile, readdir, rename, writeFile } from 'node:fs/promises';
import path from 'node:path';
import { buffer } from 'node:stream/consumers';
import { simpleParser } from 'mailparser';
import type { AddressObject, ParsedMail } from 'mailparser';
import { SMTPServer } from 'smtp-server';
import type { PostItem, PostLetter } from '#contract/post.ts';

/** Letters listed at once. */
const MOST_LISTED = 100;
const MOST_BYTES = 1024 * 1024;
const EXTENSION = '.eml';
const NAME = /^\d{13}-[0-9a-f]{8}\.eml$/;

export type LocalPost = { readonly port: number; readonly stop: () => Promise<void> };

/**
 * A mail server that keeps every letter as a file in a folder and sends none on. It asks for no password and offers no encryption, so it
 * listens on loopback only. Port 0 takes any free one.
 */
export async function startLocalPost({ folder, port }: { readonly folder: string; readonly port: number }): Promise<LocalPost> {
  await mkdir(folder, { recursive: true });
  const server = new SMTPServer({
    disabledCommands: ['AUTH', 'STARTTLS'],
    disableReverseLookup: true,
    size: MOST_BYTES,
    onData: (stream, _session, callback) => {
      keep(stream, folder).then(
        () => callback(),
        (error: unknown) => callback(error instanceof Error ? error : new Error('The letter could not be kept')),
      );
    },
  });
  const listener = await new Promise<ReturnType<SMTPServer['listen']>>((resolve, reject) => {
    server.once('error', reject);
    const listening = server.listen(port, '127.0.0.1', () => {
      server.off('error', reject);
      resolve(listening);
    });
  });
  // A client that breaks off is no reason for the post to end.
  server.on('error', () => undefined);
  const address = listener.address();
  if (address === null || typeof address === 'string') throw new TypeError('The local post does not listen on a port');
  return { port: address.port, stop: () => new Promise((resolve) => server.close(() => resolve())) };
}

/** What the folder holds, newest first; nothing where there is no folder yet. */
export async function listLocalPost(folder: string): Promise<readonly PostItem[]> {
  const newest = (await namesIn(folder)).toSorted().toReversed().slice(0, MOST_LISTED);
  return Promise.all(newest.map(async (name) => itemOf(name, await parse(folder, name))));
}

/** One letter by its id; undefined where there is none. */
export async function readLocalPost(folder: string, id: string): Promise<PostLetter | undefined> {
  const name = `${id}${EXTENSION}`;
  const names = await namesIn(folder);
  if (!names.includes(name)) return undefined;
  const mail = await parse(folder, name);
  const text = mail.text ?? '';
  return {
    ...itemOf(name, mail),
    from: mail.from?.text ?? '',
    text,
    html: mail.html || '',
    links: [...new Set(text.match(/https?:\/\/\S+/g) ?? [])],
    unsubscribe: unsubscribeOf(mail),
  };
}

async function keep(stream: NodeJS.ReadableStream, folder: string): Promise<void> {
  const bytes = await buffer(stream);
  const file = path.join(folder, `${String(Date.now()).padStart(13, '0')}-${randomBytes(4).toString('hex')}${EXTENSION}`);
  // Under another name until it is whole, so that nobody reads half a letter.
  await writeFile(`${file}.part`, bytes);
  await rename(`${file}.part`, file);
}

async function namesIn(folder: string): Promise<readonly string[]> {
  const names: readonly string[] = await readdir(folder).catch(() => []);
  return names.filter((name) => NAME.test(name));
}

async function parse(folder: string, name: string): Promise<ParsedMail> {
  return simpleParser(await readFile(path.join(folder, name)));
}

function itemOf(name: string, mail: ParsedMail): PostItem {
  return {
    id: name.slice(0, -EXTENSION.length),
    to: [mail.to ?? []].flat().map((one: AddressObject) => one.text).join(', '),
    subject: mail.subject ?? '',
    at: new Date(Number(name.slice(0, 13))).toISOString(),
  };
}

function unsubscribeOf(mail: ParsedMail): string | null {
  const line = mail.headerLines.find(({ key }) => key === 'list-unsubscribe')?.line ?? '';
  return /<(https?:[^>]+)>/.exec(line)?.[1] ?? null;
}
