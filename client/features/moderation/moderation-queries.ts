import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import type { CallInput } from '#contract/endpoint.ts';
import { listQueue, listReworks } from '#contract/moderation.ts';
import { call } from '../../lib/call.ts';

/** Who has what open holds for a minute. */
const QUEUE_MS = 30_000;
/** Where nothing runs, something may begin meanwhile. */
const REWORKS_MS = 20_000;
const RUNNING_MS = 2_000;

export const moderationKeys = {
  all: ['moderation'] as const,
  queue: ['moderation', 'queue'] as const,
  reworks: ['moderation', 'reworks'] as const,
};

/** What waits for a decision, asked for again while the page is open. */
export const queueList = (query: CallInput<typeof listQueue>['query']) =>
  queryOptions({
    queryKey: [...moderationKeys.queue, query],
    queryFn: ({ signal }) => call(listQueue, { query, signal }),
    placeholderData: keepPreviousData,
    staleTime: 0,
    refetchInterval: QUEUE_MS,
  });

/** What is being worked out again, followed closely while something runs. */
export const reworksList = (query: CallInput<typeof listReworks>['query']) =>
  queryOptions({
    queryKey: [...moderationKeys.reworks, query],
    queryFn: ({ signal }) => call(listReworks, { query, signal }),
    placeholderData: keepPreviousData,
    staleTime: 0,
    refetchInterval: ({ state }) => (state.data?.items.some(isUnderWay) === true ? RUNNING_MS : REWORKS_MS),
  });

function isUnderWay({ state }: { readonly state: 'waiting' | 'running' | 'done' | 'failed' }): boolean {
  return state === 'waiting' || state === 'running';
}
