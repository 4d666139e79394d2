import { queryOptions } from '@tanstack/react-query';
import { listPost, readPost } from '#contract/post.ts';
import { call } from '../../lib/call.ts';
import { ProblemError, problemOfKind } from '../../lib/problem-error.ts';

export const postList = () => queryOptions({ queryKey: ['post', 'list'], queryFn: ({ signal }) => call(listPost, { signal }), staleTime: 0 });

export const postLetter = (id: string) => queryOptions({ queryKey: ['post', 'letter', id], queryFn: ({ signal }) => call(readPost, { params: { id }, signal }) });

/** An address that can't be a letter's, like one where no letter is, is nothing at all. */
export function asMissing(error: unknown): unknown {
  return error instanceof ProblemError && error.kind === 'invalid' ? problemOfKind('not-found') : error;
}
