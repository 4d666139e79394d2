import type { Flag, QueueItem } from '#contract/moderation.ts';
import type { QueueItemOnRecord } from '#server/services/moderation/list-queue.ts';
import type { FlagOnRecord } from '#server/services/moderation/load-flags.ts';
import { presentContributionItem } from './contribution.ts';
import { presentFactRef, presentPerson } from './fact.ts';
import { loaded } from './loaded.ts';

export function presentFlag({ flag, fact }: FlagOnRecord): Flag {
  const { id, by, at, reason, outcome, settledBy, settledAt, settledReason } = flag;
  const settled =
    outcome === null ? null : { by: presentPerson(loaded(settledBy)), at: loaded(settledAt), outcome, reason: loaded(settledReason) };
  return { id, fact: presentFactRef(fact), by: presentPerson(loaded(by)), at, reason, settled };
}

export function presentQueueItem(item: QueueItemOnRecord): QueueItem {
  const { id, at } = item;
  if (item.type === 'flag') return { type: 'flag', id, at, flag: presentFlag(item.flag) };
  const { contribution, openWith, own } = item;
  return { type: 'contribution', id, at, contribution: presentContributionItem(contribution), openWith: openWith.map(presentPerson), own };
}
