import { useState } from 'react';
import { Button } from '../../ui/button.tsx';
import { PageTitle } from '../../ui/page-title.tsx';
import { PartingLine } from '../../ui/parting-line.tsx';

type Props = { readonly codes: readonly string[]; readonly onKept: () => void };

/** Recovery codes, shown this once, on a sheet of their own so that printing it prints them and nothing else. */
export function RecoveryCodesSheet({ codes, onKept }: Props) {
  const [copied, setCopied] = useState<'no' | 'yes' | 'refused'>('no');
  const copy = () => {
    // The clipboard is there over a secure connection only.
    if (!window.isSecureContext) setCopied('refused');
    else navigator.clipboard.writeText(codes.join('\n')).then(() => setCopied('yes'), () => setCopied('refused'));
  };
  return (
    <>
      <PageTitle title="Recovery codes" below="For the day your authenticator or passkey is not at hand.">
        Recovery codes
      </PageTitle>
      <PartingLine />
      <div className="max-w-measure space-y-6 pt-8">
        <p>
          Each signs you in once, after your password. They are shown now and never again: print them or copy them to a place that is not this device.
          Codes you had before no longer work.
        </p>
        <ol aria-label="Recovery codes" className="grid gap-x-10 gap-y-1 border-y border-graphite py-4 font-mono text-[19px] roomy:grid-cols-2">
          {codes.map((code) => (
            <li key={code}>{code}</li>
          ))}
        </ol>
        <div className="no-print">
          <div className="flex flex-wrap gap-3">
            <Button onClick={copy}>Copy the codes</Button>
            <Button onClick={() => window.print()}>Print this sheet</Button>
          </div>
          <p role="status" className="mt-1 min-h-6 text-[15px] text-slag">
            {copied === 'yes' && 'Copied.'}
            {copied === 'refused' && 'This browser does not let us copy. Select the codes and copy them by hand.'}
          </p>
          <Button weight="primary" className="mt-3" onClick={onKept}>
            I have kept them
          </Button>
        </div>
      </div>
    </>
  );
}
