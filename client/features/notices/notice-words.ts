import type { NoticeKind } from '#contract/notices.ts';

/** What a kind of notice is about, as the letters call it too. */
export const NOTICE_NAMES: Readonly<Record<NoticeKind, string>> = {
  account: 'your account',
  role: 'your role',
  contribution: 'what you entered',
  recomputed: 'marks that were worked out anew',
  reading: 'readings of marks',
  handover: 'machines handed over',
  message: 'messages',
};
