import { useCallback, useEffect, useRef } from 'react';
import { useSearchParams } from 'react-router-dom';
import { changeDecodeState, readDecodeState, writeDecodeState } from './decode-state.ts';
import type { DecodeState } from './decode-state.ts';

/** `typed` changes replace the address, so that Back leaves a box whole instead of letter by letter; choices are steps of their own. */
export type ChangeState = (change: Partial<DecodeState>, how?: 'chosen' | 'typed') => void;

export function useDecodeState(): [DecodeState, ChangeState] {
  const [search, setSearch] = useSearchParams();
  // Where the address is going: a second change may come while the first is still on its way, and must build on it.
  const heading = useRef(search);
  useEffect(() => {
    heading.current = search;
  }, [search]);

  const change = useCallback<ChangeState>(
    (patch, how = 'chosen') => {
      heading.current = writeDecodeState(changeDecodeState(readDecodeState(heading.current), patch));
      setSearch(heading.current, { replace: how === 'typed', preventScrollReset: true });
    },
    [setSearch],
  );
  return [readDecodeState(search), change];
}
