import type { Knex } from 'knex';
import type { EvidenceItem, Findings } from '#contract/evidence.ts';
import { compileCipher } from '#domain/ciphers/compile.ts';
import { overlap } from '#domain/dates/day-span.ts';
import type { DaySpan } from '#domain/dates/day.ts';
import { formatSpan } from '#domain/dates/format-day.ts';
import { CipherVersion } from '#db/models/cipher-version.ts';
import { dateMarksOnRecord, daysMade, subjectOfMark } from '#server/services/evidence/date-marks-on-record.ts';
import type { DateMarkOnRecord } from '#server/services/evidence/date-marks-on-record.ts';
import { chanceFigures } from '#server/services/evidence/chance-figures.ts';
import { gathering } from '#server/services/evidence/evidence-group.ts';
import { sayOpenDays } from '#server/services/evidence/say-dates.ts';
import { sameDating, sayDating } from '#server/services/evidence/say-dating.ts';
import { inTurns } from '#server/services/in-turns.ts';
import { whereCarriesCipher } from '#server/services/marks/carries-cipher.ts';
import { markDating } from '#server/services/marks/mark-dating.ts';
import type { MarkDating } from '#server/services/marks/mark-dating.ts';
import { placingMachines } from '#server/services/marks/place-machines.ts';
import { today } from '#server/services/today.ts';
import type { Proposal } from './kind-module.ts';

/**
 * How a cipher reads the date marks on record of its maker and foundry, against what else is known of the parts they stand on, against
 * the version in force, and against random keys.
 */
export async function cipherEvidence({ factId, payload }: Proposal<'cipher'>, knex: Knex): Promise<Findings> {
  const compiled = compileCipher(payload.definition);
  if (!compiled.ok) throw new RangeError('The definition was checked before');
  const asOf = await today(knex);
  const date = markDating(compiled.value, asOf);
  const before = await datingInForce(factId, asOf, knex);
  const place = placingOnRecord(knex);
  const carries = (query: Knex.QueryBuilder): void => {
    whereCarriesCipher(query, payload);
  };

  const dated = gathering('dates', 'Marks it dates');
  const several = gathering('several', 'Marks it dates several ways');
  const none = gathering('cannot-date', 'Marks it can’t date');
  const outside = gathering('outside-years', 'Dates outside their casting’s years');
  const afterBuild = gathering('after-build', 'Dates after the machine was built');
  const otherwise = gathering('changes', 'Read otherwise by the version in force');
  let marks = 0;
  let onDatedCastings = 0;
  let onBuiltMachines = 0;

  for await (const lot of dateMarksOnRecord(carries, knex)) {
    const window = await place(lot);
    await inTurns(lot, (mark) => {
      marks += 1;
      const now = date(mark.reading);
      const line = (text: string): EvidenceItem => ({ subject: subjectOfMark(mark), mark: mark.reading, text });
      const found = now.status === 'dated' ? dated : now.status === 'several' ? several : none;
      found.add(mark.isPublic, () => line(sayDating(now)));
      const old = before?.(mark.reading);
      if (old !== undefined && !sameDating(old, now)) {
        otherwise.add(mark.isPublic, () => line(`${sayDating(now)}; in force: ${sayDating(old)}`));
      }
      if (now.status === 'none') return;
      const { made } = mark;
      if (made !== null) {
        const years = daysMade(made);
        onDatedCastings += 1;
        if (everyDate(now, (candidate) => overlap(candidate, years) === null)) {
          outside.add(mark.isPublic, () => line(`${sayDating(now)}; poured ${sayOpenDays(made)}`));
        }
      }
      const built = window(mark);
      if (built === null) return;
      onBuiltMachines += 1;
      if (everyDate(now, ({ from }) => from > built.to)) {
        afterBuild.add(mark.isPublic && mark.isMachinePublic === true, () => line(`${sayDating(now)}; machine built ${formatSpan(built)}`));
      }
    });
  }
  return {
    groups: [
      dated.done(marks),
      several.done(marks),
      none.done(marks),
      outside.done(onDatedCastings),
      afterBuild.done(onBuiltMachines),
      ...(before === null ? [] : [otherwise.done(marks)]),
    ],
    figures: await chanceFigures(payload.definition, carries, asOf, knex),
  };
}

async function datingInForce(factId: string | null, asOf: number, knex: Knex): Promise<((text: string) => MarkDating) | null> {
  if (factId === null) return null;
  const version = await CipherVersion.query(knex).modify('inForce').findOne({ cipherId: factId });
  const compiled = version === undefined ? undefined : compileCipher(version.definition);
  return compiled?.ok === true ? markDating(compiled.value, asOf) : null;
}

type Windows = (lot: readonly DateMarkOnRecord[]) => Promise<(mark: DateMarkOnRecord) => DaySpan | null>;

/** When the machines that marks were found on were built; what is known of a model’s serials is loaded once. */
function placingOnRecord(knex: Knex): Windows {
  const known = new Map<string, Awaited<ReturnType<typeof placingMachines>>>();
  return async (lot) => {
    const models = [...new Set(lot.flatMap(({ modelId }) => (modelId === null || known.has(modelId) ? [] : [modelId])))];
    if (models.length > 0) {
      const place = await placingMachines(models, knex);
      for (const model of models) known.set(model, place);
    }
    return ({ modelId, serialAsStamped }) =>
      modelId === null || serialAsStamped === null ? null : (known.get(modelId)?.({ modelId, serialAsStamped }).window ?? null);
  };
}

/** Whether it holds for each date a mark can have; not to be said of one that has more than are listed. */
function everyDate({ candidates, total }: MarkDating, holds: (candidate: DaySpan) => boolean): boolean {
  return candidates.length === total && candidates.every(holds);
}
