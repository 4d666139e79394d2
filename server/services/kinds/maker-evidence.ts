import type { Knex } from 'knex';
import { z } from 'zod';
import type { EvidenceGroup, Findings } from '#contract/evidence.ts';
import { countReferring } from '#server/services/evidence/count-referring.ts';
import { gathering, groupOf } from '#server/services/evidence/evidence-group.ts';
import { factSubjects } from '#server/services/evidence/name-facts.ts';
import { namesakes } from '#server/services/evidence/namesakes.ts';
import { dateOf, partsOnRecord, sayDateOf, subjectOfPart } from '#server/services/evidence/parts-on-record.ts';
import { dayOnRecord } from '#server/services/day-on-record.ts';
import type { Proposal } from './kind-module.ts';

/** Makers that read alike or share its mark, castings dated before it was founded or after it closed, and what refers to it. */
export async function makerEvidence({ factId, payload }: Proposal<'maker'>, knex: Knex): Promise<Findings> {
  return {
    groups: [
      await namesakes({ table: 'makers', name: payload.name, factId }, knex),
      await sameFoundryMark(factId, payload.foundryMark, knex),
      ...(factId === null ? [] : [await outsideItsYears(factId, payload, knex)]),
      ...(await countReferring(
        factId,
        [
          { code: 'models', title: 'Models', table: 'models', column: 'makerId' },
          { code: 'castings', title: 'Castings', table: 'castings', column: 'makerId' },
          { code: 'castings-poured', title: 'Castings it poured', table: 'castings', column: 'pouredById' },
          { code: 'ciphers', title: 'Ciphers', table: 'ciphers', column: 'makerId' },
          { code: 'parts', title: 'Parts on record', table: 'part_origins', column: 'makerId' },
        ],
        knex,
      )),
    ],
    figures: [],
  };
}

async function sameFoundryMark(factId: string | null, foundryMark: string | null, knex: Knex): Promise<EvidenceGroup> {
  const query = knex('makers').where({ foundryMark }).whereNotNull('foundryMark').orderBy('name').select('id');
  if (factId !== null) void query.whereNot({ id: factId });
  const rows = z.array(z.object({ id: z.string() })).parse(await query);
  const subjectOf = await factSubjects(rows.map(({ id }) => id), knex);
  return groupOf('same-mark', 'Makers with the same foundry mark', rows.map(({ id }) => ({ subject: subjectOf(id), mark: null, text: foundryMark ?? '' })));
}

async function outsideItsYears(factId: string, { founded, closed }: Proposal<'maker'>['payload'], knex: Knex): Promise<EvidenceGroup> {
  const first = founded === null ? Number.MIN_SAFE_INTEGER : dayOnRecord(`${founded}-01-01`);
  const last = closed === null ? Number.MAX_SAFE_INTEGER : dayOnRecord(`${closed}-12-31`);
  const group = gathering('outside-years', 'Castings dated before it was founded or after it closed');
  let dated = 0;
  for await (const parts of partsOnRecord((query) => void query.where('part_origins.makerId', factId), knex)) {
    for (const part of parts) {
      const date = dateOf(part);
      if (date === null) continue;
      dated += 1;
      if (date.candidates.length === date.total && date.candidates.every(({ from, to }) => to < first || from > last)) {
        group.add(part.isPublic, () => ({ subject: subjectOfPart(part), mark: part.dateReading, text: sayDateOf(part) }));
      }
    }
  }
  return group.done(dated);
}
