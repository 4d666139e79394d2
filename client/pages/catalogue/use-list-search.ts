import { useSearchParams } from 'react-router-dom';
import type { z } from 'zod';
import { changeSearch, isNarrowed, readSearch } from './list-search.ts';
import type { ReadSearch } from './list-search.ts';

export type ListSearch<Schema extends z.ZodObject> = ReadSearch<Schema> & {
  readonly params: URLSearchParams;
  readonly narrowed: boolean;
  /** Sets filters; null takes one away. */
  readonly change: (change: Readonly<Record<string, string | null>>) => void;
};

/**
 * A list's search, held in the address and nowhere else. Typing on in a box that has text already replaces the address, so that Back
 * goes to the list before the word, not to every letter of it.
 */
export function useListSearch<Schema extends z.ZodObject>(schema: Schema): ListSearch<Schema> {
  const [params, setParams] = useSearchParams();
  const read = readSearch(schema, params);
  return {
    ...read,
    params,
    narrowed: isNarrowed(read.query) || Object.keys(read.refused).length > 0,
    change: (change) => {
      const typingOn = Object.entries(change).every(
        ([name, value]) => ['q', 'number'].includes(name) && params.has(name) && value !== null && value !== '',
      );
      setParams((now) => changeSearch(now, change), { preventScrollReset: true, replace: typingOn });
    },
  };
}
