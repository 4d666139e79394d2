import type { Basis } from '#fixtures/reference/reference-table.ts';

/** How a test of an example is called, so that outside evidence and our own reckoning are told apart in the run. */
export const BASIS_LABELS: Readonly<Record<Basis, string>> = {
  published: 'published',
  derived: 'consistency check, derived',
  memory: 'from memory',
};
