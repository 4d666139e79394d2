import { useEffect, useState } from 'react';

/** A value once it has stood still for so long: what changes with every key is asked about after a pause. */
export function useSettled<Value>(value: Value, pauseMs: number): Value {
  const [settled, setSettled] = useState(value);
  useEffect(() => {
    const timer = window.setTimeout(() => setSettled(value), pauseMs);
    return () => window.clearTimeout(timer);
  }, [value, pauseMs]);
  return settled;
}
