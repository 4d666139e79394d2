import { useQueryClient } from '@tanstack/react-query';
import { settleFlag } from '#contract/moderation.ts';
import { call } from '../../lib/call.ts';
import { useContractForm } from '../../lib/use-contract-form.ts';
import { Button } from '../../ui/button.tsx';
import { SelectField } from '../../ui/select-field.tsx';
import { ActTrouble } from '../people/act-trouble.tsx';
import { FormTrouble } from '../people/form-trouble.tsx';
import { explainConflict } from './explain-conflict.ts';
import { moderationKeys } from './moderation-queries.ts';
import { ReasonBox } from './reason-box.tsx';

/** Says what became of a flag, and why; it leaves the queue with that. */
export function SettleForm({ flagId, onDone }: { readonly flagId: string; readonly onDone: () => void }) {
  const queryClient = useQueryClient();
  const form = useContractForm({
    schema: settleFlag.body,
    fields: { outcome: 'What became of it', reason: 'Reason' },
    send: (body) => call(settleFlag, { params: { id: flagId }, body }),
    onDone: () => {
      onDone();
      void queryClient.invalidateQueries({ queryKey: moderationKeys.queue });
    },
  });
  return (
    <>
      <ActTrouble act={form.act} proofOnly />
      <form {...form.form}>
        <FormTrouble form={form} title="The flag still stands" explain={explainConflict} />
        <SelectField {...form.field('outcome')} label="What became of it" defaultValue="acted" className="max-w-[420px]">
          <option value="acted">Something was wrong, and is being mended</option>
          <option value="kept">It stays as it is</option>
        </SelectField>
        <ReasonBox {...form.field('reason')} hint="Whoever flagged it reads this." />
        <Button type="submit" disabled={form.busy}>
          Settle the flag
        </Button>
      </form>
    </>
  );
}
