import type { Knex } from 'knex';
import { z } from 'zod';
import type { EvidenceGroup, Findings } from '#contract/evidence.ts';
import { overlap } from '#domain/dates/day-span.ts';
import { Casting } from '#db/models/casting.ts';
import { daysMade } from '#server/services/evidence/date-marks-on-record.ts';
import { gathering, groupOf } from '#server/services/evidence/evidence-group.ts';
import { factSubjects } from '#server/services/evidence/name-facts.ts';
import { dateOf, partsOnRecord, sayDateOf, subjectOfPart } from '#server/services/evidence/parts-on-record.ts';
import type { PartOnRecord } from '#server/services/evidence/parts-on-record.ts';
import { sayOpenDays } from '#server/services/evidence/say-dates.ts';
import { inTurns } from '#server/services/in-turns.ts';
import { canBe, isPlain } from '#server/services/marks/can-be.ts';
import { readingOnRecord, remembering } from '#server/services/marks/mark-dating.ts';
import type { Proposal } from './kind-module.ts';

/** The same number elsewhere in the catalogue, the marks on record that carry it, and their dates against the years it would have. */
export async function castingEvidence({ factId, payload }: Proposal<'casting'>, knex: Knex): Promise<Findings> {
  const numberKey = payload.number.replaceAll(/[^A-Z0-9]/g, '');
  return {
    groups: [...(await sameNumber(factId, payload.makerId, numberKey, knex)), ...(await marksThatCarryIt(payload, numberKey, knex))],
    figures: [],
  };
}

async function sameNumber(factId: string | null, makerId: string, numberKey: string, knex: Knex): Promise<EvidenceGroup[]> {
  const castings = (await Casting.query(knex).where({ numberKey }).orderBy('slug')).filter(({ id }) => id !== factId);
  const subjectOf = await factSubjects(castings.map(({ id }) => id), knex);
  const items = (some: readonly Casting[]) => some.map(({ id, made }) => ({ subject: subjectOf(id), mark: null, text: made === null ? 'years not known' : `poured ${sayOpenDays(made)}` }));
  return [
    groupOf('same-number', 'The same number at the same maker', items(castings.filter((casting) => casting.makerId === makerId))),
    groupOf('same-number-elsewhere', 'The same number at other makers', items(castings.filter((casting) => casting.makerId !== makerId))),
  ];
}

async function marksThatCarryIt({ makerId, partTypeId, made }: Proposal<'casting'>['payload'], numberKey: string, knex: Knex): Promise<EvidenceGroup[]> {
  const carrying = gathering('marks', 'Marks on record that carry the number');
  const perhaps = gathering('marks-perhaps', 'Marks on record that may be the number, as not every glyph was read');
  const within = gathering('within-years', 'Parts with the number dated within its years');
  const outside = gathering('outside-years', 'Parts with the number dated outside its years');
  const otherType = gathering('other-part-type', 'Parts with the number that are of another part type');
  const carriesNumber = remembering((text: string) => {
    const reading = readingOnRecord(text);
    return !canBe(reading, numberKey) ? 'not' : isPlain(reading) ? 'surely' : 'perhaps';
  });
  const types = await typesOfParts(knex);
  const days = made === null ? null : daysMade(made);
  let dated = 0;

  const ofMaker = (query: Knex.QueryBuilder): void => {
    void query.where((maker) => void maker.where('part_origins.makerId', makerId).orWhereNull('part_origins.makerId')).whereNotNull('number_mark.id');
  };
  for await (const parts of partsOnRecord(ofMaker, knex)) {
    await inTurns(parts, (part) => {
      const carries = part.numberReading === null ? 'not' : carriesNumber(part.numberReading);
      if (carries === 'not') return;
      (carries === 'surely' ? carrying : perhaps).add(part.isPublic, () => ({ subject: subjectOfPart(part), mark: part.numberReading, text: sayDateOf(part) }));
      if (carries === 'perhaps') return;
      const type = part.partType;
      if (type !== null && type !== types.get(partTypeId)) {
        otherType.add(part.isPublic, () => ({ subject: subjectOfPart(part), mark: part.numberReading, text: type }));
      }
      const isWithin = days === null ? null : datesWithin(part, days);
      if (isWithin === null) return;
      dated += 1;
      (isWithin ? within : outside).add(part.isPublic, () => ({ subject: subjectOfPart(part), mark: part.dateReading, text: sayDateOf(part) }));
    });
  }
  return [carrying.done(), perhaps.done(), within.done(dated), outside.done(dated), otherType.done()];
}

/** Whether one of the part’s dates lies in the days; `null` where that can’t be said. */
function datesWithin(part: PartOnRecord, days: ReturnType<typeof daysMade>): boolean | null {
  const date = dateOf(part);
  if (date === null) return null;
  if (date.candidates.some((candidate) => overlap(candidate, days) !== null)) return true;
  return date.candidates.length === date.total ? false : null;
}

async function typesOfParts(knex: Knex): Promise<ReadonlyMap<string, string>> {
  const rows = z.array(z.object({ id: z.string(), name: z.string() })).parse(await knex('part_types').select('id', 'name'));
  return new Map(rows.map(({ id, name }) => [id, name]));
}
