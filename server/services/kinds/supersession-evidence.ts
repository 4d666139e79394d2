import type { Knex } from 'knex';
import type { EvidenceGroup, EvidenceItem, Findings } from '#contract/evidence.ts';
import { Casting } from '#db/models/casting.ts';
import { Supersession } from '#db/models/supersession.ts';
import { gathering, groupOf } from '#server/services/evidence/evidence-group.ts';
import { factSubjects } from '#server/services/evidence/name-facts.ts';
import { partsOnRecord, sayDateOf, subjectOfPart } from '#server/services/evidence/parts-on-record.ts';
import { sayOpenDays } from '#server/services/evidence/say-dates.ts';
import type { Proposal } from './kind-module.ts';

/** When the two castings were poured by the catalogue, what else is said to follow or precede them, and the parts of each on record with their dates. */
export async function supersessionEvidence({ factId, payload }: Proposal<'supersession'>, knex: Knex): Promise<Findings> {
  const { oldId, newId } = payload;
  const castings = await Casting.query(knex).findByIds([oldId, newId]);
  const subjectOf = await factSubjects([oldId, newId], knex);
  const years = [oldId, newId].map((id): EvidenceItem => {
    const made = castings.find((casting) => casting.id === id)?.made ?? null;
    return { subject: subjectOf(id), mark: null, text: made === null ? 'years not known' : `poured ${sayOpenDays(made)}` };
  });
  return {
    groups: [
      groupOf('years', 'When the two were poured', years),
      await othersBeside(factId, payload, knex),
      await partsOf(oldId, 'old-parts', 'Parts of the old casting on record', knex),
      await partsOf(newId, 'new-parts', 'Parts of the new casting on record', knex),
    ],
    figures: [],
  };
}

async function othersBeside(factId: string | null, { oldId, newId }: Proposal<'supersession'>['payload'], knex: Knex): Promise<EvidenceGroup> {
  const both = [oldId, newId];
  const supersessions = await Supersession.query(knex).whereIn('oldId', both).orWhereIn('newId', both).orderBy('id');
  const others = supersessions.filter(({ id }) => id !== factId);
  const subjectOf = await factSubjects(others.map(({ id }) => id), knex);
  return groupOf('others', 'What else follows or precedes either', others.map(({ id, interchange }) => ({ subject: subjectOf(id), mark: null, text: interchange.replaceAll('-', ' ') })));
}

async function partsOf(castingId: string, code: string, title: string, knex: Knex): Promise<EvidenceGroup> {
  const group = gathering(code, title);
  for await (const parts of partsOnRecord((query) => void query.where('parts.castingId', castingId), knex)) {
    for (const part of parts) group.add(part.isPublic, () => ({ subject: subjectOfPart(part), mark: part.dateReading ?? part.numberReading, text: sayDateOf(part) }));
  }
  return group.done();
}
