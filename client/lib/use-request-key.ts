import { useRef } from 'react';
import { v4 as uuidV4 } from 'uuid';

/**
 * The key a creating request is sent under: the same for as long as the same is asked for, so that one whose answer was lost on the way can be
 * sent again and makes nothing twice; a new one once something else is asked for.
 */
export function useRequestKey(): (asked: unknown) => string {
  const last = useRef<{ readonly text: string; readonly key: string } | null>(null);
  return (asked) => {
    const text = JSON.stringify(asked);
    if (last.current?.text !== text) last.current = { text, key: uuidV4() };
    return last.current.key;
  };
}
