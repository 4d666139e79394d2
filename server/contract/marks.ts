import { z } from 'zod';
import { EVIDENCE_STRENGTHS, MARK_KINDS, MARK_TECHNIQUES } from '#domain/vocabulary.ts';
import { DateSpan, Id, IsoDay, listAnswer, listQuery, Named, OpenSpan, Slug } from './common.ts';
import { FactRef } from './contributions.ts';
import { MarkText } from './decode.ts';
import { endpoint } from './endpoint.ts';
import { MarkInShort, MarkPhoto, Region } from './parts.ts';
import { PHOTO_LIMITS } from './photos.ts';

const Moment = z.iso.datetime({ offset: true });

/** One person's reading. Nothing is overwritten: who reads again adds one, and their latest that was not taken back counts. */
export const ReadingShown = z
  .object({
    id: Id,
    text: z.string(),
    by: z.string(),
    isMine: z.boolean(),
    at: Moment,
    /** Made before its reader was shown what others had read. */
    independent: z.boolean(),
    /** By whoever held the part then; it counts, and confirms nothing. */
    asHolder: z.boolean(),
    /** Null while it stands. */
    takenBackAt: Moment.nullable(),
    /** A later one by the same reader stands in its place. */
    replaced: z.boolean(),
  })
  .meta({ id: 'Reading' });
export type ReadingShown = z.infer<typeof ReadingShown>;

/** `agree` of `readers`, and the 95 % limits of Wilson (1927) on the share. */
const Agreement = z.object({ agree: z.number().int(), readers: z.number().int(), low: z.number(), high: z.number() });

/** How the reading in force was worked out from the independent ones, each set beside the others glyph by glyph. */
export const ReadingInForce = z
  .object({
    text: z.string(),
    /** Who reads all of it so. */
    whole: Agreement,
    places: z.array(
      Agreement.extend({
        /** What is taken to stand here, in the mark notation; empty: most see nothing here. */
        settled: z.string(),
        /** The glyph of `text` this is, counted from 0; null where nothing is taken to stand. */
        position: z.number().int().nullable(),
        /** What was read here, most readers first; empty text: nothing. */
        said: z.array(z.object({ text: z.string(), by: z.array(z.string()) })),
      }),
    ),
  })
  .meta({ id: 'ReadingInForce' });
export type ReadingInForce = z.infer<typeof ReadingInForce>;

/** A mark on record, as its viewer may see it. */
export const MarkPage = z.object({
  id: Id,
  kind: z.enum(MARK_KINDS),
  technique: z.enum(MARK_TECHNIQUES),
  revision: z.number().int(),
  /** The viewer has not read it yet and another reading is wanted: readings, dates and the part are null or empty until they read or ask. */
  hidden: z.boolean(),
  evidence: z.enum(EVIDENCE_STRENGTHS),
  wantsReading: z.boolean(),
  photos: z.array(MarkPhoto),
  /** The reading in force; null while nobody has read it. */
  reading: z.string().nullable(),
  /** How it was worked out; null where there is no independent reading. */
  inForce: ReadingInForce.nullable(),
  /** Newest first. */
  readings: z.array(ReadingShown),
  /** The part it stands on; null for one on a machine. */
  part: z.object({ id: Id, title: z.string() }).nullable(),
  maker: Named.nullable(),
  casting: FactRef.nullable(),
  /** The machine it was found on; its serial is masked unless its owner shows it. */
  machine: z.object({ model: Named, serial: z.string() }).nullable(),
  /** What it was worked out to mean; null for a mark that is no date, and while it is being worked out again. */
  dates: z
    .object({
      status: z.enum(['dated', 'several', 'none']),
      cipher: FactRef.nullable(),
      cipherVersion: z.number().int().nullable(),
      candidates: z.array(DateSpan.extend({ share: z.number() })),
      total: z.number().int(),
    })
    .nullable(),
  workingOut: z.boolean(),
  /** `read`: a signed-in member. `change`: its part's holder. */
  can: z.object({ read: z.boolean(), change: z.boolean(), remove: z.boolean() }),
});
export type MarkPage = z.infer<typeof MarkPage>;

/** What the reading screen needs. A second reader reads blind: nothing here says what others read, what it means or what the part is. */
export const ReadingDesk = z.object({
  id: Id,
  kind: z.enum(MARK_KINDS),
  technique: z.enum(MARK_TECHNIQUES),
  revision: z.number().int(),
  photos: z.array(MarkPhoto),
  /** The viewer has not seen what others read. */
  blind: z.boolean(),
  /** Nobody has read it yet. */
  first: z.boolean(),
  isHolder: z.boolean(),
  /** The viewer's reading that stands. */
  mine: z.object({ id: Id, text: z.string(), at: Moment }).nullable(),
  /** Null for whoever reads blind. */
  part: z.object({ id: Id, title: z.string(), maker: Named.nullable(), casting: FactRef.nullable(), made: OpenSpan.nullable() }).nullable(),
  /** What the decoder may be narrowed by: whose ciphers, and when its casting was made. Null for whoever reads blind. */
  narrowing: z.object({ makerId: Id.nullable(), from: IsoDay.nullable(), to: IsoDay.nullable() }).nullable(),
});
export type ReadingDesk = z.infer<typeof ReadingDesk>;

/** A mark offered to second readers: its photo and no word of what anybody made of it. */
export const MarkToRead = z.object({ id: Id, kind: z.enum(MARK_KINDS), technique: z.enum(MARK_TECHNIQUES), photo: MarkPhoto, askedAt: Moment });
export type MarkToRead = z.infer<typeof MarkToRead>;

export const MarkOnList = MarkInShort.extend({
  maker: Named.nullable(),
  part: z.object({ id: Id, title: z.string() }).nullable(),
  casting: FactRef.nullable(),
  readAt: Moment.nullable(),
});
export type MarkOnList = z.infer<typeof MarkOnList>;

const ById = z.strictObject({ id: Id });
const Done = z.object({ done: z.literal(true) });
const OfPhoto = z.strictObject({ id: Id, photoId: Id });

/** How a mark stands on a photo. */
const Placing = z.strictObject({
  region: Region.nullable(),
  turn: z.number().min(-180).max(180).default(0),
  mirrored: z.boolean().default(false),
});

const MarkForm = z.strictObject({ kind: z.enum(MARK_KINDS), technique: z.enum(MARK_TECHNIQUES) });

export const listMarks = endpoint({
  method: 'GET',
  path: '/marks',
  summary: 'The public record of marks; `number` takes the mark notation and finds what may say the same',
  query: listQuery(['-read', 'read', 'reading'], {
    number: MarkText.optional(),
    kind: z.enum(MARK_KINDS).optional(),
    maker: Slug.optional(),
    /** A date it can mean lies between these, both included. */
    from: IsoDay.optional(),
    to: IsoDay.optional(),
    hasPhoto: z.enum(['true', 'false']).optional(),
    wantsReading: z.enum(['true', 'false']).optional(),
  }),
  answer: listAnswer(MarkOnList),
});
export const listMarksToRead = endpoint({
  method: 'GET',
  path: '/marks/to-read',
  summary: 'Public marks that want another reading and that you have neither read nor looked up, those asked for longest first',
  query: listQuery(['asked'], { kind: z.enum(MARK_KINDS).optional() }),
  answer: listAnswer(MarkToRead),
});
export const recordMark = endpoint({
  method: 'POST',
  path: '/parts/:id/marks',
  status: 201,
  summary: 'Put a mark of a part of yours on record',
  params: ById,
  body: MarkForm.extend({
    photos: z.array(Placing.extend({ photoId: Id })).max(PHOTO_LIMITS.ofMark),
    /** Your reading, where you have one already. */
    reading: MarkText.nullable(),
  }),
  answer: MarkPage,
});
export const readMark = endpoint({
  method: 'GET',
  path: '/marks/:id',
  summary: 'A mark on record: photos, readings, and what it was worked out to mean',
  params: ById,
  answer: MarkPage,
});
export const changeMark = endpoint({
  method: 'PUT',
  path: '/marks/:id',
  summary: 'Say otherwise what kind of mark it is',
  params: ById,
  body: MarkForm.extend({ revision: z.number().int() }),
  answer: MarkPage,
});
export const removeMark = endpoint({
  method: 'DELETE',
  path: '/marks/:id',
  summary: 'Take a mark of a part of yours off the record, as long as nobody else has read it',
  params: ById,
  answer: Done,
});
export const placeMark = endpoint({
  method: 'PUT',
  path: '/marks/:id/photos/:photoId',
  summary: 'Say where on a photo of yours a mark stands; a photo that was not one of it becomes one',
  params: OfPhoto,
  body: Placing,
  answer: MarkPage,
});
export const takePhotoOffMark = endpoint({
  method: 'DELETE',
  path: '/marks/:id/photos/:photoId',
  summary: 'Take a photo off a mark; the photo stays',
  params: OfPhoto,
  answer: MarkPage,
});
export const openDesk = endpoint({
  method: 'GET',
  path: '/marks/:id/desk',
  summary: 'What is needed to read a mark; blind for whoever has not seen what others read',
  params: ById,
  answer: ReadingDesk,
});
export const makeReading = endpoint({
  method: 'POST',
  path: '/marks/:id/readings',
  status: 201,
  summary: 'Read a mark. Earlier readings of yours stay on record; the latest you made without seeing what others read counts',
  params: ById,
  body: z.strictObject({
    text: MarkText,
    /** The photo it was read from; null: from the iron. */
    photoId: Id.nullable(),
  }),
  answer: MarkPage,
});
export const takeBackReading = endpoint({
  method: 'DELETE',
  path: '/readings/:id',
  summary: 'Take back a reading of yours; it stays on record as taken back and no longer counts',
  params: ById,
  answer: MarkPage,
});
export const lookUpReadings = endpoint({
  method: 'POST',
  path: '/marks/:id/looks',
  summary: 'Be shown what others read. A reading you make afterwards no longer counts as independent',
  params: ById,
  answer: MarkPage,
});
