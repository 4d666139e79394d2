import { v7 as uuidV7 } from 'uuid';
import { Reading } from '#db/models/reading.ts';
import { writeAudit } from '#server/services/audit/write-audit.ts';
import type { RecordAct } from '#server/services/parts/act-on-record.ts';

/** What the holder reads at a mark that they put on record this moment, so before anybody else. */
export async function firstReading(markId: string, text: string, { member, trx, requestId }: RecordAct): Promise<void> {
  const id = uuidV7();
  await Reading.query(trx).insert({ id, markId, readerId: member.id, text, photoId: null, independent: true, asHolder: true });
  await writeAudit({ act: 'reading.made', actorId: member.id, subject: { kind: 'reading', id }, detail: { markId }, requestId }, trx);
}
