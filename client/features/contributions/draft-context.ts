import { createContext, useContext } from 'react';
import type { LoosePayload } from '#contract/contributions.ts';
import type { FieldFault } from '#contract/problem.ts';
import type { Path } from './draft-values.ts';

/** What every control of a draft may need to know beside its own value. */
export type DraftSurroundings = {
  readonly payload: LoosePayload;
  /** The fact it would change; null for a new one. */
  readonly subjectId: string | null;
  /** Shown faults: none until the author first wants to go on. */
  readonly faults: readonly FieldFault[];
  /** What a fact, an account or a source is called; null where nobody has said yet. */
  readonly nameOf: (id: string) => string | null;
  readonly learnName: (id: string, name: string) => void;
};

const Surroundings = createContext<DraftSurroundings | null>(null);

export const DraftSurroundingsProvider = Surroundings.Provider;

/** @throws Error outside a draft. */
export function useSurroundings(): DraftSurroundings {
  const surroundings = useContext(Surroundings);
  if (surroundings === null) throw new Error('A control of a draft stands outside of it');
  return surroundings;
}

/** The first fault at exactly this place of the draft. */
export function useFaultAt(path: Path): string | null {
  const at = path.join('.');
  return useSurroundings().faults.find((fault) => fault.path.join('.') === at)?.message ?? null;
}
