import type { Knex } from 'knex';
import { v7 as uuidV7 } from 'uuid';
import type { recordMark as recordEndpoint } from '#contract/marks.ts';
import type { HandlerInput } from '#contract/endpoint.ts';
import { PART_LIMITS } from '#contract/parts.ts';
import { MarkPhoto } from '#db/models/mark-photo.ts';
import { Mark } from '#db/models/mark.ts';
import type { MarkKind, MarkTechnique } from '#domain/vocabulary.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import type { CipherCache } from '#server/services/cipher-cache.ts';
import { actOnRecord } from '#server/services/parts/act-on-record.ts';
import type { RecordAct } from '#server/services/parts/act-on-record.ts';
import { holdOwnPart } from '#server/services/parts/hold-part.ts';
import { requireOwnPhotos } from '#server/services/parts/own-photos.ts';
import type { RequestContext } from '#server/services/people/request-context.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { workOutOnePart } from '#server/services/reworks/work-out-one-part.ts';
import { wrongValue } from '#server/services/wrong-value.ts';
import { firstReading } from './first-reading.ts';
import { placedColumns } from './placed-columns.ts';
import { readMark } from './read-mark.ts';
import type { MarkOnRecord } from './read-mark.ts';
import { settleMark } from './settle-mark.ts';
import { typedReading } from './typed-reading.ts';

type NewMark = HandlerInput<typeof recordEndpoint>['body'];

/**
 * Puts a mark of one's own part on record, with its photos and one's reading where there are any.
 *
 * @throws ProblemError `not-signed-in`, `not-found`, `not-allowed`; `invalid` at `photos` or `reading`; `conflict` for a part that has forty marks.
 */
export async function recordMark(partId: string, mark: NewMark, context: RequestContext, ciphers: CipherCache, knex: Knex): Promise<MarkOnRecord> {
  return actOnRecord(context, knex, async (act) => {
    const { member, trx } = act;
    await holdOwnPart(member, partId, trx);
    const marks = await Mark.query(trx).where({ partId }).resultSize();
    if (marks >= PART_LIMITS.marks) throw new ProblemError('conflict', `The part has ${PART_LIMITS.marks} marks on record, and takes no more.`);
    const photoIds = mark.photos.map(({ photoId }) => photoId);
    if (new Set(photoIds).size < photoIds.length) throw wrongValue(['photos'], 'Names a photo twice');
    await requireOwnPhotos(member.id, photoIds, (place) => ['photos', place, 'photoId'], trx);
    const id = await addMark({ partId, kind: mark.kind, technique: mark.technique, reading: mark.reading && typedReading(mark.reading, 'reading'), photos: mark.photos }, act);
    await workOutOnePart(partId, ciphers, trx);
    return readMark(member, id, trx);
  });
}

type MarkToAdd = {
  readonly partId: string;
  readonly kind: MarkKind;
  readonly technique: MarkTechnique;
  /** As the record keeps it. */
  readonly reading: string | null;
  readonly photos: NewMark['photos'];
};

/** Writes a mark with what belongs to it; what follows for the part is the caller's to work out. */
export async function addMark({ partId, kind, technique, reading, photos }: MarkToAdd, { member, trx, requestId }: RecordAct): Promise<string> {
  const id = uuidV7();
  await Mark.query(trx).insert({ id, partId, machineId: null, kind, technique });
  const placed = photos.map(({ photoId, ...placing }, ordinal) => ({ markId: id, photoId, ordinal, ...placedColumns(placing) }));
  if (placed.length > 0) await MarkPhoto.query(trx).insert(placed);
  await writeAudit({ act: 'mark.recorded', actorId: member.id, subject: { kind: 'mark', id }, detail: { partId }, requestId }, trx);
  if (reading !== null) await firstReading(id, reading, { member, trx, requestId });
  await settleMark(id, trx);
  return id;
}
