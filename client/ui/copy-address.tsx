import { useState } from 'react';
import { Button } from './button.tsx';

/** Copies the page's address, which holds all that was typed; where the device won't, shows it to be copied by hand. */
export function CopyAddress() {
  const [state, setState] = useState<'ready' | 'copied' | 'by-hand'>('ready');
  const copy = () => {
    // The clipboard is there over a secure connection only.
    if (!window.isSecureContext) setState('by-hand');
    else navigator.clipboard.writeText(window.location.href).then(() => setState('copied'), () => setState('by-hand'));
  };
  return (
    <div className="no-print">
      <Button onClick={copy}>Copy address</Button>
      <p role="status" className="mt-1 min-h-6 text-[15px] text-slag">
        {state === 'copied' && 'Copied.'}
      </p>
      {state === 'by-hand' && (
        <input readOnly aria-label="Address of this page" value={window.location.href} onFocus={(event) => event.target.select()} className="min-h-11 w-full border border-edge bg-paper px-2 font-mono text-[15px]" />
      )}
    </div>
  );
}
