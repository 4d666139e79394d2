import type { z } from 'zod';
import type { Rework as ReworkAnswer } from '#contract/moderation.ts';
import type { ReworkOnRecord } from '#server/services/reworks/list-reworks.ts';

export function presentRework({ rework, name, machinesChanged }: ReworkOnRecord): z.input<typeof ReworkAnswer> {
  const { id, factId, kind, version, startedAt, finishedAt, state, done, total, changed } = rework;
  return {
    id,
    fact: { id: factId, kind, slug: name?.slug ?? null, title: name?.title ?? 'No longer in the catalogue' },
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
