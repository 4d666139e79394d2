import type { ShownState } from '#contract/contributions.ts';
import type { Decision } from '#domain/vocabulary.ts';

/** Where a contribution stands, as it is called everywhere. */
export const STATE_WORDS: Readonly<Record<ShownState, string>> = {
  drafted: 'draft',
  'put-forward': 'waits for a decision',
  'sent-back': 'sent back',
  entered: 'entered',
  'turned-down': 'turned down',
  withdrawn: 'withdrawn',
  superseded: 'entered, a later version stands since',
};

/** What a moderator did. */
export const DECISION_WORDS: Readonly<Record<Decision, string>> = {
  enter: 'Entered it',
  'send-back': 'Sent it back',
  'turn-down': 'Turned it down',
};
