import type { Knex } from 'knex';
import type { Mark } from '#db/models/mark.ts';
import { Reading } from '#db/models/reading.ts';
import { holderOf } from '#server/policies/marks.ts';
import { notify } from '#server/services/notices/notify.ts';
import { partTitle } from '#server/services/parts/part-title.ts';

/** Readings by one member of one mark that come so soon after another are one thing to tell. */
const WITHIN = '1 hour';

/** Tells whoever holds a mark that another member read it. No name: the notice may outlast the account. */
export async function tellHolder(reading: Reading, mark: Mark, trx: Knex.Transaction): Promise<void> {
  const memberId = holderOf(mark);
  if (memberId === null || memberId === reading.readerId) return;
  const { markId, readerId } = reading;
  const lately = Reading.query(trx).where({ markId, readerId }).whereNot({ id: reading.id }).whereRaw('made_at > now() - ?::interval', [WITHIN]);
  if ((await lately.resultSize()) > 0) return;
  const onWhat = mark.part ? partTitle(mark.part) : 'your machine';
  await notify(
    {
      memberId,
      kind: 'reading',
      title: 'Another member read a mark of yours',
      body: `It stands on: ${onWhat}. The mark’s page shows what they read, and what is taken to stand there now.`,
      href: `/marks/${markId}`,
    },
    trx,
  );
}
