import type { Knex } from 'knex';
import { settleReadings } from '#domain/marks/settle-readings.ts';
import type { MadeReading, SettledMark } from '#domain/marks/settle-readings.ts';
import { MarkPhoto } from '#db/models/mark-photo.ts';
import { Mark } from '#db/models/mark.ts';
import { Part } from '#db/models/part.ts';
import { Reading } from '#db/models/reading.ts';
import { readingOnRecord } from './mark-dating.ts';

/**
 * Works out the reading in force of a mark, its evidence and whether another reading is wanted, from the readings and photos it has now. To be
 * called by whoever changes any of these, in the same transaction: two that do so at once wait for each other here, and the second sees both.
 * A mark that is gone is left so.
 */
export async function settleMark(markId: string, trx: Knex.Transaction): Promise<void> {
  const mark = await Mark.query(trx).findById(markId).forNoKeyUpdate();
  if (mark === undefined) return;
  const readings = await Reading.query(trx).where({ markId });
  const hasPhoto = (await MarkPhoto.query(trx).where({ markId }).resultSize()) > 0;
  const part = mark.partId === null ? undefined : await Part.query(trx).findById(mark.partId).select('visibility');
  const settled = settleReadings(readings.map(madeReading), { hasPhoto, isPublic: part?.visibility === 'public' });
  await mark.$query(trx).patch({
    reading: settled.text,
    readAt: settled.readAt,
    evidence: settled.evidence,
    wantsReadingSince: sinceWhen(settled, mark, trx),
  });
}

/** A reading on record as the domain counts it. */
export function madeReading({ id, readerId, text, madeAt, independent, asHolder, takenBackAt }: Reading): MadeReading {
  return { id, reader: readerId, reading: readingOnRecord(text), madeAt, independent, asHolder, isTakenBack: takenBackAt !== null };
}

function sinceWhen({ wantsReading }: SettledMark, { wantsReadingSince }: Mark, trx: Knex.Transaction): string | null | Knex.Raw {
  return wantsReading ? (wantsReadingSince ?? trx.raw('now()')) : null;
}
