import { infiniteQueryOptions, queryOptions } from '@tanstack/react-query';
import { listNotices, readNoticeChoices } from '#contract/notices.ts';
import { call } from '../../lib/call.ts';

export const noticeKeys = {
  all: ['mine', 'notices'] as const,
  list: (unreadOnly: boolean) => [...noticeKeys.all, 'list', unreadOnly] as const,
  choices: ['mine', 'notice-choices'] as const,
};

/** Newest first, page by page; the cursor is the register's own. */
export const noticesList = (unreadOnly: boolean) =>
  infiniteQueryOptions({
    queryKey: noticeKeys.list(unreadOnly),
    queryFn: ({ pageParam, signal }) =>
      call(listNotices, { query: { ...(unreadOnly ? { unread: 'true' as const } : {}), ...(pageParam === null ? {} : { after: pageParam }) }, signal }),
    initialPageParam: null as string | null,
    getNextPageParam: ({ next }) => next,
    staleTime: 0,
  });

export const noticeChoices = () => queryOptions({ queryKey: noticeKeys.choices, queryFn: ({ signal }) => call(readNoticeChoices, { signal }) });
