import type { QueryClient } from '@tanstack/react-query';
import { useParams } from 'react-router-dom';
import type { LoaderFunction } from 'react-router-dom';
import { FactHistoryView } from '../../features/moderation/fact-history-view.tsx';
import { loadHistory } from '../../features/moderation/load-history.ts';

export function loader(queryClient: QueryClient): LoaderFunction {
  return ({ params }) => loadHistory(queryClient, params['id'] ?? '');
}

export function Component() {
  const { id = '' } = useParams();
  return <FactHistoryView key={id} id={id} />;
}
