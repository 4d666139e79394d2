import { z } from 'zod';
import { LoosePayload } from '#contract/contributions.ts';
import type { Draft } from './draft-values.ts';

/** A draft that this device has and the register may not, with the revision it was written on. */
const KeptDraft = z.object({
  revision: z.number(),
  draft: z.object({ payload: LoosePayload, citations: z.array(LoosePayload), note: z.string().nullable() }),
});
export type KeptDraft = { readonly revision: number; readonly draft: Draft };

export type DraftShelf = {
  readonly read: () => KeptDraft | null;
  readonly keep: (kept: KeptDraft) => void;
  readonly drop: () => void;
};

/** Where this device keeps one contribution's draft until the register has it. A device that keeps nothing only loses this safety. */
export function draftShelf(id: string): DraftShelf {
  const key = `pourbook:draft:${id}`;
  return {
    read: () => {
      const text = attempt(() => localStorage.getItem(key));
      const parsed = KeptDraft.safeParse(text === null ? null : attempt((): unknown => JSON.parse(text)));
      return parsed.success ? parsed.data : null;
    },
    keep: (kept) => void attempt(() => localStorage.setItem(key, JSON.stringify(kept))),
    drop: () => void attempt(() => localStorage.removeItem(key)),
  };
}

/** Storage may be full, forbidden or hold what somebody else wrote. */
function attempt<T>(deed: () => T): T | null {
  try {
    return deed();
  } catch {
    return null;
  }
}
