import type { Knex } from 'knex';
import { FactName } from '#db/models/fact-name.ts';
import type { Machine } from '#db/models/machine.ts';
import type { Maker } from '#db/models/maker.ts';
import { Mark } from '#db/models/mark.ts';
import { PartFitting } from '#db/models/part-fitting.ts';
import { ProblemError } from '#server/services/problem-error.ts';
import { isBeingWorkedOut } from '#server/services/reworks/is-being-worked-out.ts';

/** Marks that would give away a serial its owner doesn’t show. */
const TELLS_SERIAL: ReadonlySet<Mark['kind']> = new Set(['serial', 'plate']);

export type MarkOnRecord = {
  readonly mark: Mark;
  readonly maker: Maker | null;
  readonly casting: FactName | null;
  /** `null`: on none, or on one that is not public. */
  readonly machine: Machine | null;
  readonly cipher: FactName | null;
  readonly isWorkedOut: boolean;
};

/**
 * A mark, as anybody may see it.
 *
 * @throws ProblemError `not-found` for one that is not there, stands on something that is not public, or tells a serial that is not shown.
 */
export async function readMark(id: string, knex: Knex): Promise<MarkOnRecord> {
  const mark = await Mark.query(knex).findById(id).withGraphFetched('[part.[maker, casting.[maker]], machine.model, readings.reader, decoding]');
  const { part, machine } = mark ?? {};
  const isPublic = part?.visibility === 'public' || machine?.visibility === 'public';
  const isKept = machine?.serialShown === false && mark !== undefined && TELLS_SERIAL.has(mark.kind);
  if (mark === undefined || !isPublic || isKept) throw new ProblemError('not-found', 'No mark that is public is at this address.');

  const fitting = part ? await PartFitting.query(knex).where({ partId: part.id }).whereRaw('upper_inf(fitted)').first().withGraphFetched('machine.model') : undefined;
  const foundIn = machine ?? fitting?.machine ?? null;
  const maker = part?.casting?.maker ?? part?.maker ?? null;
  const makers = [maker?.id, part?.casting?.pouredById].flatMap((one) => one ?? []);
  return {
    mark,
    maker,
    casting: await nameOf(part?.castingId, knex),
    machine: foundIn?.visibility === 'public' ? foundIn : null,
    cipher: await nameOf(mark.decoding?.cipherId, knex),
    isWorkedOut: mark.kind !== 'date-code' || !(await isBeingWorkedOut({ makers, models: foundIn ? [foundIn.modelId] : [] }, knex)),
  };
}

async function nameOf(factId: string | null | undefined, knex: Knex): Promise<FactName | null> {
  return factId ? ((await FactName.query(knex).findOne({ id: factId })) ?? null) : null;
}
