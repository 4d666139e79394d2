import { z } from 'zod';
import { NOTICE_KINDS } from '#domain/vocabulary.ts';
import { Id, listAnswer, listQuery } from './common.ts';
import { endpoint } from './endpoint.ts';
import { LinkToken } from './people.ts';

/** Kinds of notice; a kind is added here, in the words of the mail templates and nowhere else. */
export const NoticeKind = z.enum(NOTICE_KINDS);
export type NoticeKind = z.infer<typeof NoticeKind>;

export const Notice = z.object({
  id: Id,
  kind: NoticeKind,
  title: z.string(),
  body: z.string(),
  /** Where it leads, an address of this site; null for none. */
  href: z.string().nullable(),
  at: z.iso.datetime({ offset: true }),
  read: z.boolean(),
});
export type Notice = z.infer<typeof Notice>;

export const listNotices = endpoint({
  method: 'GET',
  path: '/me/notifications',
  summary: 'Your notices, newest first',
  query: listQuery(['-at'], { unread: z.enum(['true', 'false']).optional() }),
  answer: listAnswer(Notice),
});
export const markNoticesRead = endpoint({
  method: 'POST',
  path: '/me/notifications/read',
  summary: 'Mark some or all notices read',
  body: z.strictObject({ ids: z.array(Id).min(1).max(100).optional() }),
  answer: z.object({ unread: z.number().int() }),
});

const NoticeChoices = z.object({ byEmail: z.record(NoticeKind, z.boolean()) });
export const readNoticeChoices = endpoint({
  method: 'GET',
  path: '/me/notification-choices',
  summary: 'Which kinds of notice also come by e-mail',
  answer: NoticeChoices,
});
export const chooseNotices = endpoint({
  method: 'PUT',
  path: '/me/notification-choices',
  summary: 'Choose which kinds of notice also come by e-mail',
  body: z.strictObject({ byEmail: z.partialRecord(NoticeKind, z.boolean()) }),
  answer: NoticeChoices,
});
/** RFC 8058: the same address answers a mail program’s one-click POST and the page a person opens. */
export const unsubscribe = endpoint({
  method: 'POST',
  path: '/unsubscribe/:token',
  summary: 'Stop e-mails of the kind the link came with; needs no sign-in',
  params: z.strictObject({ token: LinkToken }),
  answer: z.object({ kind: NoticeKind }),
});
