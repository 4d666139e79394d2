import type { z } from 'zod';
import { faultsOf } from '#contract/faults.ts';

export type ReadSearch<Schema extends z.ZodObject> = {
  /** What the address asks for, with the list's own defaults; parts the list would refuse are left out. */
  readonly query: z.output<Schema>;
  /** Name of a refused part → why. */
  readonly refused: Readonly<Partial<Record<string, string>>>;
};

/**
 * Reads a list's search from the address through the schema that the register itself checks it with. Names the list does not know
 * are passed over.
 */
export function readSearch<Schema extends z.ZodObject>(schema: Schema, params: URLSearchParams): ReadSearch<Schema> {
  const given = Object.fromEntries([...params].filter(([name, value]) => name in schema.shape && value.trim() !== ''));
  const parsed = schema.safeParse(given);
  if (parsed.success) return { query: parsed.data, refused: {} };
  const refused = Object.fromEntries(faultsOf(parsed.error).map(({ path, message }) => [String(path[0]), message]));
  return { query: schema.parse(Object.fromEntries(Object.entries(given).filter(([name]) => !(name in refused)))), refused };
}

/** The address after a change of filters: null or empty takes one away. Unless the change is the cursor, the list starts from its beginning again. */
export function changeSearch(params: URLSearchParams, change: Readonly<Record<string, string | null>>): URLSearchParams {
  const changed = new URLSearchParams(params);
  changed.delete('after');
  for (const [name, value] of Object.entries(change)) {
    if (value === null || value.trim() === '') changed.delete(name);
    else changed.set(name, value);
  }
  return changed;
}

/** Whether the address narrows the list; order and place in it don't. */
export function isNarrowed(query: Readonly<Record<string, unknown>>): boolean {
  return Object.entries(query).some(([name, value]) => value !== undefined && !['sort', 'limit', 'after'].includes(name));
}
