import { bringBack, retireFact } from '#contract/facts.ts';
import type { FactHistory } from '#contract/facts.ts';
import { call } from '../../lib/call.ts';
import { useContractForm } from '../../lib/use-contract-form.ts';
import { Button } from '../../ui/button.tsx';
import { ActTrouble } from '../people/act-trouble.tsx';
import { FormTrouble } from '../people/form-trouble.tsx';
import { explainConflict } from './explain-conflict.ts';
import { ReasonBox } from './reason-box.tsx';
import { useFactChanged } from './use-fact-changed.ts';

type Props = { readonly history: FactHistory; readonly onDone: () => void };

/** Brings an older version back, for a reason. */
export function BringBackForm({ history: { fact, inForce }, version, onDone }: Props & { readonly version: number }) {
  const changed = useFactChanged();
  const form = useContractForm({
    schema: bringBack.body,
    fields: { reason: 'Reason' },
    read: (data) => ({ reason: data.get('reason'), version, inForce }),
    send: (body) => call(bringBack, { params: { id: fact.id }, body }),
    onDone: (answer) => {
      onDone();
      changed(answer);
    },
  });
  return (
    <>
      <p className="mb-3">What version {version} said is entered again as a new version. The versions between stay in the history.</p>
      <ActTrouble act={form.act} proofOnly />
      <form {...form.form}>
        <FormTrouble form={form} title="It was not brought back" explain={explainConflict} />
        <ReasonBox {...form.field('reason')} />
        <Button type="submit" disabled={form.busy}>
          Enter it again
        </Button>
      </form>
    </>
  );
}

/** Takes a fact that was wrong out of the catalogue, for a reason. */
export function RetireForm({ history: { fact }, inForce, onDone }: Props & { readonly inForce: number }) {
  const changed = useFactChanged();
  const form = useContractForm({
    schema: retireFact.body,
    fields: { reason: 'Reason' },
    read: (data) => ({ reason: data.get('reason'), inForce }),
    send: (body) => call(retireFact, { params: { id: fact.id }, body }),
    onDone: (answer) => {
      onDone();
      changed(answer);
    },
  });
  return (
    <>
      <p className="mb-3">Nothing of it stays in force. Its history stays at this address, and any version can be brought back.</p>
      <ActTrouble act={form.act} proofOnly />
      <form {...form.form}>
        <FormTrouble form={form} title="It was not retired" explain={explainConflict} />
        <ReasonBox {...form.field('reason')} />
        <Button type="submit" disabled={form.busy}>
          Retire it
        </Button>
      </form>
    </>
  );
}
