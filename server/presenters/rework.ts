import type { z } from 'zod';
import type { Rework as ReworkAnswer } from '#contract/moderation.ts';
import type { ReworkOnRecord } from '#server/services/reworks/list-reworks.ts';

export function presentRework({ rework, fact, machinesChanged }: ReworkOnRecord): z.input<typeof ReworkAnswer> {
  const { id, version, startedAt, finishedAt, state, done, total, changed } = rework;
  return {
    id,
    fact: { id: fact.id, kind: fact.kind, slug: fact.slug, title: fact.title },
    version,
    startedAt,
    finishedAt,
    state,
    done,
    total,
    changed,
    machinesChanged,
  };
}
