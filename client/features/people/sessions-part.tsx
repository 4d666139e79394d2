import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { endOtherSessions, endSession } from '#contract/accounts.ts';
import { call } from '../../lib/call.ts';
import { sayInstant } from '../../lib/say-instant.ts';
import { Button } from '../../ui/button.tsx';
import { DataTable } from '../../ui/data-table.tsx';
import { FailureNote } from '../../ui/failure-note.tsx';
import { Live } from '../../ui/live.tsx';
import { ActTrouble } from './act-trouble.tsx';
import { peopleKeys, sessionsList } from './people-queries.ts';

/** Where a member is signed in, and the end of it. */
export function SessionsPart() {
  const { data, error, refetch } = useQuery(sessionsList());
  const queryClient = useQueryClient();
  const onSuccess = () => queryClient.invalidateQueries({ queryKey: peopleKeys.sessions });
  const endOne = useMutation({ mutationFn: (id: string) => call(endSession, { params: { id } }), onSuccess });
  const endOthers = useMutation({ mutationFn: () => call(endOtherSessions, {}), onSuccess });
  if (error !== null) return <FailureNote error={error} onAgain={() => void refetch()} />;
  return (
    <div className="space-y-4">
      <Live>{endOne.isSuccess || endOthers.isSuccess ? 'Ended' : ''}</Live>
      <ActTrouble act={endOne} />
      <ActTrouble act={endOthers} />
      <DataTable
        caption="Where you are signed in"
        rows={data?.items ?? null}
        skeletonRows={2}
        rowKey={({ id }) => id}
        columns={[
          { key: 'device', header: 'Browser', rowHeader: true, cell: ({ device }) => device },
          { key: 'started', header: 'signed in', cell: ({ startedAt }) => sayInstant(startedAt) },
          { key: 'seen', header: 'last seen', cell: ({ lastSeenAt }) => sayInstant(lastSeenAt) },
          { key: 'by', header: 'by', cell: ({ secondFactor }) => (secondFactor ? 'second factor' : 'password') },
          {
            key: 'end',
            header: 'end',
            bare: true,
            cell: ({ id, current, device }) =>
              current ? (
                <span className="text-verdigris">this one</span>
              ) : (
                <Button disabled={endOne.isPending} onClick={() => endOne.mutate(id)}>
                  End<span className="sr-only"> the session in {device}</span>
                </Button>
              ),
          },
        ]}
      />
      {data !== undefined && data.items.length > 1 && (
        <Button disabled={endOthers.isPending} onClick={() => endOthers.mutate()}>
          End all others
        </Button>
      )}
    </div>
  );
}
