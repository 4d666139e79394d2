import type { z } from 'zod';
import type { Notice as NoticeAnswer } from '#contract/notices.ts';
import type { Notice } from '#db/models/notice.ts';

export function presentNotice({ id, kind, title, body, href, at, readAt }: Notice): z.input<typeof NoticeAnswer> {
  return { id, kind, title, body, href, at, read: readAt !== null };
}
