import { mkdtemp, readdir, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterEach, beforeEach, describe, expect, test } from 'vitest';
import { listLocalPost, readLocalPost, startLocalPost } from '#server/mail/local-post.ts';
import type { LocalPost } from '#server/mail/local-post.ts';
import { writeLetter } from '#server/mail/mail-templates.ts';
import { createMailer } from '#server/mail/mailer.ts';

const ID = '01980000-0000-7000-8000-000000000001';
const TOKEN = 'Zm9yLXRlc3RzLW9ubHktMzItYnl0ZXMtb2Ytbm90aGk';
const ORIGIN = 'http://127.0.0.1:5080';

let folder: string;
let post: LocalPost;
beforeEach(async () => {
  folder = path.join(await mkdtemp(path.join(tmpdir(), 'pourbook-post-')), 'mail');
  post = await startLocalPost({ folder, port: 0 });
});
afterEach(async () => {
  await post.stop();
  await rm(path.dirname(folder), { recursive: true });
});

async function send(name: string, data: unknown): Promise<void> {
  const mailer = createMailer({ url: `smtp://127.0.0.1:${post.port}`, from: 'post@pourbook.invalid', origin: ORIGIN });
  await mailer.send({ id: ID, to: 'b@register.example', letter: writeLetter(name, data, ORIGIN) }, new AbortController().signal);
}

describe('the local post', () => {
  test('keeps a letter so that it can be read and its links followed', async () => {
    await send('confirm-address', { token: TOKEN });
    const [item] = await listLocalPost(folder);
    expect(item).toMatchObject({ to: 'b@register.example', subject: 'Confirm your e-mail address' });
    const letter = await readLocalPost(folder, item!.id);
    expect(letter).toMatchObject({ ...item, from: '"Pourbook" <post@pourbook.invalid>', links: [`${ORIGIN}/confirm?token=${TOKEN}`], unsubscribe: null });
    expect(letter!.text).toContain('It works once, within 24 hours.');
    expect(letter!.html).toContain('<html lang="en">');
  });

  test('shows where a notice is unsubscribed from', async () => {
    await send('notice', { kind: 'role', title: 'Entered', body: 'With a note.', href: null, unsubscribeToken: TOKEN });
    const [item] = await listLocalPost(folder);
    expect((await readLocalPost(folder, item!.id))?.unsubscribe).toBe(`${ORIGIN}/unsubscribe/${TOKEN}`);
  });

  test('lists the newest first and nothing that is no letter', async () => {
    await send('already-known', {});
    await send('password-changed', {});
    await writeFile(path.join(folder, 'notes.eml'), 'Subject: not ours\n\n');
    expect((await readdir(folder)).some((name) => name.endsWith('.part'))).toBe(false);
    const items = await listLocalPost(folder);
    expect(items.map(({ id }) => id)).toEqual(items.map(({ id }) => id).toSorted().toReversed());
    expect(items.map(({ subject }) => subject).toSorted()).toEqual(['You already have an account', 'Your password was changed']);
  });

  test('holds nothing before the first letter, and nothing outside its folder', async () => {
    expect(await listLocalPost(path.join(folder, 'elsewhere'))).toEqual([]);
    await writeFile(path.join(folder, '..', '0000000000000-00000000.eml'), 'Subject: secret\n\n');
    expect(await readLocalPost(folder, '../0000000000000-00000000')).toBeUndefined();
    expect(await readLocalPost(folder, '0000000000000-00000000')).toBeUndefined();
  });
});
