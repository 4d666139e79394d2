import type { Knex } from 'knex';
import { handle } from '#server/queue/job-runner.ts';
import type { JobHandling } from '#server/queue/job-runner.ts';
import { giveUpRework, runRework } from '#server/queue/rework-jobs.ts';
import type { CipherCache } from '#server/services/cipher-cache.ts';
import { giveUpRework as noteGivenUp } from '#server/services/reworks/give-up-rework.ts';
import { runRework as work } from '#server/services/reworks/run-rework.ts';

/** Reworks one after another: they would wait for each other anyway. */
export function reworkHandlings({ knex, ciphers }: { readonly knex: Knex; readonly ciphers: CipherCache }): readonly JobHandling[] {
  return [
    handle(runRework, ({ reworkId }, { signal }) => work(reworkId, { knex, ciphers, signal })),
    handle(giveUpRework, ({ reworkId }) => noteGivenUp(reworkId, knex)),
  ];
}
