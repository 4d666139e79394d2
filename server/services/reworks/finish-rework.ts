import type { Knex } from 'knex';
import { writeSerial } from '#domain/serials/serial.ts';
import { CipherVersion } from '#db/models/cipher-version.ts';
import { FactVersion } from '#db/models/fact-version.ts';
import type { Machine } from '#db/models/machine.ts';
import { ReworkMachine } from '#db/models/rework-machine.ts';
import type { Rework } from '#db/models/rework.ts';
import { nameFact } from '#server/services/facts/name-facts.ts';
import { groupedBy } from '#server/services/grouped-by.ts';
import { notify } from '#server/services/notices/notify.ts';

/** Machines named in one notice; the rest are counted. */
const MOST_NAMED = 15;
/** Characters that are told of each, so that the whole is no longer than a notice may be. */
const TOLD = { title: 200, reason: 500, nickname: 60 } as const;

/** Closes a rework and tells each owner once what changed on which of their machines, and why. In the transaction that holds the rework. */
export async function finishRework(rework: Rework, trx: Knex.Transaction): Promise<void> {
  const changed = await ReworkMachine.query(trx).where({ reworkId: rework.id }).orderBy('machineId').withGraphFetched('machine');
  const byOwner = groupedBy(changed, ({ machine }) => loaded(machine).ownerId);
  if (byOwner.size > 0) {
    const why = await whyOf(rework, trx);
    for (const [memberId, machines] of byOwner) {
      await notify({ memberId, kind: 'recomputed', title: titleOf(machines), body: bodyOf(machines, why), href: `/facts/${rework.factId}/history` }, trx);
    }
  }
  await rework.$query(trx).patch({ state: 'done', finishedAt: trx.fn.now(), total: rework.done });
}

async function whyOf({ factId, kind, version }: Rework, trx: Knex.Transaction): Promise<string> {
  const title = shortened((await nameFact(factId, trx))?.title ?? 'An entry of the catalogue', TOLD.title);
  if (version === null) return `${title} was taken out of the catalogue.`;
  const entered = kind === 'cipher' ? await CipherVersion.query(trx).findById([factId, version]) : await FactVersion.query(trx).findById([factId, version]);
  const reason = entered === undefined ? '' : `: ${shortened(entered.reason, TOLD.reason)}`;
  return `${title} changed and is at version ${version}${reason}`;
}

function titleOf(machines: readonly ReworkMachine[]): string {
  const [only, ...others] = machines;
  return only !== undefined && others.length === 0 ? `Worked out again: ${nameOf(loaded(only.machine))}` : `Worked out again: ${machines.length} of your machines`;
}

function bodyOf(machines: readonly ReworkMachine[], why: string): string {
  const lines = machines.slice(0, MOST_NAMED).map(({ machine, castings, dates, fits }) => {
    const told = [counted(castings, 'part identified otherwise', 'parts identified otherwise'), counted(dates, 'date', 'dates'), counted(fits, 'fit', 'fits')];
    return `${nameOf(loaded(machine))}: ${told.filter((text) => text !== null).join(', ')}.`;
  });
  const left = machines.length - lines.length;
  return [why, 'What came out otherwise:', ...lines, ...(left > 0 ? [`And on ${left} more.`] : [])].join('\n');
}

/** Owners see their own serials whole. */
function nameOf({ prefix, number, suffix, nickname }: Machine): string {
  const serial = writeSerial({ prefix, digits: number, suffix });
  return nickname === null ? serial : `${shortened(nickname, TOLD.nickname)} (${serial})`;
}

function counted(count: number, one: string, many: string): string | null {
  return count === 0 ? null : `${count} ${count === 1 ? one : many}`;
}

function shortened(text: string, most: number): string {
  return text.length <= most ? text : `${text.slice(0, most - 1).trimEnd()}…`;
}

function loaded(machine: Machine | undefined): Machine {
  if (machine === undefined) throw new RangeError('A machine that changed was not loaded');
  return machine;
}
