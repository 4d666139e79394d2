import { useInfiniteQuery, useMutation, useQueryClient } from '@tanstack/react-query';
import { Link, useSearchParams } from 'react-router-dom';
import { markNoticesRead } from '#contract/notices.ts';
import type { Me } from '#contract/people.ts';
import { NoticeList } from '../../features/notices/notice-list.tsx';
import { noticeKeys, noticesList } from '../../features/notices/notices-queries.ts';
import { me } from '../../features/people/people-queries.ts';
import { SignedInOnly } from '../../features/people/signed-in-only.tsx';
import { call } from '../../lib/call.ts';
import { paths } from '../../lib/paths.ts';
import { capital, sayCount } from '../../lib/say-number.ts';
import { Button, ButtonLink } from '../../ui/button.tsx';
import { EmptyState } from '../../ui/empty-state.tsx';
import { FailureNote } from '../../ui/failure-note.tsx';
import { Block } from '../../ui/page-grid.tsx';
import { PageTitle } from '../../ui/page-title.tsx';
import { PartingLine } from '../../ui/parting-line.tsx';
import { Skeleton } from '../../ui/skeleton.tsx';

export function Component() {
  return <SignedInOnly title="Notices">{(viewer) => <Notices viewer={viewer} />}</SignedInOnly>;
}

function Notices({ viewer }: { readonly viewer: Me }) {
  const unreadOnly = useSearchParams()[0].get('unread') === 'true';
  const { data, error, refetch, hasNextPage, fetchNextPage, isFetchingNextPage } = useInfiniteQuery(noticesList(unreadOnly));
  const queryClient = useQueryClient();
  const mark = useMutation({
    mutationFn: (ids: readonly string[] | null) => call(markNoticesRead, { body: ids === null ? {} : { ids: [...ids] } }),
    onSuccess: ({ unread }) => {
      queryClient.setQueryData(me().queryKey, (now) => (now ? { ...now, unreadNotices: unread } : now));
      return queryClient.invalidateQueries({ queryKey: noticeKeys.all });
    },
  });
  const notices = data?.pages.flatMap(({ items }) => items);
  return (
    <>
      <PageTitle title="Notices" below={viewer.unreadNotices === 0 ? 'All read.' : `${capital(sayCount(viewer.unreadNotices))} not read yet.`}>
        Notices
      </PageTitle>
      <PartingLine />
      <div className="pt-6">
        <Block
          margin={
            <p className="text-[15px] leading-snug text-slag">
              Which of them also come by e-mail you choose on <Link to={paths.account('notices')}>your account’s page</Link>.
            </p>
          }
        >
          <div className="mb-4 flex flex-wrap items-center gap-3">
            <ButtonLink to={unreadOnly ? '?' : '?unread=true'}>{unreadOnly ? 'Show all' : 'Only those not read'}</ButtonLink>
            {viewer.unreadNotices > 0 && (
              <Button disabled={mark.isPending} onClick={() => mark.mutate(null)}>
                Mark all read
              </Button>
            )}
          </div>
          {mark.isError && <FailureNote error={mark.error} onAgain={() => mark.mutate(mark.variables)} />}
          {error !== null && <FailureNote error={error} onAgain={() => void refetch()} />}
          {notices === undefined && error === null && <Skeleton lines={5} label="Loading your notices" />}
          {notices?.length === 0 && (
            <EmptyState title={unreadOnly ? 'Nothing new' : 'No notices yet'}>
              What others do with what you entered, a change of your role, machines handed over to you: it will stand here.
            </EmptyState>
          )}
          {notices !== undefined && notices.length > 0 && <NoticeList notices={notices} busy={mark.isPending} onRead={(id) => mark.mutate([id])} />}
          {hasNextPage && (
            <Button className="mt-6" disabled={isFetchingNextPage} onClick={() => void fetchNextPage()}>
              {isFetchingNextPage ? 'Loading more' : 'Show more'}
            </Button>
          )}
        </Block>
      </div>
    </>
  );
}
