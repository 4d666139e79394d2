import type { Knex } from 'knex';
import { Findings } from '#contract/evidence.ts';
import type { EvidenceGroup } from '#contract/evidence.ts';
import { ContributionEvidence } from '#db/models/contribution-evidence.ts';
import { Mark } from '#db/models/mark.ts';

export type KeptEvidence = { readonly evidence: ContributionEvidence; readonly findings: Findings };

/**
 * The evidence kept with a contribution, the newest first, as it may be shown today: a mark on something that was taken from sight since
 * is only counted.
 */
export async function keptEvidence(contributionId: string, knex: Knex): Promise<readonly KeptEvidence[]> {
  const rows = await ContributionEvidence.query(knex)
    .where({ contributionId })
    .orderBy([{ column: 'gatheredAt', order: 'desc' }, { column: 'id', order: 'desc' }]);
  const kept = rows.map((evidence) => ({ evidence, findings: Findings.parse(evidence.findings) }));
  const marks = kept.flatMap(({ findings }) => findings.groups.flatMap(marksIn));
  const shown = await publicMarks(marks, knex);
  return kept.map(({ evidence, findings }) => ({ evidence, findings: { ...findings, groups: findings.groups.map((group) => without(group, shown)) } }));
}

function marksIn({ items }: EvidenceGroup): string[] {
  return items.flatMap(({ subject }) => (subject?.kind === 'mark' ? [subject.id] : []));
}

function without(group: EvidenceGroup, shown: ReadonlySet<string>): EvidenceGroup {
  const items = group.items.filter(({ subject }) => subject?.kind !== 'mark' || shown.has(subject.id));
  return { ...group, items, unlisted: group.unlisted + group.items.length - items.length };
}

async function publicMarks(ids: readonly string[], knex: Knex): Promise<ReadonlySet<string>> {
  if (ids.length === 0) return new Set();
  const marks = await Mark.query(knex)
    .leftJoin('parts', 'parts.id', 'marks.partId')
    .leftJoin('machines', 'machines.id', 'marks.machineId')
    .whereIn('marks.id', [...new Set(ids)])
    .where((any) => void any.where('parts.visibility', 'public').orWhere('machines.visibility', 'public'))
    .select('marks.id');
  return new Set(marks.map(({ id }) => id));
}
