import type { Knex } from 'knex';
import { asLabel } from './as-label.ts';
import { notify } from '#server/services/notices/notify.ts';
import type { VersionOnRecord } from './fact-versions.ts';

type PassedOver = {
  /** What was in force; `null`: nothing. */
  readonly before: VersionOnRecord | null;
  /** What the fact is called. */
  readonly title: string;
  /** What became of it, in words. */
  readonly told: string;
  /** Members who know already. */
  readonly without: readonly string[];
  readonly href: string;
};

/** Tells whoever gave the version that is no longer in force. */
export async function tellPassedOver({ before, title, told, without, href }: PassedOver, trx: Knex.Transaction): Promise<void> {
  if (before === null || without.includes(before.enteredById)) return;
  await notify({ memberId: before.enteredById, kind: 'contribution', title: asLabel(title), body: `${told}.`, href }, trx);
}
