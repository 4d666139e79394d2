import { suspendMember, unsuspendMember } from '#contract/admin.ts';
import type { MemberPage } from '#contract/admin.ts';
import { call } from '../../lib/call.ts';
import { useContractForm } from '../../lib/use-contract-form.ts';
import { Button } from '../../ui/button.tsx';
import { ActTrouble } from '../people/act-trouble.tsx';
import { FormTrouble } from '../people/form-trouble.tsx';
import { ReasonField } from './reason-field.tsx';
import { useMemberChanged } from './use-member-changed.ts';

type Deed = 'suspend' | 'unsuspend';

const DEEDS = {
  suspend: {
    endpoint: suspendMember,
    press: 'Suspend the member',
    trouble: 'Not suspended',
    hint: 'The member reads it in a letter, and it is written down in the trail.',
  },
  unsuspend: {
    endpoint: unsuspendMember,
    press: 'Lift the suspension',
    trouble: 'The suspension still stands',
    hint: 'It is written down in the trail.',
  },
} as const satisfies Record<Deed, unknown>;

/** Suspends a member, or lets them in again, for a reason. */
export function SuspensionForm({ member, deed, onDone }: { readonly member: MemberPage; readonly deed: Deed; readonly onDone: () => void }) {
  const { endpoint, press, trouble, hint } = DEEDS[deed];
  const changed = useMemberChanged();
  const form = useContractForm({
    schema: endpoint.body,
    fields: { reason: 'Reason' },
    read: (data) => ({ reason: data.get('reason'), version: member.version }),
    send: (body) => call(endpoint, { params: { id: member.id }, body }),
    onDone: (answer) => {
      onDone();
      changed(answer);
    },
  });
  return (
    <>
      <ActTrouble act={form.act} proofOnly />
      <form {...form.form}>
        <FormTrouble form={form} title={trouble} />
        <ReasonField {...form.field('reason')} hint={hint} />
        <Button type="submit" disabled={form.busy}>
          {press}
        </Button>
      </form>
    </>
  );
}
