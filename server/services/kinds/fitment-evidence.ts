import type { Knex } from 'knex';
import type { EvidenceGroup, EvidenceItem, Findings } from '#contract/evidence.ts';
import { Fitment } from '#db/models/fitment.ts';
import { Position } from '#db/models/position.ts';
import { gathering, groupOf } from '#server/services/evidence/evidence-group.ts';
import { factSubjects } from '#server/services/evidence/name-facts.ts';
import { partsOnRecord, sayDateOf, subjectOfPart } from '#server/services/evidence/parts-on-record.ts';
import type { PartOnRecord } from '#server/services/evidence/parts-on-record.ts';
import { sayNumbers } from '#server/services/evidence/say-dates.ts';
import { placingMachines } from '#server/services/marks/place-machines.ts';
import type { MachinePlace } from '#server/services/marks/place-machines.ts';
import type { Proposal } from './kind-module.ts';

/** What the catalogue says of the casting and the position elsewhere, and the parts seen there on such machines. */
export async function fitmentEvidence({ factId, payload }: Proposal<'fitment'>, knex: Knex): Promise<Findings> {
  return { groups: [...(await besideIt(factId, payload, knex)), ...(await partsSeen(payload, knex))], figures: [] };
}

async function besideIt(factId: string | null, { positionId, castingId }: Proposal<'fitment'>['payload'], knex: Knex): Promise<EvidenceGroup[]> {
  const fitments = await Fitment.query(knex)
    .where('fitments.positionId', positionId)
    .withGraphFetched('series')
    .orderBy(['castingId', 'numbers', 'id']);
  const others = fitments.filter(({ id }) => id !== factId);
  const subjectOf = await factSubjects(others.map(({ id }) => id), knex);
  const items = (some: readonly Fitment[]): EvidenceItem[] =>
    some.map(({ id, verdict, series, numbers }) => ({
      subject: subjectOf(id),
      mark: null,
      text: `${verdict.replaceAll('-', ' ')}: ${series ? `${series.prefix} ${sayNumbers(numbers)}`.trim() : 'every series'}`,
    }));
  return [
    groupOf('same-casting', 'The casting at this position on other numbers', items(others.filter((fitment) => fitment.castingId === castingId))),
    groupOf('other-castings', 'Other castings at this position', items(others.filter((fitment) => fitment.castingId !== castingId))),
  ];
}

async function partsSeen(payload: Proposal<'fitment'>['payload'], knex: Knex): Promise<EvidenceGroup[]> {
  const { positionId, castingId } = payload;
  const { modelId } = await Position.query(knex).findById(positionId).throwIfNotFound();
  const place = await placingMachines([modelId], knex);
  const seen = gathering('seen', 'Parts of the casting there, on such machines');
  const seenOther = gathering('seen-other', 'Parts of other castings there, on such machines');
  const seenUnknown = gathering('seen-unknown', 'Parts of no known casting there, on such machines');
  const elsewhere = gathering('seen-elsewhere', 'Parts of the casting there, on machines with other numbers');
  let onSuchMachines = 0;
  for await (const parts of partsOnRecord((query) => void query.where('part_fittings.positionId', positionId), knex)) {
    for (const part of parts) {
      const isSuch = part.serialAsStamped !== null && isMeant(place({ modelId, serialAsStamped: part.serialAsStamped }), payload);
      if (isSuch) onSuchMachines += 1;
      const group = !isSuch ? (part.castingId === castingId ? elsewhere : null) : part.castingId === null ? seenUnknown : part.castingId === castingId ? seen : seenOther;
      group?.add(part.isPublic, () => lineOf(part));
    }
  }
  return [seen.done(onSuchMachines), seenOther.done(onSuchMachines), seenUnknown.done(onSuchMachines), elsewhere.done()];
}

function lineOf(part: PartOnRecord): EvidenceItem {
  return { subject: subjectOfPart(part), mark: part.numberReading ?? part.dateReading, text: sayDateOf(part) };
}

/** Whether a fitment speaks of a machine with that serial. */
function isMeant({ seriesId, number }: MachinePlace, fitment: Pick<Proposal<'fitment'>['payload'], 'seriesId' | 'numbers'>): boolean {
  const { from, to } = fitment.numbers;
  if (fitment.seriesId === null) return true;
  return seriesId === fitment.seriesId && number !== null && (from === null || BigInt(from) <= number) && (to === null || number <= BigInt(to));
}
