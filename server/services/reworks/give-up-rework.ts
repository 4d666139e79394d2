import type { Knex } from 'knex';
import { Rework } from '#db/models/rework.ts';

/** Notes that a rework failed as often as it may. It is taken up again when a server starts. */
export async function giveUpRework(reworkId: string, knex: Knex): Promise<void> {
  await Rework.query(knex).findById(reworkId).whereIn('state', ['waiting', 'running']).patch({ state: 'failed' });
}
