import { useQueryClient } from '@tanstack/react-query';
import type { FactHistory } from '#contract/facts.ts';
import { historyOfFact } from '../contributions/contributions-queries.ts';

/** After an act on a fact: its history as it is now, and everything else asked for anew, as much of the catalogue may rest on it. */
export function useFactChanged(): (history: FactHistory) => void {
  const queryClient = useQueryClient();
  return (history) => {
    const { queryKey } = historyOfFact(history.fact.id);
    queryClient.setQueryData(queryKey, history);
    void queryClient.invalidateQueries({ predicate: (query) => query.queryKey !== queryKey && query.queryKey.join() !== queryKey.join() });
  };
}
