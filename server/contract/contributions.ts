import { z } from 'zod';
import { CONTRIBUTION_STATES, DECISIONS } from '#domain/vocabulary.ts';
import { Citation } from './citations.ts';
import { Id, listAnswer, listQuery, Named, Slug } from './common.ts';
import { endpoint } from './endpoint.ts';
import { Evidence } from './evidence.ts';
import { Kind } from './kinds.ts';
import { FACT_LIMITS } from './kinds/kind.ts';
import { FieldFault } from './problem.ts';

/** Putting forward: drafts, what becomes of them, and what is said about them. */

const Moment = z.iso.datetime({ offset: true });
const ById = z.strictObject({ id: Id });

/** A fact to name and link; `slug` null where its kind has no page of its own. */
export const FactRef = z.object({ id: Id, kind: Kind, slug: Slug.nullable(), title: z.string() }).meta({ id: 'FactRef' });
export type FactRef = z.infer<typeof FactRef>;

/** Somebody who gave or decided; a closed account is "a former member". */
export const Person = z.object({ id: Id, displayName: z.string() }).meta({ id: 'Person' });
export type Person = z.infer<typeof Person>;

/** What a fact or a contribution says, by field. A draft may say it half, or wrongly. */
export const LoosePayload = z.record(z.string(), z.json()).meta({ id: 'Payload' });
export type LoosePayload = z.infer<typeof LoosePayload>;

/** A source as a draft cites it, half or wrongly; `Citation` once it is put forward. */
export const LooseCitation = z.record(z.string(), z.json()).meta({ id: 'LooseCitation' });
export type LooseCitation = z.infer<typeof LooseCitation>;

/** `superseded`: entered, and a later version has taken its place since. */
export const ShownState = z.enum([...CONTRIBUTION_STATES, 'superseded']);
export type ShownState = z.infer<typeof ShownState>;

/** One field that two payloads say differently. Values as people read them: names for ids, words for choices. */
export const Difference = z.object({
  /** From the payload inwards. */
  path: z.array(z.union([z.string(), z.number()])),
  label: z.string(),
  before: z.string().nullable(),
  after: z.string().nullable(),
});
export type Difference = z.infer<typeof Difference>;

export const ContributionItem = z.object({
  id: Id,
  kind: Kind,
  /** What it is about, in words: the fact's title, or the title it would have. */
  title: z.string(),
  state: ShownState,
  /** The fact it changes; null while it would be a new one. */
  subject: FactRef.nullable(),
  maker: Named.nullable(),
  author: Person,
  startedAt: Moment,
  changedAt: Moment,
  putForwardAt: Moment.nullable(),
});
export type ContributionItem = z.infer<typeof ContributionItem>;

const Comment = z.object({
  id: Id,
  author: Person,
  at: Moment,
  /** The field it is about, as a path in the payload joined by points; null for the whole. */
  path: z.string().nullable(),
  text: z.string(),
});

const DecisionShown = z.object({ decision: z.enum(DECISIONS), reason: z.string(), by: Person, at: Moment });

/** What a version of the fact says, to lay beside the draft. */
const VersionShown = z.object({ version: z.number().int().positive(), payload: LoosePayload, citations: z.array(Citation) });

export const ContributionPage = ContributionItem.extend({
  payload: LoosePayload,
  /** As drafted; until it is put forward a citation may be half written. */
  citations: z.array(LoosePayload),
  note: z.string().nullable(),
  /** Grows by one with each saving; a save names the one it was made on. */
  revision: z.number().int(),
  /** The version it was begun on; null for a new fact. */
  base: VersionShown.nullable(),
  /** The version in force now; null for a new or a retired fact. Another number than `base`'s: it moved on. */
  inForce: VersionShown.nullable(),
  /** What it changes against the version in force, or all it says where there is none. */
  differences: z.array(Difference),
  /** What stands in the way of putting it forward; empty when nothing does. Paths begin with `payload`, `citations` or `note`. */
  faults: z.array(FieldFault),
  /** Everything the payloads refer to by id, and the sources cited. */
  names: z.array(FactRef),
  sources: z.array(z.object({ id: Id, slug: Slug, title: z.string() })),
  comments: z.array(Comment),
  /** Oldest first; a contribution may be sent back more than once. */
  decisions: z.array(DecisionShown),
  /** The version it became. */
  enteredVersion: z.number().int().nullable(),
  /** Moderators who have it open now, without oneself. */
  openWith: z.array(Person),
  can: z.object({
    edit: z.boolean(),
    putForward: z.boolean(),
    withdraw: z.boolean(),
    discard: z.boolean(),
    comment: z.boolean(),
    decide: z.boolean(),
    seeEvidence: z.boolean(),
  }),
});
export type ContributionPage = z.infer<typeof ContributionPage>;

const Note = z.string().trim().max(FACT_LIMITS.prose).nullable();
const DraftCitations = z.array(LooseCitation).max(FACT_LIMITS.rows);

export const startContribution = endpoint({
  method: 'POST',
  path: '/contributions',
  status: 201,
  summary: 'Begin a contribution: a draft that only its author sees',
  body: z.strictObject({
    kind: Kind,
    /** The fact to change, with the version one looks at; left out for a new fact. */
    subjectId: Id.optional(),
    baseVersion: z.number().int().positive().optional(),
    /** Left out for a change: begins as the version says. */
    payload: LoosePayload.optional(),
    sources: DraftCitations.optional(),
    note: Note.optional(),
  }),
  answer: ContributionPage,
});
export const saveContribution = endpoint({
  method: 'PUT',
  path: '/contributions/:id',
  summary: 'Save a draft, whole or half; 409 where it was saved elsewhere meanwhile',
  params: ById,
  body: z.strictObject({
    revision: z.number().int(),
    payload: LoosePayload,
    sources: DraftCitations,
    note: Note,
    /** Base it on the version in force now, having seen both. */
    baseVersion: z.number().int().positive().optional(),
  }),
  answer: ContributionPage,
});
export const readContribution = endpoint({ method: 'GET', path: '/contributions/:id', summary: 'One contribution', params: ById, answer: ContributionPage });
export const discardContribution = endpoint({
  method: 'DELETE',
  path: '/contributions/:id',
  summary: 'Throw a draft away that was never put forward',
  params: ById,
  answer: z.object({ done: z.literal(true) }),
});

const OfRevision = z.strictObject({ revision: z.number().int() });

export const putForward = endpoint({
  method: 'POST',
  path: '/contributions/:id/put-forward',
  summary: 'Put a draft forward, or one that was sent back; 422 with every fault of its payload and sources',
  params: ById,
  body: OfRevision,
  answer: ContributionPage,
});
export const withdrawContribution = endpoint({
  method: 'POST',
  path: '/contributions/:id/withdraw',
  summary: 'Take back what was put forward',
  params: ById,
  body: OfRevision,
  answer: ContributionPage,
});
export const commentOnContribution = endpoint({
  method: 'POST',
  path: '/contributions/:id/comments',
  summary: 'Say something about the whole or one field',
  params: ById,
  body: z.strictObject({ path: z.string().max(120).nullable(), text: z.string().trim().min(1, 'Write something').max(FACT_LIMITS.prose) }),
  answer: ContributionPage,
});

export const readEvidence = endpoint({
  method: 'GET',
  path: '/contributions/:id/evidence',
  summary: 'The evidence kept with a contribution, the newest first',
  params: ById,
  answer: z.object({ items: z.array(Evidence) }),
});
export const gatherEvidence = endpoint({
  method: 'POST',
  path: '/contributions/:id/evidence',
  summary: 'Work the evidence out again on today’s record, as a moderator who opens it does',
  params: ById,
  answer: z.object({ items: z.array(Evidence) }),
});

export const openContribution = endpoint({
  method: 'POST',
  path: '/contributions/:id/opened',
  summary: 'Tell the other moderators that one has it open; holds for a minute',
  params: ById,
  answer: z.object({ openWith: z.array(Person) }),
});
export const decideContribution = endpoint({
  method: 'POST',
  path: '/contributions/:id/decision',
  summary: 'Enter it, send it back or turn it down; 409 where another moderator was first, saying what they did',
  params: ById,
  body: z.strictObject({
    decision: z.enum(DECISIONS),
    reason: z.string().trim().min(3, 'Say why').max(FACT_LIMITS.prose),
    revision: z.number().int(),
  }),
  answer: ContributionPage,
});

export const listMyContributions = endpoint({
  method: 'GET',
  path: '/me/contributions',
  summary: 'Your own contributions, the last changed first',
  query: listQuery(['-changed'], { state: z.enum(CONTRIBUTION_STATES).optional(), kind: Kind.optional() }),
  answer: listAnswer(ContributionItem),
});

export const readContributor = endpoint({
  method: 'GET',
  path: '/contributors/:id',
  summary: 'What somebody gave to the catalogue',
  params: ById,
  query: listQuery(['-entered'], { kind: Kind.optional() }),
  answer: listAnswer(
    z.object({ id: Id, fact: FactRef, version: z.number().int(), enteredAt: Moment, reason: z.string(), inForce: z.boolean() }),
  ).extend({ contributor: Person.extend({ since: Moment }), kinds: z.array(z.object({ kind: Kind, count: z.number().int() })) }),
});
