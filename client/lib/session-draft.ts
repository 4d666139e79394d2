import { useCallback, useState } from 'react';
import type { z } from 'zod';

const PREFIX = 'pourbook:typed:';

export type SessionDraft<Value> = {
  readonly value: Value;
  readonly change: (change: (now: Value) => Value) => void;
  /** What stands is in this tab's storage: a reload brings it back. False before anything was changed, and where the device keeps nothing. */
  readonly kept: boolean;
  /** It was saved, or given up: nothing of it is kept, and it begins anew. */
  readonly drop: () => void;
};

/**
 * What is being typed, kept in this tab's storage with every change, so that a reload or a sign-in in between loses nothing.
 * Put the member's id into `key`: what one typed is never shown to the next. What is kept and does not have the shape is as good as not there.
 */
export function useSessionDraft<Value>(key: string, initial: Value, shape: z.ZodType<Value>): SessionDraft<Value> {
  const [held, setHeld] = useState(() => takeUp(key, initial, shape));
  let now = held;
  if (held.key !== key) {
    now = takeUp(key, initial, shape);
    setHeld(now);
  }

  const change = useCallback(
    (amend: (now: Value) => Value) =>
      setHeld((before) => {
        const value = amend(before.value);
        return { key: before.key, value, kept: keep(before.key, value) };
      }),
    [],
  );
  const drop = useCallback(() => {
    attempt(() => sessionStorage.removeItem(PREFIX + key));
    setHeld({ key, value: initial, kept: false });
  }, [key, initial]);
  return { value: now.value, change, kept: now.kept, drop };
}

/** Somebody signed out: nothing they typed in this tab stays behind. */
export function dropSessionDrafts(): void {
  attempt(() => {
    for (const key of Object.keys(sessionStorage)) if (key.startsWith(PREFIX)) sessionStorage.removeItem(key);
  });
}

function takeUp<Value>(key: string, initial: Value, shape: z.ZodType<Value>): { readonly key: string; readonly value: Value; readonly kept: boolean } {
  const text = attempt(() => sessionStorage.getItem(PREFIX + key));
  const parsed = shape.safeParse(text === null ? null : attempt((): unknown => JSON.parse(text)));
  return parsed.success ? { key, value: parsed.data, kept: true } : { key, value: initial, kept: false };
}

function keep(key: string, value: unknown): boolean {
  return attempt(() => {
    sessionStorage.setItem(PREFIX + key, JSON.stringify(value));
    return true;
  }) ?? false;
}

/** Storage may be full, forbidden, or hold what somebody else wrote. */
function attempt<Result>(deed: () => Result): Result | null {
  try {
    return deed();
  } catch {
    return null;
  }
}
