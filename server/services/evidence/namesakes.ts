import type { Knex } from 'knex';
import { z } from 'zod';
import type { EvidenceGroup } from '#contract/evidence.ts';
import { groupOf } from './evidence-group.ts';
import { factSubjects } from './name-facts.ts';

/** Names that share this part of their three-letter runs read alike, to an eye that looks quickly. */
const ALIKE = 0.4;

type Named = {
  readonly table: 'makers' | 'works' | 'models' | 'part_types';
  readonly name: string;
  readonly factId: string | null;
  /** Only among these. */
  readonly among?: Readonly<Record<string, string>>;
};

/** Others of the kind whose names read alike: it may be on record already. */
export async function namesakes({ table, name, factId, among = {} }: Named, knex: Knex): Promise<EvidenceGroup> {
  const query = knex(table)
    .where(among)
    .whereRaw('similarity(name, ?) >= ?', [name, ALIKE])
    .orderByRaw('similarity(name, ?) desc, id', [name])
    .select('id');
  if (factId !== null) void query.whereNot({ id: factId });
  const rows = z.array(z.object({ id: z.string() })).parse(await query);
  const subjectOf = await factSubjects(rows.map(({ id }) => id), knex);
  return groupOf('namesakes', 'Names that read alike', rows.map(({ id }) => ({ subject: subjectOf(id), mark: null, text: 'On record already' })));
}
