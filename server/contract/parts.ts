import { z } from 'zod';
import { EVIDENCE_STRENGTHS, MARK_KINDS, MARK_TECHNIQUES } from '#domain/vocabulary.ts';
import { DateSpan, Id, listAnswer, listQuery, Named } from './common.ts';
import { FactRef } from './contributions.ts';
import { endpoint } from './endpoint.ts';
import { LIMITS } from './limits.ts';
import { Photo, PHOTO_LIMITS } from './photos.ts';

export const PART_LIMITS = { called: 120, condition: 2_000, note: 4_000, marks: 40, each: 5_000 } as const;

/** Where on a photo a mark stands, in shares of the upright picture's width and height, from its upper left corner. */
export const Region = z
  .strictObject({
    left: z.number().min(0).max(1),
    top: z.number().min(0).max(1),
    width: z.number().positive().max(1),
    height: z.number().positive().max(1),
  })
  .refine(({ left, width }) => left + width <= 1.000_001, { error: 'Reaches past the right edge', path: ['width'] })
  .refine(({ top, height }) => top + height <= 1.000_001, { error: 'Reaches past the lower edge', path: ['height'] })
  .meta({ id: 'Region' });
export type Region = z.infer<typeof Region>;

/** A photo of a mark: where the mark stands on it, and how to turn the picture so that it reads. */
export const MarkPhoto = z
  .object({
    photo: Photo,
    region: Region.nullable(),
    /** Degrees clockwise. */
    turn: z.number(),
    /** A squeeze or a rubbing from behind: read in the mirror. */
    mirrored: z.boolean(),
  })
  .meta({ id: 'MarkPhoto' });
export type MarkPhoto = z.infer<typeof MarkPhoto>;

/** What a mark was worked out to mean, in short. */
const DatesInShort = z.object({ status: z.enum(['dated', 'several', 'none']), total: z.number().int(), candidates: z.array(DateSpan.extend({ share: z.number() })) });

/** A mark among others: on its part's page, on the bench, in the record of marks. */
export const MarkInShort = z
  .object({
    id: Id,
    kind: z.enum(MARK_KINDS),
    technique: z.enum(MARK_TECHNIQUES),
    /** In the mark notation; null while nobody has read it, and while `hidden`. */
    reading: z.string().nullable(),
    /** The viewer has not read it yet and another reading is wanted: what others read is kept from them until they ask. */
    hidden: z.boolean(),
    evidence: z.enum(EVIDENCE_STRENGTHS),
    wantsReading: z.boolean(),
    /** Null for a mark that is no date or is not read, while it is hidden and while it is being worked out again. */
    dates: DatesInShort.nullable(),
    /** Its first photo. */
    photo: MarkPhoto.nullable(),
  })
  .meta({ id: 'MarkInShort' });
export type MarkInShort = z.infer<typeof MarkInShort>;

const optionalText = (most: number) => z.string().trim().max(most).nullable();

/** What a holder says of a part. Everything may be left open: a photo of a mark is enough to begin with. */
export const PartForm = z.strictObject({
  partTypeId: Id.nullable(),
  /** What it is, in the holder's words, where the catalogue has no such type. */
  called: optionalText(PART_LIMITS.called),
  makerId: Id.nullable(),
  foundModelId: Id.nullable(),
  /** The serial of the machine it was found on, as stamped. */
  foundSerial: optionalText(LIMITS.serial),
  condition: optionalText(PART_LIMITS.condition),
  /** For the holder alone. */
  note: optionalText(PART_LIMITS.note),
  visibility: z.enum(['private', 'public']),
  /** In the order in which they are shown. */
  photoIds: z.array(Id).max(PHOTO_LIMITS.ofPart).refine((ids) => new Set(ids).size === ids.length, 'Names a photo twice'),
});
export type PartForm = z.infer<typeof PartForm>;

const PartNames = z.object({
  id: Id,
  /** What it is, in a few words: its type, else what its holder calls it, else `Part not named yet`. */
  title: z.string(),
  partType: Named.nullable(),
  maker: Named.nullable(),
  /** The catalogue's entry its casting number leads to. */
  casting: FactRef.nullable(),
  /** The casting number as read; null while it is hidden from the viewer. */
  number: z.string().nullable(),
  visibility: z.enum(['private', 'by-link', 'public']),
  recordedAt: z.iso.datetime({ offset: true }),
});

/** A part on the bench. */
export const PartItem = PartNames.extend({
  /** The photo it is known by: its own first, else a mark's. */
  photo: Photo.nullable(),
  marks: z.array(MarkInShort),
  /** The machine it is on now; null: on the bench. The serial as its owner may see it. */
  fittedTo: z.object({ model: Named, serial: z.string(), position: z.string() }).nullable(),
  condition: z.string().nullable(),
});
export type PartItem = z.infer<typeof PartItem>;

export const PartPage = PartItem.extend({
  /** Sent back with a change, so that nothing newer is overwritten. */
  revision: z.number().int(),
  called: z.string().nullable(),
  /** The serial is masked for others. */
  foundOn: z.object({ modelId: Id.nullable(), model: Named.nullable(), serial: z.string().nullable() }).nullable(),
  /** Null for others. */
  note: z.string().nullable(),
  photos: z.array(Photo),
  partTypeId: Id.nullable(),
  makerId: Id.nullable(),
  isMine: z.boolean(),
  can: z.object({ change: z.boolean(), remove: z.boolean(), addMark: z.boolean() }),
  workingOut: z.boolean(),
});
export type PartPage = z.infer<typeof PartPage>;

const ById = z.strictObject({ id: Id });
const Done = z.object({ done: z.literal(true) });

export const listMyParts = endpoint({
  method: 'GET',
  path: '/parts',
  summary: 'Your parts: all of them, or those on your bench, on no machine',
  query: listQuery(['-recorded', 'recorded', 'title'], { on: z.enum(['bench', 'machine']).optional(), partType: z.string().max(LIMITS.slug).optional() }),
  answer: listAnswer(PartItem),
});
export const recordPart = endpoint({
  method: 'POST',
  path: '/parts',
  status: 201,
  summary: 'Put a part on record, with its casting number as read where you have it',
  body: PartForm.extend({
    /** In the mark notation; makes a mark of that kind with your reading. */
    number: z.string().max(LIMITS.mark).nullable(),
  }),
  answer: PartPage,
});
export const readPart = endpoint({ method: 'GET', path: '/parts/:id', summary: 'A part, as far as you may see it', params: ById, answer: PartPage });
export const changePart = endpoint({
  method: 'PUT',
  path: '/parts/:id',
  summary: 'Say otherwise what a part of yours is',
  params: ById,
  body: PartForm.extend({ revision: z.number().int() }),
  answer: PartPage,
});
export const removePart = endpoint({
  method: 'DELETE',
  path: '/parts/:id',
  summary: 'Take a part of yours off the record, as long as nobody else has read a mark of it and it is on no machine',
  params: ById,
  answer: Done,
});
