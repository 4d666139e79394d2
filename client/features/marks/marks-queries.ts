import { queryOptions } from '@tanstack/react-query';
import { readMark } from '#contract/marks.ts';
import { call } from '../../lib/call.ts';

/** How often a page looks whether the working out has ended. */
const WORKING_OUT_MS = 4_000;

export const markPage = (id: string) =>
  queryOptions({
    queryKey: ['marks', 'page', id],
    queryFn: ({ signal }) => call(readMark, { params: { id }, signal }),
    refetchInterval: ({ state }) => (state.data?.workingOut === true ? WORKING_OUT_MS : false),
  });
