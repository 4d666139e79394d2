import { useEffect, useEffectEvent, useState } from 'react';

/** Long enough to type the next glyph, short enough to feel like an answer. */
const PAUSE_MS = 220;

/**
 * The text of a box whose settled value lives elsewhere (in the address): shown at once, handed on after a pause.
 * When the settled value changes from outside (Back, a link), the text follows it; an echo of what was handed on never
 * overwrites what has been typed since.
 */
export function useDraft(settled: string, settle: (text: string) => void): [string, (text: string) => void] {
  const [held, setHeld] = useState({ text: settled, handed: settled, seen: settled });
  const { text } = held;
  if (held.seen !== settled) {
    setHeld(settled === held.handed ? { ...held, seen: settled } : { text: settled, handed: settled, seen: settled });
  }

  const hand = useEffectEvent(() => {
    setHeld((now) => ({ ...now, handed: text }));
    settle(text);
  });
  useEffect(() => {
    if (text === settled) return;
    const timer = window.setTimeout(() => hand(), PAUSE_MS);
    return () => window.clearTimeout(timer);
  }, [text, settled]);

  return [text, (typed) => setHeld((now) => ({ ...now, text: typed }))];
}
