import type { Knex } from 'knex';
import { z } from 'zod';
import type { EvidenceGroup, Findings } from '#contract/evidence.ts';
import { MachineModel } from '#db/models/machine-model.ts';
import { Series } from '#db/models/series.ts';
import { countReferring } from '#server/services/evidence/count-referring.ts';
import { countOf, groupOf } from '#server/services/evidence/evidence-group.ts';
import { factSubjects } from '#server/services/evidence/name-facts.ts';
import type { Proposal } from './kind-module.ts';

/** Series of the maker that the prefix can be mistaken for, machines of the model that carry it, and what refers to it. */
export async function seriesEvidence({ factId, payload }: Proposal<'series'>, knex: Knex): Promise<Findings> {
  return {
    groups: [
      await readingAlike(factId, payload, knex),
      await machinesOfPrefix(payload, knex),
      ...(await countReferring(
        factId,
        [
          { code: 'ranges', title: 'Serial ranges', table: 'serial_ranges', column: 'seriesId' },
          { code: 'anchors', title: 'Dated machines', table: 'anchors', column: 'seriesId' },
          { code: 'fitments', title: 'Fitments', table: 'fitments', column: 'seriesId' },
        ],
        knex,
      )),
    ],
    figures: [],
  };
}

async function readingAlike(factId: string | null, { modelId, prefix }: Proposal<'series'>['payload'], knex: Knex): Promise<EvidenceGroup> {
  const model = await MachineModel.query(knex).findById(modelId).throwIfNotFound();
  const series = await Series.query(knex).where({ makerId: model.makerId }).orderBy(['prefix', 'id']);
  const alike = series.filter((one) => one.id !== factId && folded(one.prefix) === folded(prefix));
  const subjectOf = await factSubjects(alike.map(({ id }) => id), knex);
  return groupOf(
    'reads-alike',
    'Series of the maker with a prefix that reads alike',
    alike.map((one) => ({ subject: subjectOf(one.id), mark: null, text: one.prefix === '' ? 'no prefix' : `prefix ${one.prefix}` })),
  );
}

/** The pairs that a serial's reader takes for each other, O and 0, I and 1 (`#domain/serials/serial.ts`). */
function folded(prefix: string): string {
  return prefix.replaceAll('O', '0').replaceAll('I', '1');
}

async function machinesOfPrefix({ modelId, prefix }: Proposal<'series'>['payload'], knex: Knex): Promise<EvidenceGroup> {
  const rows: unknown = await knex('machines').where({ modelId, prefix }).count({ count: '*' });
  const [{ count }] = z.tuple([z.object({ count: z.string() })]).parse(rows);
  return countOf('machines', 'Machines of the model on record with the prefix', Number(count));
}
