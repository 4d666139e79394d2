import type { Knex } from 'knex';
import type { ModelClass } from 'objection';
import type { RegisterModel } from '#db/models/register-model.ts';
import type { Rests, Writing } from './kind-module.ts';

/** Makes the row of a fact say these columns: a new row, or the one there is. */
export async function writeRow<Row extends RegisterModel>(
  model: ModelClass<RegisterModel> & { readonly prototype: Row },
  { factId, isNew }: Pick<Writing, 'factId' | 'isNew'>,
  columns: Partial<Row>,
  trx: Knex.Transaction,
): Promise<void> {
  const written = model.fromJson(columns).$toDatabaseJson();
  if (isNew) await trx(model.tableName).insert({ id: factId, ...written });
  else await trx(model.tableName).where({ id: factId }).update(written);
}

/** Takes the row of a fact away. */
export async function removeRow(model: ModelClass<RegisterModel>, factId: string, trx: Knex.Transaction): Promise<void> {
  await trx(model.tableName).where({ id: factId }).delete();
}

/** For facts nothing is worked out from. */
export const NOTHING_RESTS: Rests = { makers: [], models: [] };
