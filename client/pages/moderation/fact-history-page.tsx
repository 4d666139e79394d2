import { useParams } from 'react-router-dom';
import { FactHistoryView } from '../../features/moderation/fact-history-view.tsx';

export function Component() {
  const { id = '' } = useParams();
  return <FactHistoryView key={id} id={id} />;
}
