import type { Knex } from 'knex';
import { writeRange } from '#db/ranges.ts';
import type { Changes } from './what-changed.ts';

/** Writes what came out otherwise, each table in one statement however many rows. */
export async function writeChanges({ castings, decodings, fits, undecoded }: Changes, trx: Knex.Transaction): Promise<void> {
  if (castings.length > 0) {
    await trx.raw(
      `update parts set casting_id = now.casting_id
         from jsonb_to_recordset(?::jsonb) as now (part_id uuid, casting_id uuid)
        where parts.id = now.part_id`,
      [JSON.stringify(castings.map(({ partId, castingId }) => ({ part_id: partId, casting_id: castingId })))],
    );
  }
  if (undecoded.length > 0) await trx('mark_decodings').whereIn('markId', [...undecoded]).delete();
  if (decodings.length > 0) {
    await trx.raw(
      `insert into mark_decodings (mark_id, cipher_id, cipher_version, status, total, candidates)
       select * from jsonb_to_recordset(?::jsonb) as now (mark_id uuid, cipher_id uuid, cipher_version integer, status text, total integer, candidates jsonb)
       on conflict (mark_id) do update set
         (cipher_id, cipher_version, status, total, candidates)
           = (excluded.cipher_id, excluded.cipher_version, excluded.status, excluded.total, excluded.candidates)`,
      [
        JSON.stringify(
          decodings.map(({ markId, cipherId, cipherVersion, status, total, candidates }) => ({
            mark_id: markId, cipher_id: cipherId, cipher_version: cipherVersion, status, total, candidates,
          })),
        ),
      ],
    );
  }
  if (fits.length > 0) {
    await trx.raw(
      `insert into part_fits (fitting_id, verdict, late, in_lead, early, mark_id, built, type_verdict)
       select fitting_id, verdict, late, in_lead, early, mark_id, built::daterange, type_verdict
         from jsonb_to_recordset(?::jsonb) as now (fitting_id uuid, verdict text, late double precision, in_lead double precision,
                early double precision, mark_id uuid, built text, type_verdict text)
       on conflict (fitting_id) do update set
         (verdict, late, in_lead, early, mark_id, built, type_verdict)
           = (excluded.verdict, excluded.late, excluded.in_lead, excluded.early, excluded.mark_id, excluded.built, excluded.type_verdict)`,
      [
        JSON.stringify(
          fits.map(({ fittingId, verdict, late, inLead, early, markId, built, typeVerdict }) => ({
            fitting_id: fittingId, verdict, late, in_lead: inLead, early, mark_id: markId, built: writeRange(built), type_verdict: typeVerdict,
          })),
        ),
      ],
    );
  }
}

/** Notes on which machines something came out otherwise, to tell their owners once the rework is over. */
export async function noteMachines(reworkId: string, { machines }: Changes, trx: Knex.Transaction): Promise<void> {
  if (machines.length === 0) return;
  await trx.raw(
    `insert into rework_machines (rework_id, machine_id, castings, dates, fits)
     select ?, machine_id, castings, dates, fits
       from jsonb_to_recordset(?::jsonb) as now (machine_id uuid, castings integer, dates integer, fits integer)
     on conflict (rework_id, machine_id) do update set
       castings = rework_machines.castings + excluded.castings,
       dates = rework_machines.dates + excluded.dates,
       fits = rework_machines.fits + excluded.fits`,
    [reworkId, JSON.stringify(machines.map(({ machineId, castings, dates, fits }) => ({ machine_id: machineId, castings, dates, fits })))],
  );
}
