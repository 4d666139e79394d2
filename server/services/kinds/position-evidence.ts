import type { Knex } from 'knex';
import type { EvidenceGroup, Findings } from '#contract/evidence.ts';
import type { DaySpan } from '#domain/dates/day.ts';
import { formatSpan } from '#domain/dates/format-day.ts';
import { FIT_VERDICTS, judgeFit } from '#domain/fit/fit.ts';
import type { FitVerdict } from '#domain/fit/fit.ts';
import { Position } from '#db/models/position.ts';
import { countReferring } from '#server/services/evidence/count-referring.ts';
import { gathering, groupOf } from '#server/services/evidence/evidence-group.ts';
import { factSubjects } from '#server/services/evidence/name-facts.ts';
import { dateOf, partsOnRecord, sayDateOf, subjectOfPart } from '#server/services/evidence/parts-on-record.ts';
import type { PartOnRecord } from '#server/services/evidence/parts-on-record.ts';
import { placingMachines } from '#server/services/marks/place-machines.ts';
import type { Proposal } from './kind-module.ts';

const TITLES: Readonly<Record<FitVerdict, string>> = {
  'in-step': 'Dated parts there now that are in step with the lead',
  possible: 'Dated parts there now that are possible by the lead',
  'older-stock': 'Dated parts there now that are older stock by the lead',
  'cast-after-build': 'Dated parts there now that were cast after build by the lead',
  unsettled: 'Dated parts there now that the lead leaves unsettled',
};

/** Positions of the same part type on the model, what refers to it, and how its lead judges the dated parts that are there now. */
export async function positionEvidence({ factId, payload }: Proposal<'position'>, knex: Knex): Promise<Findings> {
  const { modelId, partTypeId } = payload;
  const alike = await Position.query(knex).where({ modelId, partTypeId }).orderBy('ordinal');
  const others = alike.filter(({ id }) => id !== factId);
  const subjectOf = await factSubjects(others.map(({ id }) => id), knex);
  return {
    groups: [
      groupOf('same-part-type', 'Other positions of the part type on the model', others.map(({ id, ordinal }) => ({ subject: subjectOf(id), mark: null, text: `row ${ordinal}` }))),
      ...(await countReferring(
        factId,
        [
          { code: 'fitments', title: 'Fitments', table: 'fitments', column: 'positionId' },
          { code: 'parts', title: 'Parts on record, there now or before', table: 'part_fittings', column: 'positionId' },
        ],
        knex,
      )),
      ...(factId === null ? [] : await leadsSeen(factId, payload, knex)),
    ],
    figures: [],
  };
}

async function leadsSeen(factId: string, { modelId, lead }: Proposal<'position'>['payload'], knex: Knex): Promise<EvidenceGroup[]> {
  const place = await placingMachines([modelId], knex);
  const groups = FIT_VERDICTS.map((verdict) => ({ verdict, found: gathering(verdict, TITLES[verdict]) }));
  let judged = 0;
  for await (const parts of partsOnRecord((query) => void query.where('part_fittings.positionId', factId), knex)) {
    for (const part of parts) {
      const build = part.serialAsStamped === null ? null : place({ modelId, serialAsStamped: part.serialAsStamped }).window;
      const verdict = build === null ? null : verdictOn(part, build, lead);
      if (build === null || verdict === null) continue;
      judged += 1;
      groups
        .find((group) => group.verdict === verdict)
        ?.found.add(part.isPublic && part.isMachinePublic === true, () => ({
          subject: subjectOfPart(part),
          mark: part.dateReading,
          text: `${sayDateOf(part)}; machine built ${formatSpan(build)}`,
        }));
    }
  }
  return groups.map(({ found }) => found.done(judged));
}

function verdictOn(part: PartOnRecord, build: DaySpan, lead: Proposal<'position'>['payload']['lead']): FitVerdict | null {
  const date = dateOf(part);
  if (date === null) return null;
  const fit = judgeFit({ candidates: date.candidates, build, lead: lead === null ? undefined : { least: lead.from, most: lead.to } });
  return fit.ok ? fit.value.verdict : null;
}
