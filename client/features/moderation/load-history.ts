import type { QueryClient } from '@tanstack/react-query';
import { historyOfFact } from '../contributions/contributions-queries.ts';

/** Waits for a fact's history before its page is shown. That it could not be had is told by the page itself. */
export async function loadHistory(queryClient: QueryClient, id: string): Promise<null> {
  await queryClient.query(historyOfFact(id)).catch(shownByThePage);
  return null;
}

function shownByThePage(): void {}
