import { useEffect, useId, useRef, useState } from 'react';
import type { ReactNode } from 'react';
import { Button } from '../../ui/button.tsx';

type Props = {
  /** What the button that opens it says. */
  readonly label: string;
  readonly children: (close: () => void) => ReactNode;
};

/** A step taken in line: a button, and below it, once pressed, what it needs. Focus goes in when it opens and back when it closes. */
export function InlineStep({ label, children }: Props) {
  const id = useId();
  const [open, setOpen] = useState(false);
  const opener = useRef<HTMLButtonElement>(null);
  const panel = useRef<HTMLDivElement>(null);
  const wasOpen = useRef(false);
  useEffect(() => {
    if (open) (panel.current?.querySelector<HTMLElement>('input:not([type=hidden], [hidden]), textarea, select') ?? panel.current)?.focus();
    else if (wasOpen.current) opener.current?.focus();
    wasOpen.current = open;
  }, [open]);
  return (
    <div>
      <Button ref={opener} aria-expanded={open} aria-controls={id} onClick={() => setOpen(!open)}>
        {label}
      </Button>
      <div id={id} ref={panel} tabIndex={-1} hidden={!open} className="mt-4 max-w-[560px] border-l border-graphite pl-4 outline-none">
        {open && children(() => setOpen(false))}
      </div>
    </div>
  );
}
