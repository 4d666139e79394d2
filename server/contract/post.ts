import { z } from 'zod';
import { endpoint } from './endpoint.ts';

/** Letters that a local mail server kept instead of sending. These endpoints are there only on a developer’s machine. */

/** When a letter came, to the millisecond, and a number drawn by chance: newest last when sorted as text. */
const PostId = z.string().regex(/^\d{13}-[0-9a-f]{8}$/, 'Not a letter of the local post');

export const PostItem = z.object({
  id: PostId,
  to: z.string(),
  subject: z.string(),
  at: z.iso.datetime({ offset: true }),
});
export type PostItem = z.infer<typeof PostItem>;

export const PostLetter = PostItem.extend({
  from: z.string(),
  text: z.string(),
  html: z.string(),
  /** Addresses the letter links to, in their order. */
  links: z.array(z.string()),
  /** Where a mail program's own button to unsubscribe leads; null without one. */
  unsubscribe: z.string().nullable(),
});
export type PostLetter = z.infer<typeof PostLetter>;

export const listPost = endpoint({
  method: 'GET',
  path: '/post',
  summary: 'The newest 100 letters the local post kept, newest first',
  answer: z.object({ items: z.array(PostItem) }),
});
export const readPost = endpoint({
  method: 'GET',
  path: '/post/:id',
  summary: 'One letter the local post kept',
  params: z.strictObject({ id: PostId }),
  answer: PostLetter,
});
