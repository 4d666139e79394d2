import type { Knex } from 'knex';
import { v7 as uuidV7 } from 'uuid';
import type { FactKind } from '#domain/vocabulary.ts';
import { Rework } from '#db/models/rework.ts';
import { enqueue } from '#server/queue/enqueue.ts';
import { runRework } from '#server/queue/rework-jobs.ts';
import type { Rests } from '#server/services/kinds/kind-module.ts';

export type NewRework = {
  readonly factId: string;
  readonly kind: FactKind;
  /** The version that came into force; `null`: the fact was retired. */
  readonly version: number | null;
  /** What rested on the fact as it was, and what rests on it as it is. */
  readonly rests: Rests;
};

/** Has everything that rests on a fact worked out again, in the transaction of the act that changed it. Nothing is done where nothing rests on it. */
export async function startRework({ factId, kind, version, rests }: NewRework, trx: Knex.Transaction): Promise<void> {
  const makers = [...new Set(rests.makers)].sort();
  const models = [...new Set(rests.models)].sort();
  if (makers.length === 0 && models.length === 0) return;
  const id = uuidV7();
  await Rework.query(trx).insert({ id, factId, kind, version, makers, models });
  await enqueue(runRework, { reworkId: id }, trx);
}
