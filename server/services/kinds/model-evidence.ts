import type { Knex } from 'knex';
import type { EvidenceGroup, Findings } from '#contract/evidence.ts';
import { SerialRange } from '#db/models/serial-range.ts';
import { countReferring } from '#server/services/evidence/count-referring.ts';
import { groupOf } from '#server/services/evidence/evidence-group.ts';
import { factSubjects } from '#server/services/evidence/name-facts.ts';
import { namesakes } from '#server/services/evidence/namesakes.ts';
import { sayOpenDays } from '#server/services/evidence/say-dates.ts';
import type { Proposal } from './kind-module.ts';

/** Models that read alike, serial ranges built outside its years, and what refers to it. */
export async function modelEvidence({ factId, payload }: Proposal<'model'>, knex: Knex): Promise<Findings> {
  return {
    groups: [
      await namesakes({ table: 'models', name: payload.name, factId, among: { makerId: payload.makerId } }, knex),
      ...(factId === null ? [] : [await rangesOutside(factId, payload.made, knex)]),
      ...(await countReferring(
        factId,
        [
          { code: 'series', title: 'Series', table: 'series', column: 'modelId' },
          { code: 'positions', title: 'Positions', table: 'positions', column: 'modelId' },
          { code: 'machines', title: 'Machines on record', table: 'machines', column: 'modelId' },
        ],
        knex,
      )),
    ],
    figures: [],
  };
}

async function rangesOutside(modelId: string, made: Proposal<'model'>['payload']['made'], knex: Knex): Promise<EvidenceGroup> {
  const ranges = await SerialRange.query(knex)
    .whereIn('seriesId', knex('series').select('id').where({ modelId }))
    .where({ meaning: 'built' })
    .orderBy(['numbers', 'id']);
  const outside = ranges.filter(
    ({ built }) => (made?.from !== undefined && made.from !== null && built.from < made.from) || (made?.to !== undefined && made.to !== null && built.to > made.to),
  );
  const subjectOf = await factSubjects(outside.map(({ id }) => id), knex);
  return groupOf(
    'outside-years',
    'Serial ranges with days outside its years',
    outside.map(({ id, built }) => ({ subject: subjectOf(id), mark: null, text: sayOpenDays(built) })),
    ranges.length,
  );
}
