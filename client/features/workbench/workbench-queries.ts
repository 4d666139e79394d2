import { keepPreviousData, queryOptions, skipToken } from '@tanstack/react-query';
import { tryCipher } from '#contract/cipher-workbench.ts';
import type { AnswerOf, CallInput } from '#contract/endpoint.ts';
import { call } from '../../lib/call.ts';

export type TrialRequest = CallInput<typeof tryCipher>['body'];
export type Trial = AnswerOf<typeof tryCipher>;

/** How a draft reads the marks on record; null while it makes no sense or no maker is chosen, and is not asked. */
export const trialOf = (request: TrialRequest | null) =>
  queryOptions({
    queryKey: ['workbench', 'trial', request],
    queryFn: request === null ? skipToken : ({ signal }) => call(tryCipher, { body: request, signal }),
    placeholderData: keepPreviousData,
  });
