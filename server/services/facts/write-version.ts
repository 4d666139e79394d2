import type { Knex } from 'knex';
import { v7 as uuidV7 } from 'uuid';
import { z } from 'zod';
import type { Citation } from '#contract/citations.ts';
import type { PayloadOf } from '#contract/kinds.ts';
import { CipherVersion } from '#db/models/cipher-version.ts';
import type { FactCitation } from '#db/models/fact-citation.ts';
import { FactSource } from '#db/models/fact-source.ts';
import { FactVersion } from '#db/models/fact-version.ts';
import { Fact } from '#db/models/fact.ts';
import type { FactKind } from '#domain/vocabulary.ts';
import { kindModule } from '#server/services/kinds/all-kinds.ts';
import { enterSources } from './enter-sources.ts';
import { versionsOf } from './fact-versions.ts';
import type { FactIdentity, VersionOnRecord } from './fact-versions.ts';

export type NewVersion<K extends FactKind> = {
  readonly kind: K;
  /** `null`: of a new fact. */
  readonly factId: string | null;
  readonly payload: PayloadOf<K>;
  readonly citations: readonly Citation[];
  /** Under whose name it stands. */
  readonly enteredById: string;
  readonly decidedById: string | null;
  readonly reason: string;
  readonly contributionId: string | null;
  /** The older version it says again. */
  readonly broughtBack: number | null;
};

export type WrittenVersion = {
  readonly factId: string;
  readonly version: number;
  /** The version it took the place of; `null`: nothing was in force. */
  readonly before: VersionOnRecord | null;
};

/**
 * Writes a version and brings it into force: the fact's row says it, its sources stand behind the fact, and what was in force before is
 * superseded. The fact's other writers wait until the transaction ends.
 */
export async function writeVersion<K extends FactKind>(entry: NewVersion<K>, trx: Knex.Transaction): Promise<WrittenVersion> {
  const { kind, payload } = entry;
  const fact: FactIdentity = { kind, id: entry.factId ?? uuidV7() };
  if (entry.factId === null) await Fact.query(trx).insert(fact);
  else await lockFact(fact.id, trx);

  const versions = entry.factId === null ? [] : await versionsOf(fact, trx);
  const before = versions.find((one) => one.inForce) ?? null;
  const at = await supersede(fact, before, trx);
  const citations = await enterSources(entry.citations, entry.enteredById, trx);
  const writing = {
    factId: fact.id,
    isNew: before === null,
    slug: versions[0]?.slug ?? null,
    sourceIds: citations.map(({ sourceId }) => sourceId),
  };
  const slug = await kindModule(kind).write(payload, writing, trx);

  const number = (versions[0]?.number ?? 0) + 1;
  const { enteredById, decidedById, reason, contributionId, broughtBack } = entry;
  const version = { number, citations, enteredById, decidedById, reason, contributionId, broughtBack, enteredAt: at };
  await insertVersion(fact, version, { ...payload, ...(slug === null ? {} : { slug }) }, trx);
  await citeFor(fact.id, citations, trx);
  return { factId: fact.id, version: number, before };
}

/** Holds the fact until the transaction ends, so that what is in force is one writer's to change. */
export async function lockFact(factId: string, trx: Knex.Transaction): Promise<Fact | undefined> {
  return Fact.query(trx).findById(factId).forUpdate();
}

/** Ends what is in force, if anything is. Answers the moment: later than any version's, as the fact is locked. */
export async function supersede(fact: FactIdentity, before: VersionOnRecord | null, trx: Knex.Transaction): Promise<string> {
  const { rows } = await trx.raw<{ rows: unknown[] }>('select clock_timestamp() as at');
  const [{ at }] = z.tuple([z.object({ at: z.string() })]).parse(rows);
  if (before !== null) {
    const query = fact.kind === 'cipher' ? CipherVersion.query(trx).where({ cipherId: fact.id }) : FactVersion.query(trx).where({ factId: fact.id });
    await query.where({ number: before.number }).patch({ supersededAt: at });
  }
  return at;
}

type VersionColumns = Pick<FactVersion, 'number' | 'citations' | 'enteredById' | 'decidedById' | 'reason' | 'contributionId' | 'broughtBack' | 'enteredAt'>;

async function insertVersion(fact: FactIdentity, columns: VersionColumns, payload: Readonly<Record<string, unknown>>, trx: Knex.Transaction): Promise<void> {
  if (fact.kind !== 'cipher') {
    await FactVersion.query(trx).insert({ factId: fact.id, kind: fact.kind, payload, ...columns });
    return;
  }
  const { definition, ...header } = payload;
  await CipherVersion.query(trx).insert(CipherVersion.fromJson({ cipherId: fact.id, header, definition, ...columns }));
}

async function citeFor(factId: string, citations: readonly FactCitation[], trx: Knex.Transaction): Promise<void> {
  await FactSource.query(trx).delete().where({ factId });
  if (citations.length > 0) await FactSource.query(trx).insert(citations.map((citation) => ({ id: uuidV7(), factId, ...citation })));
}
