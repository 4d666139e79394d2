import type { Knex } from 'knex';
import { Member } from '#db/models/member.ts';

/**
 * Whether the member is the only registrar who can act, so must stay one. Nobody else counts or unmakes registrars until the
 * transaction ends. The database refuses the change as well, as constraint `members_last_registrar`.
 */
export async function isLastRegistrar(memberId: string, trx: Knex.Transaction): Promise<boolean> {
  await trx.raw('select lock_registrars()');
  const registrars = await Member.query(trx).where({ role: 'registrar' }).whereNull('suspendedAt').select('id');
  return registrars.length === 1 && registrars[0]?.id === memberId;
}
