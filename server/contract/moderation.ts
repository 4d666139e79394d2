import { z } from 'zod';
import { Id, listAnswer, listQuery, Slug } from './common.ts';
import { ContributionItem, FactRef, Person } from './contributions.ts';
import { endpoint } from './endpoint.ts';
import { Kind } from './kinds.ts';
import { FACT_LIMITS } from './kinds/kind.ts';

/** What moderators see: the queue, flags, and what is being worked out again. */

const Moment = z.iso.datetime({ offset: true });

export const Flag = z.object({
  id: Id,
  fact: FactRef,
  by: Person,
  at: Moment,
  reason: z.string(),
  settled: z.object({ by: Person, at: Moment, outcome: z.enum(['acted', 'kept']), reason: z.string() }).nullable(),
});
export type Flag = z.infer<typeof Flag>;

export const QueueItem = z.discriminatedUnion('type', [
  z.object({
    type: z.literal('contribution'),
    id: Id,
    at: Moment,
    contribution: ContributionItem,
    openWith: z.array(Person),
    /** One's own can be seen and not decided. */
    own: z.boolean(),
  }),
  z.object({ type: z.literal('flag'), id: Id, at: Moment, flag: Flag }),
]);
export type QueueItem = z.infer<typeof QueueItem>;

export const listQueue = endpoint({
  method: 'GET',
  path: '/moderation/queue',
  summary: 'What waits for a decision on the makers in scope, oldest first',
  query: listQuery(['at', '-at'], { type: z.enum(['contribution', 'flag']).optional(), kind: Kind.optional(), maker: Slug.optional() }),
  answer: listAnswer(QueueItem),
});

export const settleFlag = endpoint({
  method: 'POST',
  path: '/flags/:id/settle',
  summary: 'Say what became of a flag',
  params: z.strictObject({ id: Id }),
  body: z.strictObject({ outcome: z.enum(['acted', 'kept']), reason: z.string().trim().min(3, 'Say why').max(FACT_LIMITS.prose) }),
  answer: Flag,
});

/** Everything that rested on a fact being worked out again after it changed. */
export const Rework = z.object({
  id: Id,
  fact: FactRef,
  version: z.number().int().nullable(),
  startedAt: Moment,
  finishedAt: Moment.nullable(),
  state: z.enum(['waiting', 'running', 'done', 'failed']),
  /** Parts and marks looked at, out of all there are to look at; null until they were counted. */
  done: z.number().int(),
  total: z.number().int().nullable(),
  /** Decodings and fits that came out otherwise. */
  changed: z.number().int(),
  machinesChanged: z.number().int(),
});
export type Rework = z.infer<typeof Rework>;

export const listReworks = endpoint({
  method: 'GET',
  path: '/moderation/reworks',
  summary: 'What is and was being worked out again, newest first',
  query: listQuery(['-started']),
  answer: listAnswer(Rework),
});
