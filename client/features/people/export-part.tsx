import { useMutation } from '@tanstack/react-query';
import { exportMine } from '#contract/accounts.ts';
import { call } from '../../lib/call.ts';
import { today } from '../../lib/today.ts';
import { Button } from '../../ui/button.tsx';
import { ActTrouble } from './act-trouble.tsx';

/** Everything on record about a member, as a file. */
export function ExportPart() {
  const save = useMutation({
    mutationFn: () => call(exportMine, {}),
    gcTime: 0,
    onSuccess: (mine) => saveFile(`pourbook-${today()}.json`, `${JSON.stringify(mine, null, 2)}\n`),
  });
  return (
    <div className="space-y-3">
      <p className="max-w-measure">All that is on record about you, in one file (JSON): your account, what you entered, notices, letters, and what was written down of your acts.</p>
      <ActTrouble act={save} />
      <Button disabled={save.isPending} onClick={() => save.mutate()}>
        {save.isPending ? 'Gathering it' : 'Save my data'}
      </Button>
      <p role="status" className="min-h-6 text-[15px] text-slag">
        {save.isSuccess && 'Saved among your downloads.'}
      </p>
    </div>
  );
}

function saveFile(name: string, text: string): void {
  const address = URL.createObjectURL(new Blob([text], { type: 'application/json' }));
  const link = document.createElement('a');
  link.href = address;
  link.download = name;
  link.click();
  URL.revokeObjectURL(address);
}
