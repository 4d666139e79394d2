import type { Knex } from 'knex';
import type { FactKind } from '#domain/vocabulary.ts';
import { kindModule } from '#server/services/kinds/all-kinds.ts';
import { parsePayload } from '#server/services/kinds/parse-payload.ts';
import type { Rests } from '#server/services/kinds/kind-module.ts';
import { startRework } from '#server/services/reworks/start-rework.ts';
import type { VersionOnRecord } from './fact-versions.ts';
import { requireAccepted } from './refusal-of.ts';
import { writeVersion } from './write-version.ts';
import type { NewVersion, WrittenVersion } from './write-version.ts';

/**
 * Brings a version into force and has everything that rests on the fact worked out again.
 *
 * @throws ProblemError `conflict`, by path, where the rest of the catalogue says otherwise.
 */
export async function enterVersion<K extends FactKind>(entry: NewVersion<K>, trx: Knex.Transaction): Promise<WrittenVersion> {
  const { kind } = entry;
  const written = await requireAccepted(kind, async () =>
    trx.transaction(async (savepoint) => {
      const tried = await writeVersion(entry, savepoint);
      await savepoint.raw('set constraints all immediate');
      return tried;
    }),
  );
  await trx.raw('set constraints all deferred');
  const after = await kindModule(kind).restsOn(entry.payload, trx);
  const { factId, version, before } = written;
  await startRework({ factId, kind, version, rests: bothRests(after, await restsOf(kind, before, trx)) }, trx);
  return written;
}

/** What rests on a fact as that version has it. */
export async function restsOf(kind: FactKind, version: VersionOnRecord | null, knex: Knex): Promise<Rests> {
  const said = parsePayload(kind, version?.payload);
  return said.ok ? kindModule(kind).restsOn(said.value, knex) : { makers: [], models: [] };
}

function bothRests(one: Rests, other: Rests): Rests {
  return { makers: [...one.makers, ...other.makers], models: [...one.models, ...other.models] };
}
