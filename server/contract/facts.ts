import { z } from 'zod';
import { Citation } from './citations.ts';
import { Id, listAnswer, listQuery, Named, Slug } from './common.ts';
import { Difference, FactRef, LoosePayload, Person } from './contributions.ts';
import { endpoint } from './endpoint.ts';
import { Kind } from './kinds.ts';
import { FACT_LIMITS } from './kinds/kind.ts';

/** Facts of every kind by id: choosing one, its whole history, bringing a version back, retiring it, flagging it. */

const Moment = z.iso.datetime({ offset: true });
const ById = z.strictObject({ id: Id });
const Reason = z.string().trim().min(3, 'Say why').max(FACT_LIMITS.prose);

export const listFacts = endpoint({
  method: 'GET',
  path: '/facts',
  summary: 'Facts of one kind by name, to choose one',
  query: listQuery(['title'], {
    kind: Kind,
    /** Only what belongs to this fact: positions of a model, castings of a position’s part type. */
    within: Id.optional(),
  }),
  answer: listAnswer(FactRef.extend({ maker: Named.nullable() })),
});

export const listAccounts = endpoint({
  method: 'GET',
  path: '/accounts',
  summary: 'Accounts of serial ranges',
  query: listQuery(['title']),
  answer: listAnswer(z.object({ id: Id, title: z.string() })),
});

/** One step of a fact's history. */
const HistoryStep = z.object({
  /** `retired` steps say nothing of their own; they end the version before. */
  step: z.enum(['version', 'retired']),
  version: z.number().int().positive(),
  inForce: z.boolean(),
  /** Under whose name it stands. */
  by: Person,
  /** The moderator who decided; null for what was entered before there were contributions. */
  decidedBy: Person.nullable(),
  at: Moment,
  reason: z.string(),
  contributionId: Id.nullable(),
  /** The older version it brought back. */
  broughtBack: z.number().int().nullable(),
  payload: LoosePayload,
  citations: z.array(Citation),
  /** Against the version before it; all it says for the first. */
  differences: z.array(Difference),
});

export const FactHistory = z.object({
  fact: FactRef,
  /** Null: retired, nothing is in force. */
  inForce: z.number().int().nullable(),
  /** Newest first. */
  steps: z.array(HistoryStep),
  names: z.array(FactRef),
  /** The sources cited in any version. */
  sources: z.array(z.object({ id: Id, slug: Slug, title: z.string() })),
  /** What rests on it is being worked out again. */
  workingOut: z.boolean(),
  can: z.object({ edit: z.boolean(), bringBack: z.boolean(), retire: z.boolean(), flag: z.boolean() }),
});
export type FactHistory = z.infer<typeof FactHistory>;

export const readFactHistory = endpoint({ method: 'GET', path: '/facts/:id/history', summary: 'Every version of a fact, whatever its kind', params: ById, answer: FactHistory });

export const bringBack = endpoint({
  method: 'POST',
  path: '/facts/:id/bring-back',
  summary: 'Enter what an older version said as a new one; 409 where the fact moved on',
  params: ById,
  body: z.strictObject({ version: z.number().int().positive(), reason: Reason, inForce: z.number().int().nullable() }),
  answer: FactHistory,
});
export const retireFact = endpoint({
  method: 'POST',
  path: '/facts/:id/retire',
  summary: 'Take a fact that was wrong out of the catalogue; its history stays. 409 where other facts rest on it',
  params: ById,
  body: z.strictObject({ reason: Reason, inForce: z.number().int() }),
  answer: FactHistory,
});

export const flagFact = endpoint({
  method: 'POST',
  path: '/facts/:id/flags',
  status: 201,
  summary: 'Tell the moderators that something is wrong with a fact',
  params: ById,
  body: z.strictObject({ reason: Reason }),
  answer: z.object({ id: Id }),
});

export const markRegistersReading = endpoint({
  method: 'POST',
  path: '/series/:id/reading',
  summary: 'Mark one account of a series as the register’s reading',
  params: ById,
  body: z.strictObject({ accountId: Id, reason: Reason }),
  answer: z.object({ accountId: Id }),
});
